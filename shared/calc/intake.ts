import { snap } from '../rounding';
import { printed, step, YOUR_CHOICE, YOUR_ENTRY } from './step';
import type { Fraction, MaintenanceOrder, Step } from './types';

/** Multiplier and divisor of a fraction: two thirds is × 2 ÷ 3, never × 0.667. */
const FRACTION_PARTS: Record<Fraction, { times: number; by: number; print: string }> = {
  full: { times: 1, by: 1, print: '100%' },
  'four-fifths': { times: 4, by: 5, print: '80%' },
  'two-thirds': { times: 2, by: 3, print: '2 ÷ 3' },
  half: { times: 1, by: 2, print: '50%' },
};

/** A fraction of a volume, mL. */
export const takeFraction = (ml: number, fraction: Fraction): number =>
  (ml * FRACTION_PARTS[fraction].times) / FRACTION_PARTS[fraction].by;

/** A fraction as a share of 1, for comparisons only. */
export const shareOf = (fraction: Fraction): number => takeFraction(1, fraction);

/** "two thirds", "80%": a fraction in running text. */
export const fractionWords = (fraction: Fraction): string =>
  fraction === 'two-thirds' ? 'two thirds' : FRACTION_PARTS[fraction].print;

/** What is left of a full day after the fraction and the other intake, never below 0, with its workings, mL. */
export function leftForTheLine(fullMl: number, order: MaintenanceOrder): { ml: number; steps: Step[] } {
  const part = takeFraction(fullMl, order.fraction);
  const fraction = step(
    'fraction',
    `${printed(fullMl)} × ${FRACTION_PARTS[order.fraction].print}`,
    [part, 'mL'],
    YOUR_CHOICE,
  );
  const steps: Step[] = [fraction];
  let ml = part;
  if (order.feeds > 0) ml = subtract(steps, 'feeds and drinks', ml, order.feeds);
  if (order.drugs > 0) ml = subtract(steps, 'drug volumes', ml, order.drugs);
  return { ml, steps };
}

function subtract(steps: Step[], label: string, from: number, volume: number): number {
  const left = snap(from - volume);
  const floor = left < 0 ? ', not below 0' : '';
  const ml = Math.max(0, left);
  steps.push(step(label, `${printed(from)} − ${printed(volume)}${floor}`, [ml, 'mL'], YOUR_ENTRY));
  return ml;
}
