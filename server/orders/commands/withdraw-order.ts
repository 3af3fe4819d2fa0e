import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import { done, refused, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { holdFor, noteOf } from '../lock-version';
import { moveVersion } from '../move-version';

/** Takes an order back before it runs, by its author or a lead, with a reason. */
export async function withdrawOrder(
  tx: Tx,
  now: Instant,
  actor: Actor,
  { versionId, reason }: { versionId: string; reason: string },
): Promise<Outcome<{ ok: true }>> {
  const found = await holdFor(tx, { act: 'withdraw', actor, versionId, entry: 'order-withdrawn' }, now);
  if (!found.ok) return found.refusal;
  const { held } = found;
  if (held.row.givenAt !== null) {
    return refused('order-state', { detail: 'What was given cannot be withdrawn.' });
  }
  await moveVersion(tx, versionId, 'withdrawn', now, { endReason: reason });
  return done({ ok: true }, { entries: [noteOf('order-withdrawn', held, { from: held.row.state, reason })] });
}
