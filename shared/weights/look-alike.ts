import type { Sex } from '../calc/types';
import { zScores } from '../growth/weight-for-age';
import { toDecimals } from '../rounding';
import type { WeightLimits } from './limits';

/** Pounds in a kilogram. */
const POUNDS = 2.2046;

export type LookAlike = { code: 'looks-like-pounds' | 'slipped-point'; kg: number; text: string };

/** Kilograms for a sentence: one decimal from 10 kg, two below, three under 1 kg. */
const spoken = (kg: number): number => toDecimals(kg, kg >= 10 ? 1 : kg >= 1 ? 2 : 3);

/**
 * The weight that may have been meant: the entry read as pounds, or with its point one place off, where that
 * lies well inside the reference. With sex not recorded one sex is enough; the nearest to the median wins.
 */
export function lookAlike(
  kg: number,
  sex: Sex | undefined,
  ageDays: number,
  limits: WeightLimits,
): LookAlike | undefined {
  const distance = (meant: number) => Math.min(...zScores(meant, sex, ageDays).map(Math.abs));
  const readings: LookAlike[] = [asPounds(kg), asSlip(kg, kg / 10), asSlip(kg, kg * 10)];
  return readings
    .map((reading) => ({ reading, z: distance(reading.kg) }))
    .filter(({ z }) => z <= limits.lookalikeInside)
    .sort((a, b) => a.z - b.z)[0]?.reading;
}

function asPounds(kg: number): LookAlike {
  const meant = kg / POUNDS;
  return {
    code: 'looks-like-pounds',
    kg: spoken(meant),
    text: `${kg} looks like pounds: ${kg} lb is ${spoken(meant)} kg.`,
  };
}

function asSlip(kg: number, meant: number): LookAlike {
  return {
    code: 'slipped-point',
    kg: toDecimals(meant, 3),
    text: `${kg} looks like a slipped point: was it ${toDecimals(meant, 3)} kg?`,
  };
}
