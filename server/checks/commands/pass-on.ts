import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { done, refused, type Outcome } from '../../db/outcome';
import { orderVersions } from '../../db/schema/orders';
import type { Tx } from '../../db/transaction';
import type { LoadedVersion } from '../../orders/facts';
import { findCheckers } from '../../orders/find-checkers';
import { holdFor, noteOf } from '../../orders/lock-version';
import { mailTo } from '../../orders/mails';
import { noteSeen } from '../../orders/note-seen';
import { dropDraft, writeCheck } from '../own-check';

type Body = { versionId: string; toId: string | null; seenFigures: boolean; reason: string };

/** Hands a check on before lock-in, to a named checker or to anyone on the ward. */
export async function passOn(
  tx: Tx,
  actor: Actor,
  { versionId, toId, seenFigures, reason }: Body,
  now: Instant,
): Promise<Outcome<{ ok: true }>> {
  const opened = await holdFor(tx, { act: 'pass-on', actor, versionId, entry: 'check-passed-on' }, now);
  if (!opened.ok) return opened.refusal;
  const version = opened.held;
  const entry = noteOf('check-passed-on', version, { reason });
  if (toId !== null && !(await isFit(tx, actor, version, toId))) {
    return refused('checker-unfit', {
      detail: 'That person cannot check this order. Name another, or nobody.',
      errors: [{ pointer: '/toId', detail: 'That person cannot check this order.' }],
      entries: [entry],
    });
  }
  await writeCheck(
    tx,
    version,
    actor.id,
    { state: 'passed-on', decidedAt: now, passedTo: toId, reason },
    now,
  );
  await dropDraft(tx, versionId, actor.id);
  await tx.update(orderVersions).set({ askedChecker: toId }).where(eq(orderVersions.id, versionId));
  if (seenFigures) await noteSeen(tx, versionId, actor.id, 'read', now);
  const mails = toId === null ? [] : [mailTo('check-asked', toId, version, version.row.checkDueAt)];
  return done({ ok: true }, { entries: [entry], mails });
}

async function isFit(tx: Tx, actor: Actor, { row, ward }: LoadedVersion, toId: string): Promise<boolean> {
  if (toId === actor.id || ward === null) return false;
  const checkers = await findCheckers(tx, { ...row, versionId: row.id, wardId: ward.id });
  return checkers.some(({ id }) => id === toId);
}
