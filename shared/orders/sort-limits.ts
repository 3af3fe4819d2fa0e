import type { LimitFinding } from '../calc/types';
import type { OrderForm } from './form';

/** The limits of a work-out by what they ask of the author. */
export type SortedLimits = {
  /** With any of these the order cannot be signed. */
  brims: LimitFinding[];
  /** A senior has to agree before signing. */
  seniors: LimitFinding[];
  /** Senior matters of an emergency: agreed afterwards, due in 1 h, they delay nothing. */
  deferred: LimitFinding[];
  cautions: LimitFinding[];
  /** Limits that were looked at and hold, and plain information. */
  information: LimitFinding[];
  /** Broken limits whose reason the form has not given. */
  reasonsOwed: LimitFinding[];
};

const MIN_REASON = 3;

/** The author's reason for one limit, trimmed; empty when none was given. */
export const reasonFor = (form: Pick<OrderForm, 'limitReasons'>, code: string): string =>
  form.limitReasons[code]?.trim() ?? '';

/** A limit that names a field is settled there; every other one beside the limit itself. */
const owesReason = (limit: LimitFinding, form: Pick<OrderForm, 'limitReasons'>): boolean =>
  limit.reasonOwed === true && (limit.owes !== undefined || reasonFor(form, limit.code).length < MIN_REASON);

/** Sorts the limits of a work-out; only an emergency kind ordered as an emergency defers its senior matters. */
export function sortLimits(
  limits: readonly LimitFinding[],
  form: Pick<OrderForm, 'limitReasons'>,
  isEmergency: boolean,
): SortedLimits {
  const broken = limits.filter((limit) => !limit.met);
  const of = (strength: LimitFinding['strength']) => broken.filter((limit) => limit.strength === strength);
  const isDeferred = (limit: LimitFinding) => isEmergency && limit.deferred === true;
  return {
    brims: of('brim'),
    seniors: of('senior').filter((limit) => !isDeferred(limit)),
    deferred: of('senior').filter(isDeferred),
    cautions: of('caution'),
    information: limits.filter((limit) => limit.met || limit.strength === 'information'),
    reasonsOwed: broken.filter((limit) => !isDeferred(limit) && owesReason(limit, form)),
  };
}
