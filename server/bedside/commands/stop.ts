import type { Actor } from '@shared/accounts/actor';
import { readDecimal } from '@shared/decimal-input';
import { decide } from '@shared/orders/decide';
import { toRfc3339, type Instant } from '@shared/time';
import { millilitres, type Millilitres } from '@shared/units';
import { eq } from 'drizzle-orm';
import { done, type Outcome } from '../../db/outcome';
import { accounts } from '../../db/schema/accounts';
import { infusionEvents, infusions } from '../../db/schema/bedside';
import type { Tx } from '../../db/transaction';
import { lockVersion, NO_SUCH_ORDER, noteOf, refusalOf } from '../../orders/lock-version';
import { moveVersion } from '../../orders/move-version';
import { findInfusion, type Infusion } from '../queries';

export type Stopped = { stoppedAt: string; stoppedBy: string; reasonOwed: boolean };
type Body = { versionId: string; reason: string; volumeInfusedMl: string | null };

export const INFUSED = { decimals: 1, min: 0, max: 9999, unit: 'mL' } as const;

/** A volume read at the end, mL; what is no number is not taken, and asked for again with the reason. */
export function readInfused(typed: string | null): { ml: Millilitres | null; isOwed: boolean } {
  if (typed === null || typed.trim() === '') return { ml: null, isOwed: false };
  const reading = readDecimal(typed, INFUSED);
  return reading.ok ? { ml: millilitres(reading.value), isOwed: false } : { ml: null, isOwed: true };
}

/**
 * Stops an infusion: for every clinical role of the hospital, whatever ward, lock counter or missing reason. A
 * second call gives the first answer.
 */
export async function stop(
  tx: Tx,
  actor: Actor,
  { versionId, reason, volumeInfusedMl }: Body,
  now: Instant,
): Promise<Outcome<Stopped>> {
  const version = await lockVersion(tx, actor, versionId, now);
  if (version === null) return NO_SUCH_ORDER;
  const infusion = await findInfusion(tx, versionId);
  if (infusion?.endedAt != null) return done(await ended(tx, infusion));
  const note = noteOf('infusion-stopped', version);
  const refusal = refusalOf(decide('stop', actor, version.facts, now), note);
  if (refusal) return refusal;
  const { ml, isOwed } = readInfused(volumeInfusedMl);
  if (infusion !== undefined) {
    await tx
      .update(infusions)
      .set({ endedAt: now, endedBy: actor.id, endedHow: 'stopped', endReason: reason || null, infusedMl: ml })
      .where(eq(infusions.id, infusion.id));
    await tx.insert(infusionEvents).values({
      infusionId: infusion.id,
      kind: 'stopped',
      at: now,
      by: actor.id,
      volumeMl: ml,
      reason: reason || null,
    });
  }
  await moveVersion(tx, versionId, 'stopped', now, { endReason: reason || null });
  return done(
    { stoppedAt: toRfc3339(now), stoppedBy: actor.name, reasonOwed: reason === '' || isOwed },
    {
      entries: [
        noteOf('infusion-stopped', version, {
          from: version.row.state,
          to: 'stopped',
          ...(reason === '' ? {} : { reason }),
        }),
      ],
    },
  );
}

async function ended(tx: Tx, infusion: Infusion): Promise<Stopped> {
  const [by] = await tx
    .select({ name: accounts.name })
    .from(accounts)
    .where(eq(accounts.id, infusion.endedBy ?? ''));
  return {
    stoppedAt: toRfc3339(infusion.endedAt ?? infusion.startedAt),
    stoppedBy: by?.name ?? '',
    reasonOwed: infusion.endReason === null,
  };
}
