import { takeFraction } from '@shared/calc/intake';
import { FRACTIONS, type Fraction } from '@shared/calc/types';
import type { OrderForm } from '@shared/orders/form';
import { workOutDraft } from '@shared/orders/work-out-draft';
import { formatNumber } from '@shared/rounding';
import type { DraftContext } from '@shared/routes/orders';
import { instant, localDateTime, parseInstant } from '@shared/time';

/**
 * Full maintenance of this child, mL in 24 h. It follows from weight, method and age alone, so it is known while
 * other entries are still missing: those are filled with entries that do not enter it. Undefined where the weight
 * or the method is missing, or the method refuses this child.
 */
export function fullMaintenance(form: OrderForm, context: DraftContext): number | undefined {
  const now = localDateTime(parseInstant(context.now) ?? instant(0), context.zone);
  return fullFrom(form, context, form.plannedStart) ?? fullFrom(form, context, now);
}

function fullFrom(form: OrderForm, context: DraftContext, start: string): number | undefined {
  const fluid = context.products[0];
  if (fluid === undefined || form.weightId === '' || form.method === '') return undefined;
  const notEntering = {
    kind: 'maintenance',
    reason: 'maintenance',
    fraction: 'full',
    typedRate: '',
    feedsMl: '0',
    drugsMl: '0',
    hours: '1',
    productId: fluid.id,
    line: 'central',
    urgency: 'routine',
    plannedStart: start,
    reviewBy: later(start),
    bloodsBy: later(start),
  };
  const work = workOutDraft({ ...form, ...notEntering }, context);
  if (!('workOut' in work)) return undefined;
  const { figures } = work.workOut;
  return figures.kind === 'maintenance' ? figures.fullMl : undefined;
}

/** Twenty hours later on the same clock: after the start and within its day, whatever the clocks do. */
function later(local: string): string {
  const at = parseInstant(`${local}:00Z`);
  return at === undefined ? local : localDateTime(instant(at + 20 * 3_600_000), 'UTC');
}

/** What each fraction comes to, "1056 mL"; empty where full maintenance is not known. */
export function fractionConsequences(form: OrderForm, context: DraftContext): Record<Fraction, string> {
  const full = fullMaintenance(form, context);
  const entries = FRACTIONS.map((fraction) => [
    fraction,
    full === undefined
      ? '\u00a0'
      : `${formatNumber(takeFraction(full, fraction), full < 100 ? 1 : 0)}\u00a0mL`,
  ]);
  return Object.fromEntries(entries) as Record<Fraction, string>;
}
