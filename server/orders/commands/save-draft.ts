import type { Actor } from '@shared/accounts/actor';
import { decide } from '@shared/orders/decide';
import type { OrderForm } from '@shared/orders/form';
import { toRfc3339, type Instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { done, refused, type Outcome } from '../../db/outcome';
import { drafts } from '../../db/schema/orders';
import type { Tx } from '../../db/transaction';
import { voidExceptions } from '../../exceptions/void-exceptions';
import { loadFacts } from '../facts';
import { NO_SUCH_ORDER, refusalOf } from '../lock-version';
import { limitMiss } from '../near-miss';
import { workOutVersion } from '../work-out-version';

export type SaveDraft = { versionId: string; rev: number; form: OrderForm };
export type SavedDraft = { rev: number; savedAt: string; exceptionsVoided: boolean };

/** Keeps a form exactly as typed. The first crossing of each brim is kept too, since the sign button is gone by then. */
export async function saveDraft(
  tx: Tx,
  now: Instant,
  actor: Actor,
  { versionId, rev, form }: SaveDraft,
): Promise<Outcome<SavedDraft>> {
  const loaded = await loadFacts(tx, actor, versionId, now, { lock: true });
  if (loaded === null) return NO_SUCH_ORDER;
  // whoever may discard a draft may type in it: its author, while it is one
  const refusal = refusalOf(decide('discard', actor, loaded.facts, now));
  if (refusal) return refusal;
  const { row } = loaded;
  if (form.kind !== row.kind) {
    const errors = [
      { pointer: '/form/kind', detail: 'The kind of an order never changes: start a new one.' },
    ];
    return refused('bad-input', { errors });
  }
  const [draft] = await tx.select().from(drafts).where(eq(drafts.versionId, versionId)).for('update');
  if (draft === undefined) return NO_SUCH_ORDER;
  if (draft.rev !== rev) return draftMoved(draft, form);
  const next = rev + 1;
  await tx.update(drafts).set({ form, rev: next, savedAt: now }).where(eq(drafts.versionId, versionId));
  const worked = await workOutVersion(tx, row, form, actor.hospitalId, now);
  const exceptionsVoided = await voidExceptions(tx, versionId, worked.ok ? worked.wouldBe.sha256 : null);
  const nearMisses = worked.ok ? worked.work.brims.map((limit) => limitMiss(row, limit)) : [];
  return done({ rev: next, savedAt: toRfc3339(now), exceptionsVoided }, { nearMisses });
}

type StoredDraft = typeof drafts.$inferSelect;

/** Both texts go back, nothing is overwritten. */
export const draftMoved = (stored: StoredDraft, yours?: OrderForm) =>
  refused('draft-moved', {
    detail: 'This draft was changed in another window. Both are kept: choose which one goes on.',
    data: {
      stored: { rev: stored.rev, form: stored.form, savedAt: toRfc3339(stored.savedAt) },
      ...(yours && { yours }),
    },
  });
