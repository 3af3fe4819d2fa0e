import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import { done, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { lockVersion, NO_SUCH_ORDER, noteOf } from '../../orders/lock-version';
import { noteSeen } from '../../orders/note-seen';

/** Ends a visit beside the author; one that locked nothing in goes back to the author's screen, so it counts as seen. */
export async function closeBeside(
  tx: Tx,
  actor: Actor,
  versionId: string,
  now: Instant,
): Promise<Outcome<{ ok: true }>> {
  const version = await lockVersion(tx, actor, versionId, now);
  if (version === null) return NO_SUCH_ORDER;
  const { yourCheck } = version.facts;
  const hasLockedIn = yourCheck !== 'none' && yourCheck !== 'open';
  if (!hasLockedIn) await noteSeen(tx, versionId, actor.id, 'beside-cancelled', now);
  return done({ ok: true }, { entries: [noteOf('beside-closed', version, { to: yourCheck })] });
}
