import type { Instant } from '@shared/time';
import { sql } from 'drizzle-orm';
import type { SEEN_HOWS } from '../db/schema/checks';
import { seenFigures } from '../db/schema/checks';
import type { Tx } from '../db/transaction';

/** Writes down that a person has seen the figures of a version its checker has not signed; later guards read it. */
export async function noteSeen(
  tx: Tx,
  versionId: string,
  accountId: string,
  how: (typeof SEEN_HOWS)[number],
  now: Instant,
): Promise<void> {
  await tx
    .insert(seenFigures)
    .values({ versionId, accountId, how, at: now })
    .onConflictDoUpdate({
      target: [seenFigures.hospitalId, seenFigures.versionId, seenFigures.accountId, seenFigures.how],
      set: { at: sql`excluded.at` },
    });
}
