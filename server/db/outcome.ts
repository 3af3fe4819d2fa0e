import type { LedgerNote } from '../ledger/entries';
import type { nearMisses } from './schema/near-misses';
import type { FieldError, ProblemCode } from '@shared/problems';
import type { Instant } from '@shared/time';

/** One message to one account; `ref` holds ids only. */
export type Mail = {
  kind: string;
  toAccount: string;
  ref: Record<string, string>;
  /** Not before this; absent means at once. */
  dueAt?: Instant;
};

/** Something that was stopped. `dedupe` names it once per hospital, however often it is typed. */
export type NearMiss = Omit<typeof nearMisses.$inferInsert, 'hospitalId' | 'id' | 'at' | 'by'>;

type Traces = { entries?: readonly LedgerNote[]; nearMisses?: readonly NearMiss[] };

export type Done<T> = Traces & { ok: true; value: T; mails: readonly Mail[] };

export type Refused = Traces & {
  ok: false;
  code: ProblemCode;
  detail?: string;
  errors?: readonly FieldError[];
  /** Whatever the screen needs to say what would be right; plain JSON. */
  data?: unknown;
};

export type Outcome<T> = Done<T> | Refused;

/** The command did it: its writes, mails and entries are committed together. */
export const done = <T>(value: T, traces: Traces & { mails?: readonly Mail[] } = {}): Done<T> => ({
  mails: [],
  ...traces,
  ok: true,
  value,
});

/** The command refuses: its writes are undone, its entries and near misses are kept. */
export const refused = (code: ProblemCode, rest: Omit<Refused, 'ok' | 'code'> = {}): Refused => ({
  ...rest,
  ok: false,
  code,
});

/** What the caller gets: the value as plain JSON would carry it, or the refusal. */
export type Answer<T> =
  | { ok: true; value: T; replayed: boolean }
  | {
      ok: false;
      code: ProblemCode;
      detail?: string;
      errors?: readonly FieldError[];
      data?: unknown;
      replayed: boolean;
    };
