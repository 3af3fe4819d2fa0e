import { atMost, stepAt, type Steps } from '../rounding';
import type { RuleValues } from '../rulebook/read';

/** |a − c| ≤ max(percent of a, floor), ends included. */
export const within = (a: number, c: number, percent: number, floor: number): boolean =>
  atMost(Math.abs(a - c), Math.max((Math.abs(a) * percent) / 100, floor));

/** Two weights in kg: by percent, of small children by an absolute difference. */
export const isSameWeight = (author: number, checker: number, rules: RuleValues['check']): boolean =>
  author < rules.smallWeightBelow
    ? within(author, checker, 0, rules.smallWeightKg)
    : within(author, checker, rules.weightPercent, 0);

/** Two volumes of other intake in 24 h, mL. */
export const isSameIntake = (author: number, checker: number, rules: RuleValues['check']): boolean =>
  within(author, checker, rules.intakePercent, rules.intakeMl);

/** Two rates in mL/h: by percent or pump steps, whichever is more. */
export const isSameRate = (a: number, c: number, rules: RuleValues['check'], steps: Steps): boolean =>
  within(a, c, rules.figurePercent, rules.figureSteps * stepAt(Math.min(a, c), steps));

/** Two volumes in mL: by percent or volume steps, whichever is more. */
export function isSameVolume(a: number, c: number, rules: RuleValues['check'], steps: Steps): boolean {
  const step = Math.min(a, c) < steps.smallBelow ? steps.smallVolume : steps.volume;
  return within(a, c, rules.figurePercent, rules.figureSteps * step);
}
