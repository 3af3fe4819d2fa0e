import { decideByClock } from '@shared/orders/decide';
import { isDraft } from '@shared/orders/states';
import type { Instant } from '@shared/time';
import { and, eq, lt } from 'drizzle-orm';
import { done, type Outcome } from '../db/outcome';
import { checks } from '../db/schema/checks';
import { drafts } from '../db/schema/orders';
import type { Tx } from '../db/transaction';
import { voidExceptions } from '../exceptions/void-exceptions';
import type { LoadedVersion } from '../orders/facts';
import { noteOf } from '../orders/lock-version';
import { mailTo } from '../orders/mails';
import { moveVersion } from '../orders/move-version';

const NOTHING = done(null);

/** Lapses a version whose time has passed, by the transition table; a late sweep finds the guard still standing. */
export async function lapse(tx: Tx, held: LoadedVersion, now: Instant): Promise<Outcome<null>> {
  if (!decideByClock('lapse', held.facts, now).allowed) return NOTHING;
  const { row } = held;
  await moveVersion(tx, row.id, 'lapsed', now, { endReason: 'Its time passed.' });
  const entry = noteOf('order-lapsed', held, { from: row.state, to: 'lapsed' });
  return done(null, { entries: [entry], mails: [mailTo('order-lapsed', row.authorId, held)] });
}

/** Gives a check free whose agreed figures were not signed while it was reserved. */
export async function expireReservations(tx: Tx, held: LoadedVersion, now: Instant): Promise<Outcome<null>> {
  const expired = await tx
    .update(checks)
    .set({ state: 'expired', decidedAt: now })
    .where(
      and(
        eq(checks.versionId, held.row.id),
        eq(checks.state, 'locked-agreed'),
        lt(checks.reservedUntil, now),
      ),
    )
    .returning({ id: checks.id });
  return expired.length === 0 ? NOTHING : done(null, { entries: [noteOf('check-expired', held)] });
}

/** Discards a draft nobody has touched since `before`. */
export async function discardUntouched(
  tx: Tx,
  held: LoadedVersion,
  now: Instant,
  before: Instant,
): Promise<Outcome<null>> {
  const [draft] = await tx.select().from(drafts).where(eq(drafts.versionId, held.row.id)).for('update');
  if (!isDraft(held.row.state) || draft === undefined || draft.savedAt >= before) return NOTHING;
  await voidExceptions(tx, held.row.id, null);
  await moveVersion(tx, held.row.id, 'discarded', now, { endReason: 'Not touched for a day.' });
  return done(null, { entries: [noteOf('draft-discarded', held)] });
}
