import { snap } from '../rounding';
import { DEFAULT_RULEBOOK } from '../rulebook/default';
import { ruleValues, type RuleValues } from '../rulebook/read';
import { kgText } from './chart-weight';
import type { WeightVerdict } from './assess';

/** How far two readings of one weight may lie apart: the tolerance of the independent check. */
export type ReadingLimits = Pick<RuleValues['check'], 'weightPercent' | 'smallWeightBelow' | 'smallWeightKg'>;

/** Whether two readings are the same weight: within 1 %, under 5 kg within 0.02 kg. Rulebook, ours. */
export function readingsAgree(
  first: number,
  second: number,
  limits: ReadingLimits = ruleValues(DEFAULT_RULEBOOK, 'check'),
): boolean {
  const least = Math.min(first, second);
  const allowed =
    least < limits.smallWeightBelow ? limits.smallWeightKg : (limits.weightPercent / 100) * least;
  return snap(Math.abs(first - second)) <= snap(allowed);
}

export type SecondReading = {
  /** What the first reading's assessment asked for. */
  verdict: WeightVerdict;
  first: number;
  second: number;
  byAnotherPerson: boolean;
};

export type Settled =
  | { usable: true; text: string }
  | { usable: false; code: 'another-person-needed' | 'readings-differ'; text: string };

/**
 * Whether a second reading makes the first usable. Readings that differ leave the first aside: the second is then
 * a weight of its own, to be assessed like any other.
 */
export function settleSecondReading(reading: SecondReading, limits?: ReadingLimits): Settled {
  const { verdict, first, second, byAnotherPerson } = reading;
  if (!readingsAgree(first, second, limits)) {
    return {
      usable: false,
      code: 'readings-differ',
      text: `${kgText(first)} and ${kgText(second)} differ: the first is set aside.`,
    };
  }
  if (verdict === 'second-person' && !byAnotherPerson) {
    return {
      usable: false,
      code: 'another-person-needed',
      text: 'Another person must take the second measurement.',
    };
  }
  return { usable: true, text: `${kgText(first)} confirmed by a second measurement.` };
}
