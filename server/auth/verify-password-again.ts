import type { Actor } from '@shared/accounts/actor';
import { inHospital, refused } from '../db/in-hospital';
import type { Deps } from '../http/deps';
import { LOGIN_OF_SESSION } from './session-sql';
import { tryPassword, type PasswordVerdict } from './try-password';

/**
 * The password typed again before an act. Call it before the act's transaction: a verification takes time no
 * lock should be held for, and its failure must count although the act is undone. A failure is in the ledger.
 */
export async function verifyPasswordAgain(
  deps: Deps,
  actor: Actor,
  password: string,
): Promise<PasswordVerdict> {
  const rows = await deps.db.sql.unsafe<{ loginId: string }[]>(LOGIN_OF_SESSION, [actor.sessionId], {
    prepare: true,
  });
  const verdict = await tryPassword(deps, rows[0]?.loginId ?? null, password);
  if (verdict !== 'ok') {
    const entries = [{ act: 'password-refused', subject: { kind: 'account', id: actor.id } }] as const;
    await inHospital(deps.db, actor, {}, () => Promise.resolve(refused(codeOf(verdict), { entries })));
  }
  return verdict;
}

const codeOf = (verdict: 'wrong' | 'locked') => (verdict === 'locked' ? 'account-locked' : 'password-wrong');

/** The refusal of an act whose password was not right. */
export const passwordRefusal = (verdict: 'wrong' | 'locked') =>
  refused(codeOf(verdict), {
    detail:
      verdict === 'locked'
        ? 'Too many wrong tries. Wait a quarter of an hour, or ask an administrator.'
        : 'That is not your password.',
    errors: [{ pointer: '/password', detail: 'That is not your password.' }],
  });
