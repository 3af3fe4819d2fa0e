import { contextOfPage } from '@shared/checks/context';
import { orderOf, workOutOn } from '@shared/checks/own';
import { readCheckForm } from '@shared/checks/read-form';
import type { GaugeInput } from '@shared/gauge/input';
import { formatNumber } from '@shared/rounding';
import type { CheckPage } from '@shared/routes/checks';
import { parseInstant } from '@shared/time';
import type { GaugeFigures, OrderInputs } from '@shared/calc/types';
import type { OrderContent } from '@shared/orders/content';

/** One set of figures as it is drawn: the vessel, and the last sums that led to it. */
export type DrawnSet = {
  gauge: Omit<GaugeInput, 'heightPx'>;
  sums: { working: string; result: string }[];
};

type Uncovered = NonNullable<CheckPage['uncovered']>;

const SUMS = 3;
const sumsOf = (steps: readonly { working: string; result: string; unit: string }[]): DrawnSet['sums'] =>
  steps.slice(-SUMS).map(({ working, result, unit }) => ({ working, result: `${result} ${unit}` }));

/** A bolus has no weight bands: its one bracket shows the room to the brim. What is held back carries its amount. */
function drawn({ ghosts, bands, ...gauge }: GaugeFigures): DrawnSet['gauge'] {
  const amount = (ml: number) => formatNumber(ml, 1);
  return {
    ...gauge,
    ghosts: ghosts.map(({ label, ml }) => ({
      label: label.startsWith('as ') ? `${amount(ml)} mL ${label}` : `${label} ${amount(ml)}`,
      ml,
    })),
    bands: bands.length > 0 ? bands : [{ label: 'to the brim', ml: gauge.brimMl, fullMl: gauge.brimMl }],
  };
}

/** The author's set, as it was signed. */
export function authorsSet({ gauge, steps }: OrderContent): DrawnSet {
  return {
    gauge: drawn({
      orderMl: Number(gauge.orderMl),
      brimMl: Number(gauge.brimMl),
      brimNote: gauge.brimNote,
      bands: gauge.bands.map(({ label, ml, fullMl }) => ({ label, ml: Number(ml), fullMl: Number(fullMl) })),
      ghosts: gauge.ghosts.map(({ label, ml }) => ({ label, ml: Number(ml) })),
    }),
    sums: sumsOf(steps),
  };
}

/** The checker's set, worked out from their own entries at the rate they typed; null where that cannot be done. */
export function checkersSet(page: CheckPage, { yours, content }: Uncovered): DrawnSet | null {
  const reading = readCheckForm(yours, { kind: page.order.kind, shortForm: page.isShortForm });
  if (!reading.ok) return null;
  const { kg, order: entries } = reading.entries;
  const context = contextOfPage(page);
  const order = orderOf(entries, context.products);
  if (order === undefined) return null;
  const at = parseInstant(content.plannedStart) ?? context.at;
  const workOut = (inputs: OrderInputs) => workOutOn(kg, inputs, { ...context, at }, content.line);
  const proposed = workOut(order);
  // a rate that follows from the entries needs no line of its own
  const isTyped =
    entries.kind === 'maintenance' &&
    proposed.ok &&
    proposed.figures.kind === 'maintenance' &&
    proposed.figures.workedOutRate !== entries.rate;
  const worked =
    isTyped && order.kind === 'maintenance' ? workOut({ ...order, typedRate: entries.rate }) : proposed;
  return worked.ok ? { gauge: drawn(worked.gauge), sums: sumsOf(worked.steps) } : null;
}
