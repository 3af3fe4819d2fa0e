import type { Hours, Millilitres, MillilitresPerHour } from './units';

/** The pump's and the volumes' steps, as the rulebook in force has them. */
export type Steps = {
  /** mL/h below `from`. */
  low: number;
  /** mL/h from `from` on. */
  high: number;
  from: number;
  /** mL from `smallBelow` on. */
  volume: number;
  /** mL below `smallBelow`. */
  smallVolume: number;
  smallBelow: number;
};

/** Drops the noise of binary arithmetic: 12 significant digits, more than any order can carry. */
export function snap(value: number): number {
  if (Number.isInteger(value)) return value;
  const short = Math.round(value * 1e6) / 1e6;
  // a value this near to one of six decimals has it as its nearest of 12 digits; most have, and are spared the text
  const isShort = Math.abs(value) < 1e5 && Math.abs(short - value) <= 1e-13 * Math.abs(value);
  return isShort ? short : Number(value.toPrecision(12));
}

/** The nearest whole number, halves away from zero. */
function nearestWhole(value: number): number {
  const size = Math.abs(value);
  const part = size - Math.floor(size);
  // snapping moves a value by less than this, so it matters only beside a half
  const isClear = Math.abs(part - 0.5) > 1e-6 + size * 1e-11;
  const rounded = Math.floor((isClear ? size : snap(size)) + 0.5);
  return value < 0 ? -rounded : rounded;
}

/** The nearest multiple of `step`, halves away from zero. */
export function toStep(value: number, step: number): number {
  if (step === 1) return nearestWhole(value);
  const perUnit = Math.round(1 / step);
  const isDivision = step < 1 && Math.abs(perUnit * step - 1) < 1e-12;
  return isDivision ? nearestWhole(value * perUnit) / perUnit : snap(nearestWhole(value / step) * step);
}

/** The nearest value with that many decimals, halves away from zero. */
export function toDecimals(value: number, decimals: number): number {
  const scale = 10 ** decimals;
  return nearestWhole(value * scale) / scale;
}

/** a ≤ b, blind to the last digits of binary arithmetic; equal counts as at most. */
export function atMost(a: number, b: number): boolean {
  if (a <= b) return true;
  return a - b < 1e-9 * Math.abs(a) && snap(a) <= snap(b);
}

/** a ≥ b, blind to the last digits of binary arithmetic. */
export const atLeast = (a: number, b: number): boolean => atMost(b, a);

/** a > b by more than the noise of binary arithmetic. */
export const above = (a: number, b: number): boolean => !atMost(a, b);

/** a < b by more than the noise of binary arithmetic. */
export const below = (a: number, b: number): boolean => !atMost(b, a);

/** The pump step that holds at this rate, mL/h. */
export const stepAt = (rate: number, steps: Steps): number =>
  below(rate, steps.from) ? steps.low : steps.high;

/** A rate at the nearest pump step, mL/h. */
export const pumpStep = (rate: MillilitresPerHour, steps: Steps): MillilitresPerHour =>
  toStep(rate, stepAt(rate, steps)) as MillilitresPerHour;

/** The next lower rate a pump can be set to, 0 at the least. */
const oneStepDown = (rate: number, steps: Steps): number =>
  Math.max(0, snap(rate - (above(rate, steps.from) ? steps.high : steps.low)));

/** A rate at the pump step; one step lower where the rounding alone would carry it past the line, mL/h. */
export function roundRateUnder(rate: MillilitresPerHour, line: number, steps: Steps): MillilitresPerHour {
  const rounded = pumpStep(rate, steps);
  if (atMost(rounded, line) || above(rate, line)) return rounded;
  return oneStepDown(rounded, steps) as MillilitresPerHour;
}

/** A rate at the pump step; one step lower where the rounding alone would carry rate × time past the brim. */
export const roundRateUnderBrim = (
  rate: MillilitresPerHour,
  time: Hours,
  brim: Millilitres,
  steps: Steps,
): MillilitresPerHour => roundRateUnder(rate, brim / time, steps);

/** The highest rate a pump can be set to that is at most the line, mL/h; 0 where there is none. */
export function highestRate(line: number, steps: Steps): MillilitresPerHour {
  if (line <= 0) return 0 as MillilitresPerHour;
  const rounded = pumpStep(line as MillilitresPerHour, steps);
  return (atMost(rounded, line) ? rounded : oneStepDown(rounded, steps)) as MillilitresPerHour;
}

/** A volume at the nearest volume step, mL. */
export const volumeStep = (volume: Millilitres, steps: Steps): Millilitres =>
  toStep(volume, below(volume, steps.smallBelow) ? steps.smallVolume : steps.volume) as Millilitres;

/** A volume at its step; one step lower where the rounding alone would carry it past the line, mL. */
export function roundVolumeUnder(volume: Millilitres, line: number, steps: Steps): Millilitres {
  const rounded = volumeStep(volume, steps);
  if (atMost(rounded, line) || above(volume, line)) return rounded;
  return Math.max(0, snap(rounded - volumeStepAt(rounded, steps))) as Millilitres;
}

/** The largest volume at its step that is at most the line, mL. */
export function largestVolume(line: number, steps: Steps): Millilitres {
  const rounded = volumeStep(line as Millilitres, steps);
  return atMost(rounded, line)
    ? rounded
    : (Math.max(0, snap(rounded - volumeStepAt(rounded, steps))) as Millilitres);
}

const volumeStepAt = (rounded: number, steps: Steps): number =>
  above(rounded, steps.smallBelow) ? steps.volume : steps.smallVolume;

/** A number as print has it: rounded, no trailing zeros, no thousands mark; "44", "52.1". */
export function formatNumber(value: number, decimals: number): string {
  const scale = 10 ** decimals;
  const parts = nearestWhole(Math.abs(value) * scale);
  const whole = Math.floor(parts / scale);
  const sign = value < 0 && parts > 0 ? '-' : '';
  let rest = parts - whole * scale;
  if (rest === 0) return `${sign}${whole}`;
  let places = decimals;
  for (; rest % 10 === 0; places -= 1) rest /= 10;
  return `${sign}${whole}.${String(rest).padStart(places, '0')}`;
}

/** A rate in print, mL/h without the unit. */
export const formatRate = (rate: MillilitresPerHour): string => formatNumber(rate, 1);

/** A volume in print, mL without the unit. */
export const formatVolume = (volume: Millilitres): string => formatNumber(volume, 1);
