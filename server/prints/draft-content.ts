import type { OrderContent } from '@shared/orders/content';
import { orderFormSchema } from '@shared/orders/form';
import type { Instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { drafts } from '../db/schema/orders';
import type { Tx } from '../db/transaction';
import type { LoadedVersion } from '../orders/facts';
import { workOutVersion } from '../orders/work-out-version';

/** A draft as its author would sign it now; null while it cannot be worked out. */
export async function draftContent(
  tx: Tx,
  { row }: LoadedVersion,
  hospitalId: string,
  now: Instant,
): Promise<OrderContent | null> {
  const [draft] = await tx.select({ form: drafts.form }).from(drafts).where(eq(drafts.versionId, row.id));
  if (draft === undefined) return null;
  const worked = await workOutVersion(tx, row, orderFormSchema.parse(draft.form), hospitalId, now);
  return worked.ok ? worked.wouldBe.content : null;
}
