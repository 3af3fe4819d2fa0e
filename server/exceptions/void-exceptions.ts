import { and, eq, inArray, ne } from 'drizzle-orm';
import { exceptions } from '../db/schema/checks';
import type { Tx } from '../db/transaction';

/**
 * Voids what a senior was asked or has agreed to for any other content than this one; null voids all.
 * Returns whether there was anything to void.
 */
export async function voidExceptions(tx: Tx, versionId: string, keepSha256: string | null): Promise<boolean> {
  const open = and(eq(exceptions.versionId, versionId), inArray(exceptions.state, ['asked', 'granted']));
  const voided = await tx
    .update(exceptions)
    .set({ state: 'void' })
    .where(keepSha256 === null ? open : and(open, ne(exceptions.contentSha256, keepSha256)))
    .returning({ id: exceptions.id });
  return voided.length > 0;
}
