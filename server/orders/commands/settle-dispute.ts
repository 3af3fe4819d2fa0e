import type { Actor } from '@shared/accounts/actor';
import { decide } from '@shared/orders/decide';
import type { OrderView } from '@shared/routes/orders';
import type { Instant } from '@shared/time';
import { done, refused, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { holdFor, lockVersion, NO_SUCH_ORDER, noteOf, refusalOf } from '../lock-version';
import { mailTo } from '../mails';
import { moveVersion } from '../move-version';
import { noteSeen } from '../note-seen';
import { readOrder } from '../present-order';
import { sign } from '../sign-row';

/** Opens both sets of a dispute to the one who may settle it; written down, and it bars them from the next check. */
export async function openDispute(
  tx: Tx,
  now: Instant,
  actor: Actor,
  versionId: string,
): Promise<Outcome<OrderView>> {
  const held = await lockVersion(tx, actor, versionId, now);
  if (held === null) return NO_SUCH_ORDER;
  const refusal = refusalOf(decide('settle', actor, held.facts, now));
  if (refusal) return refusal;
  await noteSeen(tx, versionId, actor.id, 'settlement', now);
  const read = await readOrder(tx, actor, versionId, now, { uncovered: true });
  if (!read.ok) return read.refusal;
  return done(read.view, { entries: [noteOf('seen-figures', held, { reason: 'settlement' })] });
}

/**
 * Settles a dispute by someone who is neither author nor checker: back to the author, never over the checker's head;
 * of something given in an emergency, closed with the settlement.
 */
export async function settleDispute(
  tx: Tx,
  now: Instant,
  actor: Actor,
  { versionId, reason }: { versionId: string; reason: string },
): Promise<Outcome<{ ok: true }>> {
  const found = await holdFor(tx, { act: 'settle', actor, versionId, entry: 'dispute-settled' }, now);
  if (!found.ok) return found.refusal;
  const { held } = found;
  const { contentSha256, authorId } = held.row;
  if (contentSha256 === null) return refused('not-found');
  await sign(tx, actor, now, { versionId, meaning: 'settlement', contentSha256, note: reason });
  // what was given cannot be taken back or written again: settling it ends it, with both sets kept
  const to = held.row.givenAt === null ? 'returned' : 'countersigned';
  await moveVersion(tx, versionId, to, now);
  const entry = noteOf('dispute-settled', held, { from: 'disputed', to, reason });
  const mails = to === 'returned' ? [mailTo('order-returned', authorId, held)] : [];
  return done({ ok: true }, { entries: [entry], mails });
}
