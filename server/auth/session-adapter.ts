import type { Entitlement, Role } from '@shared/accounts/actor';
import { instant, type Instant } from '@shared/time';
import type { Adapter, DatabaseSession } from 'lucia';
import { createHash } from 'node:crypto';
import { readInstant } from '../db/columns';
import type { Deps } from '../http/deps';
import { ACCOUNT_OF_SESSION, DELETE_EXPIRED, DELETE_OF_LOGIN, DELETE_SESSION } from './session-sql';
import { INSERT_SESSION, SESSION_BY_ID, SESSIONS_OF_LOGIN } from './session-sql';

/** What the one who signs in adds to a session. */
export type NewSession = {
  kind: 'own' | 'beside';
  agent: string;
  besideOf?: string;
  versionId?: string;
  /** Milliseconds it may last; absent means the absolute limit. */
  lasts?: number;
};

export type SessionAccount = {
  id: string;
  name: string;
  title: string;
  roles: Role[];
  registrationNumber: string | null;
  wards: { wardId: string; name: string; entitlements: Entitlement[] }[];
  hospital: { id: string; name: string; zone: string };
};

/** A session as it stands, with the person it belongs to; `account` is null once that person has left. */
export type SessionRow = {
  hash: string;
  loginId: string;
  hospitalId: string;
  email: string;
  isDisabled: boolean;
  kind: 'own' | 'beside';
  madeAt: Instant;
  idleUntil: Instant;
  absoluteUntil: Instant;
  lockedAt: Instant | null;
  suspendedBy: string | null;
  /** When the beside session that took over ends; null when it has gone. */
  suspendedUntil: Instant | null;
  besideOf: string | null;
  versionId: string | null;
  agent: string;
  account: SessionAccount | null;
};

/** Only this is kept of a session's secret. */
export const hashOfSecret = (secret: string): string => createHash('sha256').update(secret).digest('hex');

type Stored = Record<string, string | boolean | null>;

const moment = (text: unknown): Instant | null => (typeof text === 'string' ? readInstant(text) : null);

const rowOf = (stored: Stored, account: SessionAccount | null): SessionRow =>
  ({
    ...stored,
    madeAt: moment(stored.madeAt),
    idleUntil: moment(stored.idleUntil),
    absoluteUntil: moment(stored.absoluteUntil),
    lockedAt: moment(stored.lockedAt),
    suspendedUntil: moment(stored.suspendedUntil),
    account,
  }) as SessionRow;

/** Reads a session and its person in one trip: the first statement names the hospital that the second one sees. */
export async function readSessionRow(deps: Deps, hash: string): Promise<SessionRow | null> {
  const rows = await deps.db.sql.begin('read only', async (sql) => {
    const [session, account] = await Promise.all([
      sql.unsafe<Stored[]>(SESSION_BY_ID, [hash], { prepare: true }),
      sql.unsafe<SessionAccount[]>(ACCOUNT_OF_SESSION, [hash], { prepare: true }),
    ]);
    return { session: session[0], account: account[0] };
  });
  return rows.session ? rowOf(rows.session, rows.account ?? null) : null;
}

/** Every session of one login that has not ended, newest first. */
export async function sessionsOfLogin(deps: Deps, loginId: string): Promise<SessionRow[]> {
  const rows = await deps.db.sql.unsafe<Stored[]>(
    SESSIONS_OF_LOGIN,
    [loginId, new Date(deps.clock.now()).toISOString()],
    { prepare: true },
  );
  return rows.map((row) => rowOf(row, null));
}

/**
 * The library's adapter on named statements. It hands over secrets, we keep their hashes and put the secret
 * back on the way out. The library judges by the machine's clock, so an end is told relative to it; and it
 * would slide the end for ever, so a new end is ignored: the absolute limit is ours.
 */
export function sessionAdapter(deps: Deps): Adapter {
  const run = (statement: string, values: (string | null)[]) =>
    deps.db.sql.unsafe(statement, values, { prepare: true }).then(() => undefined);
  const byMachine = (end: Instant): Date => new Date(Date.now() + (end - deps.clock.now()));
  const session = (row: SessionRow, id: string): DatabaseSession => ({
    id,
    userId: row.loginId,
    expiresAt: byMachine(row.absoluteUntil),
    attributes: row,
  });
  return {
    async getSessionAndUser(secret) {
      const row = await readSessionRow(deps, hashOfSecret(secret));
      if (row === null) return [null, null];
      const isGone = row.account === null || row.isDisabled;
      return [session(row, secret), isGone ? null : { id: row.loginId, attributes: {} }];
    },
    getUserSessions: async (loginId) =>
      (await sessionsOfLogin(deps, loginId)).map((row) => session(row, row.hash)),
    setSession: ({ id, userId, attributes }) =>
      run(INSERT_SESSION, insertValues(deps, hashOfSecret(id), userId, attributes as NewSession)),
    updateSessionExpiration: () => Promise.resolve(),
    deleteSession: (secret) => run(DELETE_SESSION, [hashOfSecret(secret)]),
    deleteUserSessions: (loginId) => run(DELETE_OF_LOGIN, [loginId]),
    deleteExpiredSessions: () => run(DELETE_EXPIRED, [new Date(deps.clock.now()).toISOString()]),
  };
}

const HOUR = 3_600_000;
const MINUTE = 60_000;

/** The values of a new session's row, in the statement's order. */
export function insertValues(deps: Deps, hash: string, loginId: string, made: NewSession): (string | null)[] {
  const now = deps.clock.now();
  const { SESSION_ABSOLUTE_HOURS, SESSION_IDLE_MINUTES } = deps.env;
  const until = (ms: number) => new Date(instant(now + ms)).toISOString();
  return [
    hash,
    loginId,
    made.kind,
    until(0),
    until(made.lasts ?? SESSION_IDLE_MINUTES * MINUTE),
    until(made.lasts ?? SESSION_ABSOLUTE_HOURS * HOUR),
    made.besideOf ?? null,
    made.versionId ?? null,
    made.agent.slice(0, 200),
  ];
}
