import type { Actor } from '@shared/accounts/actor';
import { inHospital } from '../db/in-hospital';
import { done, type Outcome } from '../db/outcome';
import type { Deps } from '../http/deps';
import { idleEnd } from './knock';
import { readSessionRow, type SessionRow } from './session-adapter';
import { LOCK_SESSION, REVOKE_SESSION, UNLOCK_SESSION } from './session-sql';
import { passwordRefusal, verifyPasswordAgain } from './verify-password-again';

const record = (deps: Deps, actor: Actor, act: 'locked' | 'unlocked' | 'session-revoked') =>
  inHospital(deps.db, actor, {}, () =>
    Promise.resolve(done(null, { entries: [{ act, subject: { kind: 'account', id: actor.id } }] })),
  );

/** Locks the actor's session by hand; null when it has ended meanwhile. */
export async function lockSession(deps: Deps, actor: Actor): Promise<SessionRow | null> {
  const now = new Date(deps.clock.now()).toISOString();
  await deps.db.sql.unsafe(LOCK_SESSION, [actor.sessionId, now], { prepare: true });
  await record(deps, actor, 'locked');
  return await readSessionRow(deps, actor.sessionId);
}

/** Opens a locked session again by its person's password. */
export async function unlockSession(
  deps: Deps,
  actor: Actor,
  password: string,
): Promise<Outcome<SessionRow>> {
  const verdict = await verifyPasswordAgain(deps, actor, password);
  if (verdict !== 'ok') return passwordRefusal(verdict);
  await deps.db.sql.unsafe(UNLOCK_SESSION, [actor.sessionId, idleEnd(deps)], { prepare: true });
  await record(deps, actor, 'unlocked');
  return done((await readSessionRow(deps, actor.sessionId)) as SessionRow);
}

/** Ends another (or this) session of the same login; false when there is none by that id. */
export async function revokeSession(
  deps: Deps,
  actor: Actor,
  loginId: string,
  sessionId: string,
): Promise<boolean> {
  const rows = await deps.db.sql.unsafe(REVOKE_SESSION, [sessionId, loginId], { prepare: true });
  if (rows.length === 0) return false;
  await record(deps, actor, 'session-revoked');
  return true;
}
