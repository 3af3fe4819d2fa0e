import type { Actor } from '@shared/accounts/actor';
import { readDecimal } from '@shared/decimal-input';
import type { Instant } from '@shared/time';
import { millilitres, type Millilitres } from '@shared/units';
import { eq } from 'drizzle-orm';
import { findChild } from '../../children/find-child';
import { done, refused, type Outcome, type Refused } from '../../db/outcome';
import { infusionEvents, infusions } from '../../db/schema/bedside';
import { orderVersions } from '../../db/schema/orders';
import type { Tx } from '../../db/transaction';
import { lockVersion, NO_SUCH_ORDER, noteOf } from '../../orders/lock-version';
import { findInfusion } from '../queries';
import { INFUSED } from './stop';

type Body = { versionId: string; reason: string; volumeInfusedMl: string | null };

/**
 * The reason of a stop, and what had gone in, told afterwards by the ward or by whoever stopped it; the first ones
 * stay beside it. What went in counts in the child's totals, so it is not anybody's to say.
 */
export async function addStopReason(
  tx: Tx,
  actor: Actor,
  { versionId, reason, volumeInfusedMl }: Body,
  now: Instant,
): Promise<Outcome<{ ok: true }>> {
  const version = await lockVersion(tx, actor, versionId, now);
  const infusion = await findInfusion(tx, versionId);
  if (version === null || infusion === undefined) return NO_SUCH_ORDER;
  if (infusion.endedHow !== 'stopped') {
    return refused('order-state', { detail: 'This infusion was not stopped.' });
  }
  const onWard = await findChild(tx, actor, 'read-child', version.row.childId);
  if (!onWard.ok && infusion.endedBy !== actor.id) {
    return { ...onWard, entries: [noteOf('infusion-stop-reason', version)] };
  }
  const read = readVolume(volumeInfusedMl);
  if (!read.ok) return read.refusal;
  const { ml } = read;
  await tx
    .update(infusions)
    .set({ endReason: infusion.endReason ?? reason, infusedMl: infusion.infusedMl ?? ml })
    .where(eq(infusions.id, infusion.id));
  await tx.insert(infusionEvents).values({
    infusionId: infusion.id,
    kind: 'reason-added',
    at: now,
    by: actor.id,
    volumeMl: ml,
    reason,
  });
  if (infusion.endReason === null) {
    await tx.update(orderVersions).set({ endReason: reason }).where(eq(orderVersions.id, versionId));
  }
  return done({ ok: true }, { entries: [noteOf('infusion-stop-reason', version, { reason })] });
}

type Volume = { ok: true; ml: Millilitres | null } | { ok: false; refusal: Refused };

function readVolume(typed: string | null): Volume {
  if (typed === null || typed.trim() === '') return { ok: true, ml: null };
  const reading = readDecimal(typed, INFUSED);
  if (reading.ok) return { ok: true, ml: millilitres(reading.value) };
  const errors = [{ pointer: '/volumeInfusedMl', detail: reading.message }];
  return { ok: false, refusal: refused('bad-input', { detail: 'Some entries need another look.', errors }) };
}
