import { MEASURED_METHODS, type ChildFacts, type WeightMethod } from '../calc/types';
import type { Kilograms } from '../units';
import type { Instant } from '../time';

/** A weight as the chart holds it; `usable` is false while a second measurement is owed. */
export type ChartWeight = { kg: Kilograms; method: WeightMethod; at: Instant; usable: boolean };

/** What weighing needs to know of a child. */
export type WeighedChild = Pick<ChildFacts, 'bornOn' | 'bornAt' | 'sex' | 'gestationWeeks' | 'gestationDays'>;

export const isMeasured = (method: WeightMethod): boolean => MEASURED_METHODS.includes(method);

/** The words of a method, after a date: "9 Jun 07:40, standing scales". */
export const METHOD_WORDS: Readonly<Record<WeightMethod, string>> = {
  scales: 'standing scales',
  'baby-scales': 'baby scales',
  'bed-scales': 'bed scales',
  stated: 'stated, not measured',
  'estimated-age': 'estimated from age',
  'estimated-tape': 'estimated by tape',
  'birth-weight': 'birth weight',
};

/** '16.4 kg': every digit that was recorded, no trailing zero. */
export const kgText = (kg: number): string => `${kg} kg`;

/** The latest of the weights at or before a moment, in chart order for equal times. */
export function latestBefore<W extends ChartWeight>(weights: readonly W[], at: Instant): W | undefined {
  return weights
    .filter((weight) => weight.at <= at)
    .reduce<W | undefined>(
      (last, weight) => (last === undefined || weight.at >= last.at ? weight : last),
      undefined,
    );
}
