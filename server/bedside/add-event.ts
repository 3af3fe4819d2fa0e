import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import { infusionEvents } from '../db/schema/bedside';
import type { Tx } from '../db/transaction';
import { findInfusion } from './queries';

type Event = Pick<typeof infusionEvents.$inferInsert, 'kind'> &
  Partial<Pick<typeof infusionEvents.$inferInsert, 'reason' | 'rateMlH' | 'volumeMl' | 'detail'>>;

/** Writes what happened at the pump; throws where the version has no infusion, which its state rules out. */
export async function addEvent(
  tx: Tx,
  actor: Pick<Actor, 'id'>,
  versionId: string,
  event: Event,
  now: Instant,
): Promise<void> {
  const infusion = await findInfusion(tx, versionId);
  if (infusion === undefined) throw new Error('a connected version has an infusion');
  await tx.insert(infusionEvents).values({ ...event, infusionId: infusion.id, at: now, by: actor.id });
}
