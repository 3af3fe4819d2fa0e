import { DrizzleQueryError } from 'drizzle-orm';
import postgres from 'postgres';

/** The database could not be reached or gave up: nothing was recorded, the same request may be sent again. */
export class DatabaseUnavailable extends Error {
  override readonly name = 'DatabaseUnavailable';
  constructor(cause: unknown) {
    super('the database is not reachable: nothing was recorded', { cause });
  }
}

/** The connection is gone. */
const LOST = new Set([
  'CONNECTION_CLOSED',
  'CONNECTION_ENDED',
  'CONNECTION_DESTROYED',
  'CONNECT_TIMEOUT',
  'ECONNREFUSED',
  'ECONNRESET',
  'EPIPE',
  'ERR_STREAM_DESTROYED',
  'ETIMEDOUT',
  '57P01', // the database is being shut down
  '57P02',
  '57P03', // it is starting
  '25P03', // idle for too long inside a transaction
]);

/** The connection stands, the transaction does not. */
const GAVE_UP = new Set([
  '53300', // too many connections
  '57014', // a statement took too long
  '40001',
  '40P01', // deadlock
  '55P03', // lock not available
]);

const codeOf = (error: unknown): string => {
  for (let at = error, depth = 0; at instanceof Error && depth < 3; at = at.cause, depth++) {
    const code = (at as Error & { code?: unknown }).code;
    if (typeof code === 'string') return code;
  }
  return '';
};

/** Whether the connection itself is gone. */
export const isLost = (error: unknown): boolean => {
  const code = codeOf(error);
  return LOST.has(code) || code.startsWith('08');
};

/** Whether the transaction may simply be tried again: the connection went or the server gave up on it. */
export const isUnavailable = (error: unknown): boolean => isLost(error) || GAVE_UP.has(codeOf(error));

/** The driver's own error: drizzle's wrapper prints the bound values, which belong into no log. */
export function withoutValues(error: unknown): unknown {
  return error instanceof DrizzleQueryError && error.cause ? error.cause : error;
}

export type ConstraintCode = 'conflict' | 'last-resort-limit';

/** The refusal behind a broken constraint; undefined for every other error. */
export function constraintRefusal(error: unknown): { code: ConstraintCode; constraint: string } | undefined {
  const fault = postgresError(error);
  if (!fault) return undefined;
  const constraint = fault.constraint_name ?? '';
  switch (fault.code) {
    case '23505': // unique
    case '23503': // foreign key
      return { code: 'conflict', constraint };
    case '23514': // check
      return {
        code: constraint.startsWith('last_resort_') ? 'last-resort-limit' : 'conflict',
        constraint,
      };
    default:
      return undefined;
  }
}

/** Drizzle wraps the driver's error. */
function postgresError(error: unknown): postgres.PostgresError | undefined {
  for (let at = error, depth = 0; at instanceof Error && depth < 3; at = at.cause, depth++) {
    if (at instanceof postgres.PostgresError) return at;
  }
  return undefined;
}
