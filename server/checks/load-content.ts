import { readContent } from '@shared/orders/build-content';
import type { OrderContent } from '@shared/orders/content';
import { eq } from 'drizzle-orm';
import { orderVersions } from '../db/schema/orders';
import type { Tx } from '../db/transaction';

/** The signed content: for those who locked in and for comparing on the server, never for a covered page. */
export async function loadContent(tx: Tx, versionId: string): Promise<OrderContent> {
  const [row] = await tx
    .select({ content: orderVersions.content })
    .from(orderVersions)
    .where(eq(orderVersions.id, versionId));
  if (row === undefined || row.content === null) throw new Error('the version has no content');
  return readContent(row.content);
}
