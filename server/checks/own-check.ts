import type { Instant } from '@shared/time';
import { and, eq, lt, ne } from 'drizzle-orm';
import { checkDrafts, checks } from '../db/schema/checks';
import type { Tx } from '../db/transaction';
import type { LoadedVersion } from '../orders/facts';

type CheckValues = Omit<
  typeof checks.$inferInsert,
  'hospitalId' | 'id' | 'versionId' | 'authorId' | 'checkerId' | 'openedAt'
>;

/** Writes a person's own row of a check, made on their first touch of it. */
export async function writeCheck(
  tx: Tx,
  { row }: Pick<LoadedVersion, 'row'>,
  checkerId: string,
  values: CheckValues,
  now: Instant,
): Promise<void> {
  // not an upsert: a row to insert is held against the constraints before its conflict is found
  const changed = await tx
    .update(checks)
    .set(values)
    .where(and(eq(checks.versionId, row.id), eq(checks.checkerId, checkerId)))
    .returning({ id: checks.id });
  if (changed.length > 0) return;
  await tx
    .insert(checks)
    .values({ versionId: row.id, authorId: row.authorId, checkerId, openedAt: now, ...values });
}

/** Agreed figures of others whose reservation has run out give the check free. */
export async function expireOthers(
  tx: Tx,
  versionId: string,
  checkerId: string,
  now: Instant,
): Promise<void> {
  await tx
    .update(checks)
    .set({ state: 'expired', decidedAt: now })
    .where(
      and(
        eq(checks.versionId, versionId),
        ne(checks.checkerId, checkerId),
        eq(checks.state, 'locked-agreed'),
        lt(checks.reservedUntil, now),
      ),
    );
}

/** Unsent figures are gone once they are locked in, or the check has left this person. */
export async function dropDraft(tx: Tx, versionId: string, accountId: string): Promise<void> {
  await tx
    .delete(checkDrafts)
    .where(and(eq(checkDrafts.versionId, versionId), eq(checkDrafts.accountId, accountId)));
}
