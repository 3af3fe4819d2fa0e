import type { Actor } from '@shared/accounts/actor';
import { RETURN_WORDS, type ReturnMatter } from '@shared/checks/words';
import type { Instant } from '@shared/time';
import { done, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { nearMiss } from '../../near-misses/near-miss';
import { holdFor, noteOf } from '../../orders/lock-version';
import { mailTo } from '../../orders/mails';
import { moveVersion } from '../../orders/move-version';
import { dropDraft, writeCheck } from '../own-check';

type Body = { versionId: string; what: ReturnMatter; reason: string };

/** The checker cannot verify the order: it goes back to its author with the reason. */
export async function cannotVerify(
  tx: Tx,
  actor: Actor,
  { versionId, what, reason }: Body,
  now: Instant,
): Promise<Outcome<{ ok: true }>> {
  const opened = await holdFor(tx, { act: 'cannot-verify', actor, versionId, entry: 'check-returned' }, now);
  if (!opened.ok) return opened.refusal;
  const version = opened.held;
  const words = `${RETURN_WORDS[what]}: ${reason}`;
  await writeCheck(tx, version, actor.id, { state: 'returned', decidedAt: now, reason: words }, now);
  await dropDraft(tx, versionId, actor.id);
  await moveVersion(tx, versionId, 'returned', now);
  const { row } = version;
  return done(
    { ok: true },
    {
      entries: [noteOf('check-returned', version, { from: 'awaiting-check', to: 'returned', reason: words })],
      mails: [mailTo('order-returned', row.authorId, version)],
      nearMisses: [
        nearMiss({
          class: 'check-returned',
          limitCode: what,
          childId: row.childId,
          versionId,
          kind: row.kind,
          detail: reason,
          once: [actor.id],
        }),
      ],
    },
  );
}
