import { formatNumber } from '../rounding';
import type { Step, StepMark } from './types';

export const YOUR_CHOICE = 'your choice';
export const YOUR_ENTRY = 'your entry';
export const PUMP_STEP = 'pump step';

/** Decimals in which workings are printed: enough for a weight of three to add up on paper. */
export const WORKING_DECIMALS = 3;

/** A number as the workings print it. */
export const printed = (value: number): string => formatNumber(value, WORKING_DECIMALS);

/** One line of the workings; the result is printed to at most two decimals. */
export function step(
  label: string,
  working: string,
  [value, unit]: [value: number, unit: string],
  source: string,
  mark?: StepMark,
): Step {
  const line: Step = { label, working, value, result: formatNumber(value, 2), unit, source };
  if (mark) line.mark = mark;
  return line;
}
