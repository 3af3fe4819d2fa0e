import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import { done, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { voidExceptions } from '../../exceptions/void-exceptions';
import { holdFor, noteOf } from '../lock-version';
import { moveVersion } from '../move-version';

/** Ends a draft by its author. */
export async function discardDraft(
  tx: Tx,
  now: Instant,
  actor: Actor,
  versionId: string,
): Promise<Outcome<{ ok: true }>> {
  const found = await holdFor(tx, { act: 'discard', actor, versionId, entry: 'draft-discarded' }, now);
  if (!found.ok) return found.refusal;
  await voidExceptions(tx, versionId, null);
  await moveVersion(tx, versionId, 'discarded', now);
  return done({ ok: true }, { entries: [noteOf('draft-discarded', found.held)] });
}
