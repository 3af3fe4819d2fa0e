import type { ChartWeight } from '@shared/weights/chart-weight';
import { and, desc, eq, isNull } from 'drizzle-orm';
import { weights } from '../db/schema/weights';
import type { Tx } from '../db/transaction';
import { isUsable } from '../orders/chart-parts';

/** The weights of a chart as plausibility reads them, newest first, corrected ones left out. */
export async function weightHistory(tx: Tx, childId: string): Promise<ChartWeight[]> {
  const rows = await tx
    .select({
      kg: weights.kg,
      method: weights.method,
      at: weights.at,
      needs: weights.needs,
      confirmedAt: weights.confirmedAt,
      secondAt: weights.secondAt,
    })
    .from(weights)
    .where(and(eq(weights.childId, childId), isNull(weights.supersededBy)))
    .orderBy(desc(weights.at))
    .limit(200);
  return rows.map((row) => ({ kg: row.kg, method: row.method, at: row.at, usable: isUsable(row) }));
}
