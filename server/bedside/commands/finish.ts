import type { Actor } from '@shared/accounts/actor';
import { readDecimal } from '@shared/decimal-input';
import type { Instant } from '@shared/time';
import { millilitres } from '@shared/units';
import { eq } from 'drizzle-orm';
import { done, refused, type Outcome } from '../../db/outcome';
import { infusions } from '../../db/schema/bedside';
import type { Tx } from '../../db/transaction';
import { holdFor, noteOf } from '../../orders/lock-version';
import { moveVersion } from '../../orders/move-version';
import { addEvent } from '../add-event';
import { INFUSED } from './stop';

/** The infusion is through: what went in is read and kept. */
export async function finish(
  tx: Tx,
  actor: Actor,
  { versionId, volumeInfusedMl }: { versionId: string; volumeInfusedMl: string },
  now: Instant,
): Promise<Outcome<{ ok: true }>> {
  const opened = await holdFor(tx, { act: 'finish', actor, versionId, entry: 'infusion-finished' }, now);
  if (!opened.ok) return opened.refusal;
  const reading = readDecimal(volumeInfusedMl, INFUSED);
  if (!reading.ok) {
    const errors = [{ pointer: '/volumeInfusedMl', detail: reading.message }];
    return refused('bad-input', { detail: 'Some entries need another look.', errors });
  }
  const infusedMl = millilitres(reading.value);
  await addEvent(tx, actor, versionId, { kind: 'finished', volumeMl: infusedMl }, now);
  await tx
    .update(infusions)
    .set({ endedAt: now, endedBy: actor.id, endedHow: 'finished', infusedMl })
    .where(eq(infusions.versionId, versionId));
  await moveVersion(tx, versionId, 'finished', now);
  return done(
    { ok: true },
    { entries: [noteOf('infusion-finished', opened.held, { from: 'running', to: 'finished' })] },
  );
}
