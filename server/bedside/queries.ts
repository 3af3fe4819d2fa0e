import { isConnected, type VersionState } from '@shared/orders/states';
import { and, eq, isNull } from 'drizzle-orm';
import { infusions } from '../db/schema/bedside';
import { orders, orderVersions } from '../db/schema/orders';
import { products } from '../db/schema/shelf';
import type { Tx } from '../db/transaction';

export type Infusion = typeof infusions.$inferSelect;

/** The infusion of a version: one at most. */
export async function findInfusion(tx: Tx, versionId: string): Promise<Infusion | undefined> {
  const [row] = await tx.select().from(infusions).where(eq(infusions.versionId, versionId));
  return row;
}

export type Connected = {
  versionId: string;
  code: string;
  version: number;
  state: VersionState;
  line: string;
  kind: string;
  fluid: string;
  rateMlH: number | null;
};

/** Every infusion of the child that has not ended, but the version's own. */
export async function connectedTo(tx: Tx, childId: string, except: string): Promise<Connected[]> {
  const rows = await tx
    .select({
      versionId: infusions.versionId,
      code: orders.code,
      version: orderVersions.version,
      state: orderVersions.state,
      line: infusions.line,
      kind: orderVersions.kind,
      fluid: products.name,
      rateMlH: orderVersions.rateMlH,
    })
    .from(infusions)
    .innerJoin(orderVersions, eq(orderVersions.id, infusions.versionId))
    .innerJoin(orders, eq(orders.id, orderVersions.orderId))
    .innerJoin(products, eq(products.id, infusions.bagProductId))
    .where(and(eq(infusions.childId, childId), isNull(infusions.endedAt)))
    .orderBy(infusions.startedAt);
  return rows.filter(({ versionId, state }) => versionId !== except && isConnected(state));
}
