import type { Deps } from '../http/deps';
import { inPasswordTurn, isPassword } from './password';
import { CLEAR_FAILURES, COUNT_FAILURE, PASSWORD_OF_LOGIN } from './session-sql';

export type PasswordVerdict = 'ok' | 'wrong' | 'locked';

type Stored = { passwordHash: string | null; isLocked: boolean; isDisabled: boolean; failedCount: number };

const MINUTE = 60_000;

/**
 * Holds a password against a login and counts the failures; `loginId` null takes as long and says wrong. The
 * lock is looked at in the same turn as the verification, so that many tries at once gain nothing.
 */
export function tryPassword(deps: Deps, loginId: string | null, password: string): Promise<PasswordVerdict> {
  return inPasswordTurn(async () => {
    const stored = loginId === null ? undefined : await storedOf(deps, loginId);
    const isOpen = stored !== undefined && !stored.isLocked && !stored.isDisabled;
    const isRight = await isPassword(isOpen ? stored.passwordHash : null, password);
    if (loginId === null || stored === undefined || stored.isDisabled) return 'wrong';
    if (stored.isLocked) return 'locked';
    if (!isRight) return await countFailure(deps, loginId);
    if (stored.failedCount > 0) await deps.db.sql.unsafe(CLEAR_FAILURES, [loginId], { prepare: true });
    return 'ok';
  });
}

async function storedOf(deps: Deps, loginId: string): Promise<Stored | undefined> {
  const now = new Date(deps.clock.now()).toISOString();
  const rows = await deps.db.sql.unsafe<Stored[]>(PASSWORD_OF_LOGIN, [loginId, now], { prepare: true });
  return rows[0];
}

async function countFailure(deps: Deps, loginId: string): Promise<PasswordVerdict> {
  const now = deps.clock.now();
  const { LOCKOUT_TRIES, LOCKOUT_MINUTES } = deps.env;
  const until = new Date(now + LOCKOUT_MINUTES * MINUTE).toISOString();
  const rows = await deps.db.sql.unsafe<{ isLocked: boolean }[]>(
    COUNT_FAILURE,
    [loginId, new Date(now).toISOString(), LOCKOUT_TRIES, until],
    { prepare: true },
  );
  return rows[0]?.isLocked === false ? 'wrong' : 'locked';
}
