import { isEnded, type VersionState } from '@shared/orders/states';
import type { Instant } from '@shared/time';
import { eq, sql } from 'drizzle-orm';
import { orderVersions } from '../db/schema/orders';
import type { Tx } from '../db/transaction';

type Change = Partial<Omit<typeof orderVersions.$inferInsert, 'id' | 'hospitalId' | 'state' | 'stateSince'>>;

/** The one writer of a version's state; an ended one gets its time. */
export async function moveVersion(
  tx: Tx,
  versionId: string,
  to: VersionState,
  now: Instant,
  change: Change = {},
): Promise<void> {
  await tx
    .update(orderVersions)
    .set({
      state: to,
      stateSince: now,
      rev: sql`${orderVersions.rev} + 1`,
      ...(isEnded(to) && { endedAt: now }),
      ...change,
    })
    .where(eq(orderVersions.id, versionId));
}
