import type { LimitFinding } from '../calc/types';
import type { OrderForm } from './form';

/** Limits that the order breaks, by strength, and the ones that owe a reason the form has not given. */
export type SortedLimits = {
  brims: LimitFinding[];
  seniors: LimitFinding[];
  cautions: LimitFinding[];
  information: LimitFinding[];
  reasonsOwed: LimitFinding[];
};

/** The author's reason for one limit, trimmed; empty when none was given. */
export const reasonFor = (form: Pick<OrderForm, 'limitReasons'>, code: string): string =>
  form.limitReasons[code]?.trim() ?? '';

const MIN_REASON = 3;

export function sortLimits(
  limits: readonly LimitFinding[],
  form: Pick<OrderForm, 'limitReasons'>,
): SortedLimits {
  const broken = limits.filter((limit) => !limit.met);
  const of = (strength: LimitFinding['strength']) => broken.filter((limit) => limit.strength === strength);
  return {
    brims: of('brim'),
    seniors: of('senior'),
    cautions: of('caution'),
    information: limits.filter((limit) => limit.met || limit.strength === 'information'),
    reasonsOwed: broken.filter(
      (limit) => limit.reasonOwed === true && reasonFor(form, limit.code).length < MIN_REASON,
    ),
  };
}
