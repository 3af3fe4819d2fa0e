import type {
  BolusFigures,
  FluidComposition,
  MaintenanceFigures,
  OrderInputs,
  WorkOut,
  WorkOutRequest,
} from '../calc/types';
import { workOut } from '../calc/work-out';
import { formatNumber, type Steps } from '../rounding';
import { ruleValues } from '../rulebook/read';
import type { Rulebook } from '../rulebook/document';
import type { Kilograms } from '../units';
import { findProduct } from './fluid';
import type { CheckForm } from './form';
import { readForWorkOut, type BolusEntries, type CheckEntries, type MaintenanceEntries } from './read-form';
import type { Kind } from '../calc/types';
import { isSameRate, isSameVolume } from './tolerance';

/** The chart, the shelf and the rulebook that a check is worked out with. */
export type CheckContext = Omit<WorkOutRequest, 'weight' | 'order' | 'line'> & {
  rulebook: Rulebook;
  products: readonly FluidComposition[];
};

/** The pump's and the volumes' steps of a rulebook. */
export function stepsOf(rulebook: Rulebook): Steps {
  const pump = ruleValues(rulebook, 'pump');
  return {
    low: pump.stepLow,
    high: pump.stepHigh,
    from: pump.stepFrom,
    volume: pump.volumeStep,
    smallVolume: pump.smallVolumeStep,
    smallBelow: pump.smallVolumeBelow,
  };
}

/** Works an order out on a weight, in the context of a check. */
export function workOutOn(
  kg: Kilograms,
  order: OrderInputs,
  context: CheckContext,
  line: WorkOutRequest['line'] = 'peripheral',
): WorkOut {
  const { rulebook, products: _products, ...chart } = context;
  const weight = { kg, method: 'scales', at: context.at } as const;
  return workOut({ ...chart, line, weight, order }, rulebook);
}

/** The checker's entries as an order; undefined when the shelf has no such product. */
export function orderOf(
  entries: MaintenanceEntries | BolusEntries,
  products: readonly FluidComposition[],
): OrderInputs | undefined {
  const fluid = findProduct(products, entries.base, entries.kind === 'bolus' ? 0 : entries.addedPotassium);
  if (fluid === undefined) return undefined;
  if (entries.kind === 'bolus') {
    const { volume, over } = entries;
    // the route is not shown to a checker; by syringe no pump limit comes in
    return { kind: 'bolus', dose: { by: 'volume', volume }, over, route: 'syringe', fluid };
  }
  const { feeds, drugs, method, temperatureC, newbornMlPerKgPerDay, fraction, hours } = entries;
  return {
    kind: 'maintenance',
    method,
    fraction,
    feeds,
    drugs,
    hours,
    fluid,
    ...(temperatureC === undefined ? {} : { temperatureC }),
    ...(newbornMlPerKgPerDay === undefined ? {} : { newbornMlPerKgPerDay }),
  };
}

export type OwnFigures =
  { ok: true; figures: MaintenanceFigures | BolusFigures } | { ok: false; field?: string; words: string };

/** The figures that follow from a checker's own entries, whatever rate and volume they typed. */
export function workOutOwn(
  form: CheckForm,
  context: CheckContext,
  asked: { kind: Kind; shortForm: boolean },
): OwnFigures {
  const reading = readForWorkOut(form, asked);
  if (!reading.ok) {
    const [first] = reading.errors;
    return { ok: false, words: first?.message ?? 'Some entries are missing.', field: first?.field };
  }
  const order = orderOf(reading.entries.order, context.products);
  if (order === undefined) return { ok: false, field: 'addedPotassium', words: NOT_STOCKED };
  const worked = workOutOn(reading.entries.kg, order, context);
  return worked.ok
    ? { ok: true, figures: worked.figures }
    : { ok: false, field: worked.field, words: worked.detail };
}

export const NOT_STOCKED = 'The shelf has no such bag: choose the fluid and the potassium again.';

/** Whether the typed figures follow from the typed entries, in words for the line below them. */
export function hangTogether(
  entries: CheckEntries,
  context: CheckContext,
): { agrees: boolean; words: string } {
  const { order } = entries;
  const inputs = orderOf(order, context.products);
  if (inputs === undefined) return { agrees: false, words: NOT_STOCKED };
  const worked = workOutOn(entries.kg, inputs, context);
  if (!worked.ok) return { agrees: false, words: worked.detail };
  if (order.kind === 'bolus') {
    const perKg = formatNumber(order.volume / entries.kg, 1);
    return { agrees: true, words: `${formatNumber(order.volume, 1)} mL is ${perKg} mL/kg.` };
  }
  return maintenanceHangs(order, worked.figures as MaintenanceFigures, context.rulebook);
}

function maintenanceHangs(
  { rate, volume, hours }: MaintenanceEntries,
  own: MaintenanceFigures,
  rulebook: Rulebook,
): { agrees: boolean; words: string } {
  const rules = ruleValues(rulebook, 'check');
  const steps = stepsOf(rulebook);
  const sum = `${formatNumber(rate, 1)} mL/h × ${formatNumber(hours, 1)} h = ${formatNumber(rate * hours, 1)} mL`;
  if (!isSameVolume(rate * hours, volume, rules, steps)) {
    return { agrees: false, words: `${sum}, and your volume is ${formatNumber(volume, 1)} mL.` };
  }
  if (!isSameRate(own.workedOutRate, rate, rules, steps)) {
    return {
      agrees: false,
      words: `Your entries give ${formatNumber(own.workedOutRate, 1)} mL/h, and your rate is ${formatNumber(rate, 1)} mL/h.`,
    };
  }
  return { agrees: true, words: `Your own figures hang together. ${sum}.` };
}
