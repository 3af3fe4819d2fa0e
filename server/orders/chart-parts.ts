import { decimalText } from '@shared/canonical';
import type { ChildHead, WeightRow } from '@shared/routes/children';
import { toRfc3339, type Instant } from '@shared/time';
import { staleText } from '@shared/weights/dosing';
import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import { presentChild } from '../children/present';
import { accounts } from '../db/schema/accounts';
import { children, stays } from '../db/schema/children';
import { wards } from '../db/schema/hospitals';
import { weights } from '../db/schema/weights';
import { statement } from '../db/statement';
import type { Tx } from '../db/transaction';

const childWithPlace = statement((tx) =>
  tx
    .select({ child: children, bed: stays.bed, wardId: wards.id, wardName: wards.name })
    .from(children)
    .leftJoin(stays, and(eq(stays.childId, children.id), isNull(stays.to)))
    .leftJoin(wards, eq(wards.id, stays.wardId))
    .where(eq(children.id, sql.placeholder('childId'))),
);

/** The head of a child's page; null where there is no such child. */
export async function loadChildHead(
  tx: Tx,
  childId: string,
  now: Instant,
  zone: string,
): Promise<ChildHead | null> {
  const [row] = await childWithPlace(tx, { childId });
  if (row === undefined) return null;
  return presentChild(row.child, row, now, zone);
}

/** A weight that looked wrong may be used once what it needed has been done. */
export const isUsable = (
  row: Pick<typeof weights.$inferSelect, 'needs' | 'confirmedAt' | 'secondAt'>,
): boolean =>
  row.needs === 'nothing' ||
  row.confirmedAt !== null ||
  // a second reading is stored only where it agrees; another person's is a confirmation
  (row.needs === 'second-measurement' && row.secondAt !== null);

/** The weights of a chart, newest first, corrected ones left out. */
export async function loadWeights(
  tx: Tx,
  childId: string,
  at: { now: Instant; isNewborn: boolean },
): Promise<WeightRow[]> {
  const confirmer = alias(accounts, 'confirmer');
  const rows = await tx
    .select({ weight: weights, recordedBy: accounts.name, confirmedBy: confirmer.name })
    .from(weights)
    .innerJoin(accounts, eq(accounts.id, weights.by))
    .leftJoin(confirmer, eq(confirmer.id, weights.confirmedBy))
    .where(and(eq(weights.childId, childId), isNull(weights.supersededBy)))
    .orderBy(desc(weights.at), desc(weights.recordedAt))
    .limit(50);
  return rows.map(({ weight, recordedBy, confirmedBy }) => ({
    id: weight.id,
    kg: decimalText(weight.kg, 3),
    method: weight.method,
    at: toRfc3339(weight.at),
    recordedBy,
    confirmedBy,
    z: weight.z === null ? null : decimalText(weight.z, 2),
    usable: isUsable(weight),
    stale: staleText(weight, at.now, at.isNewborn),
  }));
}
