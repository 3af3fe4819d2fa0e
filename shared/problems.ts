import { z } from 'zod';
import type { RefusalCode } from './orders/decide';

type Row = { status: number; title: string };

/** Refusals of the transition table: 403 for who, 409 for when. */
const TABLE: Readonly<Record<RefusalCode, Row>> = {
  'role-missing': { status: 403, title: 'Not for your role' },
  'order-state': { status: 409, title: 'The order has moved on' },
  'second-person-required': { status: 403, title: 'A second person is needed' },
  'entitlement-missing': { status: 403, title: 'Not entitled' },
  'on-ward': { status: 403, title: 'Not on your ward' },
  registered: { status: 403, title: 'No registration number' },
  checking: { status: 403, title: 'Not entitled to check' },
  'senior-checking': { status: 403, title: 'A senior checker is needed' },
  'senior-or-pharmacist': { status: 403, title: 'A senior or pharmacist is needed' },
  'author-or-lead': { status: 403, title: 'Only the author or a lead' },
  'author-or-taking-over': { status: 403, title: 'Only the author' },
  'not-locked-in': { status: 409, title: 'Locked in already' },
  'locked-in-agreed': { status: 409, title: 'Figures that agree are needed first' },
  'nobody-else-holds-check': { status: 409, title: 'Someone else holds this check' },
  'not-slipped-before': { status: 409, title: 'Passed on for a slip before' },
  'own-check': { status: 403, title: 'Not yours' },
  'not-lapsed': { status: 409, title: 'Lapsed' },
  'time-passed': { status: 409, title: 'Not yet' },
  'unseen-or-waited': { status: 409, title: 'You have seen the other figures' },
};

/** Every problem the API answers with. A new code enters here first. */
export const PROBLEMS = {
  ...TABLE,
  unexpected: { status: 500, title: 'Something went wrong on our side' },
  'bad-input': { status: 422, title: 'Some entries need another look' },
  'not-found': { status: 404, title: 'Not found' },
  'signed-out': { status: 401, title: 'Sign in first' },
  'session-locked': { status: 423, title: 'The screen is locked' },
  'sign-in-refused': { status: 401, title: 'E-mail address or password is wrong' },
  'account-locked': { status: 429, title: 'Too many tries' },
  'password-wrong': { status: 403, title: 'The password is wrong' },
  'too-many-requests': { status: 429, title: 'Too many requests' },
  'wrong-origin': { status: 403, title: 'Not from this page' },
  'database-unavailable': { status: 503, title: 'Nothing was recorded, try again' },
  'key-reused': { status: 422, title: 'This request was used for something else' },
  conflict: { status: 409, title: 'Someone else was first' },
  'last-resort-limit': { status: 409, title: 'Stopped by the database’s own limit' },
  'constraint-broken': { status: 409, title: 'The database refused this' },
  stale: { status: 409, title: 'Changed since this was shown' },
  'draft-moved': { status: 409, title: 'This draft was changed elsewhere' },
  'figures-moved': { status: 409, title: 'The figures have moved since they were shown' },
  'over-the-brim': { status: 409, title: 'Over the brim' },
  'exception-needed': { status: 409, title: 'A senior has to agree first' },
  'reason-owed': { status: 422, title: 'A reason is owed' },
  'cannot-work-out': { status: 422, title: 'This cannot be worked out' },
  'derivations-differ': { status: 500, title: 'Our two derivations differ: nothing was signed' },
  'wrong-child': { status: 409, title: 'That is not this child' },
  'weight-refused': { status: 422, title: 'The weight was not taken' },
  'second-reading-owed': { status: 409, title: 'A second measurement is owed' },
  'out-of-scope': { status: 409, title: 'Outside what this program covers' },
  'bedside-differs': { status: 409, title: 'The bedside does not match the order' },
  'witness-needed': { status: 409, title: 'A witness is needed' },
  'something-runs': { status: 409, title: 'An infusion is still connected' },
  'checker-unfit': { status: 422, title: 'That person cannot check this' },
} as const satisfies Record<string, Row>;
export type ProblemCode = keyof typeof PROBLEMS;

export const fieldErrorSchema = z.object({ pointer: z.string(), detail: z.string() });

/** RFC 9457 problem document; `data` carries what a screen needs to settle it (both drafts, the new figures). */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  instance: z.string().optional(),
  errors: z.array(fieldErrorSchema).optional(),
  data: z.unknown().optional(),
});
export type Problem = z.infer<typeof problemSchema>;
export type FieldError = z.infer<typeof fieldErrorSchema>;
