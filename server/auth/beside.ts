import type { Actor } from '@shared/accounts/actor';
import { instant, type Instant } from '@shared/time';
import { randomBytes } from 'node:crypto';
import type { Outcome } from '../db/in-hospital';
import { done, refused } from '../db/outcome';
import type { Deps } from '../http/deps';
import { besideCookie, secretIn } from './auth-of';
import { actorOf } from './knock';
import { hashOfSecret, insertValues, readSessionRow } from './session-adapter';
import { DELETE_SESSION, INSERT_SESSION, RELEASE_SESSION, SUSPEND_SESSION } from './session-sql';
import { identify, signInRefusal, type Credentials } from './sign-in';

const MINUTE = 60_000;

export type BesideVisit = {
  /** The checker; `sessionId` is the visit's own. */
  actor: Actor;
  versionId: string;
  /** The session of the author that waits meanwhile. */
  besideOf: string;
  until: Instant;
};

/** Who would check here; asked before the visit opens, so that the caller can refuse the wrong person. */
export type MayOpen = (checker: Actor) => Promise<Outcome<null>>;

/**
 * Signs a checker in beside the one whose session is `suspends`, for one version and a few minutes. That session
 * is suspended in the same statement; `mayOpen` has the last word before anything is written.
 */
export async function openBesideSession(
  deps: Deps,
  login: Credentials,
  versionId: string,
  suspends: string,
  mayOpen: MayOpen,
): Promise<Outcome<{ actor: Actor; until: Instant; cookie: string }>> {
  const loginId = await identify(deps, login);
  if (loginId === undefined) return signInRefusal(deps);
  const secret = randomBytes(25).toString('base64url');
  const hash = hashOfSecret(secret);
  const lasts = deps.env.BESIDE_MINUTES * MINUTE;
  const made = { kind: 'beside', agent: '', besideOf: suspends, versionId, lasts } as const;
  await deps.db.sql.unsafe(INSERT_SESSION, insertValues(deps, hash, loginId, made), { prepare: true });
  const session = await readSessionRow(deps, hash);
  const verdict =
    session === null || session.account === null || session.isDisabled
      ? signInRefusal(deps)
      : await mayOpen(actorOf(session));
  if (session === null || !verdict.ok) {
    await deps.db.sql.unsafe(DELETE_SESSION, [hash], { prepare: true });
    return verdict.ok ? signInRefusal(deps) : verdict;
  }
  const suspended = await deps.db.sql.unsafe(SUSPEND_SESSION, [suspends, hash], { prepare: true });
  if (suspended.length === 0) {
    await deps.db.sql.unsafe(DELETE_SESSION, [hash], { prepare: true });
    return refused('signed-out', { detail: 'The session this would stand beside has ended.' });
  }
  const cookie = besideCookie(deps, secret, lasts / 1000);
  return done({ actor: actorOf(session), until: session.absoluteUntil, cookie });
}

/** The visit a request belongs to, from its own cookie; null when there is none or its time is over. */
export async function readBesideSession(deps: Deps, cookieHeader: string): Promise<BesideVisit | null> {
  const secret = secretIn(deps, 'beside', cookieHeader);
  if (secret === undefined) return null;
  const row = await readSessionRow(deps, hashOfSecret(secret));
  if (row === null || row.kind !== 'beside' || row.account === null || row.isDisabled) return null;
  if (row.absoluteUntil <= deps.clock.now() || row.versionId === null || row.besideOf === null) return null;
  return {
    actor: actorOf(row),
    versionId: row.versionId,
    besideOf: row.besideOf,
    until: instant(row.absoluteUntil),
  };
}

/** Ends a visit, gives the suspended session back, and returns the Set-Cookie that clears the visit's. */
export async function closeBesideSession(deps: Deps, visit: BesideVisit): Promise<string> {
  const { sessionId } = visit.actor;
  await deps.db.sql.unsafe(RELEASE_SESSION, [sessionId], { prepare: true });
  await deps.db.sql.unsafe(DELETE_SESSION, [sessionId], { prepare: true });
  return besideCookie(deps, '', 0);
}
