import type { LimitFinding, Strength } from './types';

type More = Partial<Omit<LimitFinding, 'code' | 'strength' | 'title' | 'text' | 'source' | 'met'>>;

/** A limit the order breaks. */
export const broken = (
  code: string,
  strength: Strength,
  [title, text]: [title: string, text: string],
  source: string,
  more?: More,
): LimitFinding => ({ code, strength, title, text, met: false, source, ...more });

/** A limit that was looked at and holds, or information that asks nothing. */
export const kept = (
  code: string,
  strength: Strength,
  [title, text]: [title: string, text: string],
  source: string,
  more?: More,
): LimitFinding => ({ code, strength, title, text, met: true, source, ...more });

/** The brims an order passes: with any of them it cannot be signed. */
export const brokenBrims = (limits: readonly LimitFinding[]): LimitFinding[] =>
  limits.filter((limit) => !limit.met && limit.strength === 'brim');

/** Senior matters that must be agreed before signing; those of emergency kinds come afterwards. */
export const seniorMatters = (limits: readonly LimitFinding[]): LimitFinding[] =>
  limits.filter((limit) => !limit.met && limit.strength === 'senior' && !limit.deferred);

/** Senior matters of an emergency kind: countersignatures due afterwards. */
export const deferredMatters = (limits: readonly LimitFinding[]): LimitFinding[] =>
  limits.filter((limit) => !limit.met && limit.strength === 'senior' && limit.deferred === true);

/** Limits for which the author owes a reason before signing. */
export const reasonsOwed = (limits: readonly LimitFinding[]): LimitFinding[] =>
  limits.filter((limit) => !limit.met && limit.reasonOwed === true);

/** Marks the senior matters of an emergency kind as agreed afterwards. */
export function deferSeniors(limits: LimitFinding[]): LimitFinding[] {
  for (const limit of limits) if (limit.strength === 'senior' && !limit.met) limit.deferred = true;
  return limits;
}
