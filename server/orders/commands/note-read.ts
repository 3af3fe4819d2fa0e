import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import { done, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { noteSeen } from '../note-seen';

/** Keeps that a reader has the figures of an unsigned version before them once more. */
export async function noteRead(
  tx: Tx,
  now: Instant,
  actor: Actor,
  versionId: string,
): Promise<Outcome<null>> {
  await noteSeen(tx, versionId, actor.id, 'read', now);
  return done(null);
}
