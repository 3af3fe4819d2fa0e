import { formatNumber } from '../rounding';
import { numberWords } from './number-words';
import type {
  BolusFigures,
  FluidComposition,
  LineClass,
  MaintenanceFigures,
  WorkOutRequest,
  BolusRoute,
} from './types';

const LINES: Record<LineClass, string> = {
  peripheral: 'a peripheral line',
  central: 'a central line',
  intraosseous: 'an intraosseous needle',
};

const ROUTES: Record<BolusRoute, string> = {
  pump: 'by pump',
  syringe: 'by hand with a syringe',
  'pressure-bag': 'by pressure bag',
  gravity: 'by gravity',
};

const many = (value: number, one: string): string =>
  `${formatNumber(value, 3)} ${one}${value === 1 ? '' : 's'}`;

const rateText = (rate: number): string =>
  `${formatNumber(rate, 3)} millilitres per hour (${numberWords(rate)})`;

/** The fluid's name within a sentence, its units in full. */
export const fluidInWords = ({ name }: FluidComposition): string =>
  name.charAt(0).toLowerCase() + name.slice(1).replaceAll('mmol/L', 'millimoles per litre');

/** A maintenance order in one plain sentence, units in full, the rate in figures and words. */
export const readBackMaintenance = (
  { order, weight, line }: WorkOutRequest,
  figures: MaintenanceFigures,
): string =>
  `Maintenance for a weight of ${formatNumber(weight.kg, 3)} kilograms: ${fluidInWords(order.fluid)} by ${LINES[line]} ` +
  `at ${rateText(figures.rate)}, ${many(figures.volume, 'millilitre')} over ${many(figures.hours, 'hour')}.`;

/** A bolus in one plain sentence, units in full, volume and any pump rate in figures and words. */
export function readBackBolus({ order, weight, line }: WorkOutRequest, figures: BolusFigures): string {
  const route = order.kind === 'bolus' ? ROUTES[order.route] : '';
  const pump = figures.rate === undefined ? '' : `, at ${rateText(figures.rate)}`;
  return (
    `Bolus for a weight of ${formatNumber(weight.kg, 3)} kilograms: ${many(figures.volume, 'millilitre')} ` +
    `(${numberWords(figures.volume)}) of ${fluidInWords(order.fluid)} by ${LINES[line]} ` +
    `over ${many(figures.over, 'minute')}, ${route}${pump}. Then look again.`
  );
}
