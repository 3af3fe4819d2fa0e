import type { Actor } from '@shared/accounts/actor';
import { readContent } from '@shared/orders/build-content';
import { formFromContent } from '@shared/orders/form-from-content';
import type { Instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { done, refused, type Outcome } from '../../db/outcome';
import { orderVersions } from '../../db/schema/orders';
import type { Tx } from '../../db/transaction';
import { voidExceptions } from '../../exceptions/void-exceptions';
import { holdFor, noteOf } from '../lock-version';
import { moveVersion } from '../move-version';
import { noteSeen } from '../note-seen';
import { loadVersionContext } from '../work-out-version';
import { insertDraft } from './start-draft';

/**
 * Makes the next version out of this one, by its author or, when it came back, by another prescriber. The old
 * version is revised from now on: every signature on it is void, and so is every exception.
 */
export async function reviseOrder(
  tx: Tx,
  now: Instant,
  actor: Actor,
  versionId: string,
): Promise<Outcome<{ versionId: string }>> {
  const found = await holdFor(tx, { act: 'revise', actor, versionId, entry: 'order-revised' }, now);
  if (!found.ok) return found.refusal;
  const { held } = found;
  const { row } = held;
  if (row.givenAt !== null) return refused('order-state', { detail: 'What was given cannot be revised.' });
  const [old] = await tx
    .select({ content: orderVersions.content })
    .from(orderVersions)
    .where(eq(orderVersions.id, versionId));
  const loaded = await loadVersionContext(tx, row, actor.hospitalId, now);
  if (old?.content == null || loaded === null) return refused('not-found');
  await voidExceptions(tx, versionId, null);
  await moveVersion(tx, versionId, 'revised', now);
  const form = formFromContent(readContent(old.content), loaded.context);
  const next = await insertDraft(tx, now, {
    orderId: row.orderId,
    version: row.version + 1,
    childId: row.childId,
    kind: row.kind,
    authorId: actor.id,
    form,
  });
  // who takes an order over reads the other's figures by it
  if (row.authorId !== actor.id) await noteSeen(tx, versionId, actor.id, 'read', now);
  const entry = noteOf('order-revised', held, { from: row.state, to: row.version + 1 });
  return done({ versionId: next }, { entries: [entry] });
}
