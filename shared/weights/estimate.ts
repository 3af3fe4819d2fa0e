import type { Age } from '../children/age';
import { kilograms, type Kilograms } from '../units';
import { DEFAULT_WEIGHT_LIMITS, type WeightLimits } from './limits';

export type WeightEstimate = { kg: Kilograms; working: string };

/**
 * Weight from age, kg: under 1 year 0.5 × months + 4, to 5 years 2 × years + 8, to 12 years 3 × years + 7
 * (age formulas taught for resuscitation); none from 13 years or before birth.
 */
export function estimateWeight(
  age: Pick<Age, 'years' | 'months' | 'isUnborn'>,
  limits: WeightLimits = DEFAULT_WEIGHT_LIMITS,
): WeightEstimate | undefined {
  const { years, months, isUnborn } = age;
  if (isUnborn || years >= limits.estimateUntilYears) return undefined;
  if (years < 1) return estimate(0.5 * months + 4, `0.5 × ${months} months + 4`);
  if (years < 6) return estimate(2 * years + 8, `2 × ${years} years + 8`);
  return estimate(3 * years + 7, `3 × ${years} years + 7`);
}

const estimate = (kg: number, working: string): WeightEstimate => ({ kg: kilograms(kg), working });
