import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import { done, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { checkDue } from '../../orders/commands/sign-order';
import { findCheckers } from '../../orders/find-checkers';
import { holdFor, noteOf } from '../../orders/lock-version';
import { mailTo } from '../../orders/mails';
import { moveVersion } from '../../orders/move-version';
import { rulebookInForce } from '../../rulebook/in-force';
import { writeCheck } from '../own-check';

/** "I made a slip": once for each version, the disputed check goes to another person. */
export async function slip(
  tx: Tx,
  actor: Actor,
  { versionId, reason }: { versionId: string; reason: string },
  now: Instant,
): Promise<Outcome<{ ok: true }>> {
  const opened = await holdFor(tx, { act: 'slip', actor, versionId, entry: 'check-slip' }, now);
  if (!opened.ok) return opened.refusal;
  const version = opened.held;
  const { row, ward } = version;
  const checkDueAt = checkDue(row.urgency, (await rulebookInForce(tx)).rulebook, now);
  await writeCheck(tx, version, actor.id, { state: 'slip', decidedAt: now, reason }, now);
  const isGiven = row.givenAt !== null;
  const to = isGiven ? 'given' : 'awaiting-check';
  await moveVersion(tx, versionId, to, now, { askedChecker: null, checkDueAt });
  const others = ward === null ? [] : await findCheckers(tx, { ...row, versionId, wardId: ward.id });
  return done(
    { ok: true },
    {
      entries: [noteOf('check-slip', version, { from: 'disputed', to, reason })],
      // an emergency is asked by word of mouth: mail comes too late
      mails:
        row.urgency === 'emergency' && !isGiven
          ? []
          : others.map(({ id }) =>
              mailTo(isGiven ? 'countersign-asked' : 'check-asked', id, version, checkDueAt),
            ),
    },
  );
}
