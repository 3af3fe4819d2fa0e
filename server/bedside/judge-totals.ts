import { formatNumber, snap } from '@shared/rounding';
import { ruleValues } from '@shared/rulebook/read';
import { HOUR, parseInstant, type Instant } from '@shared/time';
import { refused, type Refused } from '../db/outcome';
import type { Tx } from '../db/transaction';
import { nearMiss } from '../near-misses/near-miss';
import { countFluids } from '../orders/count-fluids';
import type { LoadedVersion } from '../orders/facts';
import { noteOf } from '../orders/lock-version';
import type { Bedside } from './load-bedside';

/**
 * Whether boluses given since the signing (elsewhere, in an emergency, by another order) carry this one over the
 * 24 h line, in mL/kg, that nobody senior agreed to. An emergency bolus is never held up by it.
 */
export async function judgeTotals(
  tx: Tx,
  version: LoadedVersion,
  { content, context }: Bedside,
  now: Instant,
): Promise<Refused | undefined> {
  if (content.kind !== 'bolus' || content.urgency === 'emergency') return undefined;
  // the line was crossed and agreed to before signing
  if (content.limits.some(({ code, met }) => code === 'bolus-total' && !met)) return undefined;
  const { totalSenior, totalHours } = ruleValues(context.rulebook, 'bolus');
  const { boluses } = await countFluids(tx, version.row.childId, [version.row.orderId], now);
  const since = now - totalHours * HOUR;
  const before = boluses
    .filter(({ at }) => (parseInstant(at) ?? 0) > since)
    .reduce((sum, { ml }) => sum + Number(ml), 0);
  const perKg = snap((before + Number(content.figures.volumeMl)) / Number(content.weight.kg));
  if (perKg < totalSenior) return undefined;
  const words = `With what was given since this was signed the child would have had ${formatNumber(perKg, 1)} mL/kg of boluses in 24 h. From ${formatNumber(totalSenior, 1)} mL/kg a senior agrees: a new order is needed, or an emergency one.`;
  return refused('exception-needed', {
    detail: words,
    entries: [noteOf('infusion-started', version, { reason: 'bolus-total' })],
    nearMisses: [
      nearMiss({
        class: 'senior',
        limitCode: 'bolus-total',
        childId: version.row.childId,
        versionId: version.row.id,
        kind: version.row.kind,
        detail: words,
      }),
    ],
  });
}
