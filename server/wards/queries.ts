import type { Actor } from '@shared/accounts/actor';
import type { WeightLimits } from '@shared/weights/limits';
import type { WardRow } from '@shared/routes/children';
import { decimalText } from '@shared/canonical';
import { toRfc3339, type Instant } from '@shared/time';
import { dosingWeight, staleText } from '@shared/weights/dosing';
import { and, desc, eq, inArray, isNotNull, isNull, ne, or, sql } from 'drizzle-orm';
import { children, stays } from '../db/schema/children';
import { exceptions } from '../db/schema/checks';
import { wards } from '../db/schema/hospitals';
import { orderVersions } from '../db/schema/orders';
import { weights } from '../db/schema/weights';
import type { Tx } from '../db/transaction';
import { ageOf, childFactsOf, type ChildRow } from '../children/present';
import { isUsable } from '../orders/chart-parts';

/** How many weights of a child are looked at for the one to show. */
const WEIGHTS_READ = 8;

/** A ward that is open; undefined where this hospital has none by that id. */
export async function findWard(tx: Tx, wardId: string): Promise<{ id: string; name: string } | undefined> {
  const [ward] = await tx
    .select({ id: wards.id, name: wards.name })
    .from(wards)
    .where(and(eq(wards.id, wardId), isNull(wards.closedAt)));
  return ward;
}

type WeightRecord = Pick<
  typeof weights.$inferSelect,
  'kg' | 'method' | 'at' | 'needs' | 'confirmedAt' | 'secondAt'
>;
export type ChildOnWard = { child: ChildRow; bed: string | null; weights: WeightRecord[] };

/** The children of a ward in the order of their beds, each with its newest weights, in one statement. */
export async function childrenOnWard(tx: Tx, wardId: string): Promise<ChildOnWard[]> {
  const newest = tx
    .select({
      kg: weights.kg,
      method: weights.method,
      at: weights.at,
      needs: weights.needs,
      confirmedAt: weights.confirmedAt,
      secondAt: weights.secondAt,
    })
    .from(weights)
    .where(and(eq(weights.childId, children.id), isNull(weights.supersededBy)))
    .orderBy(desc(weights.at), desc(weights.recordedAt))
    .limit(WEIGHTS_READ)
    .as('newest');
  const rows = await tx
    .select({ child: children, bed: stays.bed, weight: { ...newest._.selectedFields } })
    .from(stays)
    .innerJoin(children, eq(children.id, stays.childId))
    .leftJoinLateral(newest, sql`true`)
    .where(and(eq(stays.wardId, wardId), isNull(stays.to)));
  const byChild = new Map<string, ChildOnWard>();
  for (const { child, bed, weight } of rows) {
    const known = byChild.get(child.id) ?? { child, bed, weights: [] };
    if (weight !== null) known.weights.push(weight);
    byChild.set(child.id, known);
  }
  return [...byChild.values()].sort(byBed);
}

const beds = new Intl.Collator('en', { numeric: true });
const byBed = (a: ChildOnWard, b: ChildOnWard): number =>
  beds.compare(a.bed ?? '\uffff', b.bed ?? '\uffff') || beds.compare(a.child.surname, b.child.surname);

/** The weight a list shows: the one an order would take, else the newest, marked as not usable. */
export function presentWeight(
  { child, weights: rows }: ChildOnWard,
  now: Instant,
  zone: string,
  limits: WeightLimits,
): WardRow['weight'] {
  const chart = rows.map((row) => ({ ...row, usable: isUsable(row) }));
  const weight = dosingWeight(chart, childFactsOf(child), now, zone)?.weight ?? chart[0];
  if (weight === undefined) return null;
  const { isNewborn } = ageOf(child, now, zone);
  return {
    kg: decimalText(weight.kg, 3),
    method: weight.method,
    at: toRfc3339(weight.at),
    usable: weight.usable,
    stale: staleText(weight, now, isNewborn, limits),
  };
}

/** Senior matters of these children: which wait for this person to decide, and which to countersign. */
export async function mattersFor(tx: Tx, actor: Actor, childIds: readonly string[], mayDecide: boolean) {
  if (childIds.length === 0) return { asked: [], toCountersign: [] };
  const asked = and(
    eq(exceptions.state, 'asked'),
    ne(exceptions.authorId, actor.id),
    mayDecide ? or(isNull(exceptions.askedOf), eq(exceptions.askedOf, actor.id)) : sql`false`,
  );
  const owed = and(
    eq(exceptions.by, actor.id),
    isNotNull(exceptions.countersignDueAt),
    isNull(exceptions.countersignedAt),
    eq(exceptions.state, 'granted'),
  );
  const rows = await tx
    .select({ versionId: exceptions.versionId, childId: orderVersions.childId, by: exceptions.by })
    .from(exceptions)
    .innerJoin(orderVersions, eq(orderVersions.id, exceptions.versionId))
    .where(and(inArray(orderVersions.childId, [...childIds]), or(asked, owed)));
  return {
    asked: rows.filter(({ by }) => by === null),
    toCountersign: rows.filter(({ by }) => by === actor.id),
  };
}
