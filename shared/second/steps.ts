import { compare, lesser, minus, nearestMultiple } from './exact';
import type { Exact } from './exact';
import type { Rule } from './rules';

type Ladder = { fine: Exact; coarse: Exact; from: Exact };

/** At the nearest step; a step lower where only the rounding carries it past the lowest line it keeps. */
function climb(value: Exact, lines: readonly Exact[], { fine, coarse, from }: Ladder): Exact {
  const rounded = nearestMultiple(value, compare(value, from) < 0 ? fine : coarse);
  const keeps = lines.filter((line) => compare(value, line) <= 0);
  if (keeps.length === 0) return rounded;
  if (compare(rounded, keeps.reduce(lesser)) <= 0) return rounded;
  return minus(rounded, compare(rounded, from) > 0 ? coarse : fine);
}

/** A rate as a pump takes it, mL/h. */
export const onThePump = (rate: Exact, lines: readonly Exact[], rule: Rule): Exact =>
  climb(rate, lines, {
    fine: rule('pump', 'stepLow'),
    coarse: rule('pump', 'stepHigh'),
    from: rule('pump', 'stepFrom'),
  });

/** A volume as it is ordered, mL. */
export const inTheBag = (volume: Exact, lines: readonly Exact[], rule: Rule): Exact =>
  climb(volume, lines, {
    fine: rule('pump', 'smallVolumeStep'),
    coarse: rule('pump', 'volumeStep'),
    from: rule('pump', 'smallVolumeBelow'),
  });
