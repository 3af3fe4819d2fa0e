import type { Actor } from '@shared/accounts/actor';
import type { Kind } from '@shared/calc/types';
import type { Urgency } from '@shared/orders/form';
import type { VersionState } from '@shared/orders/states';
import type { Instant } from '@shared/time';
import { and, asc, eq, inArray, isNull, ne, or, sql, type SQL } from 'drizzle-orm';
import { checks, exceptions, seenFigures } from '../db/schema/checks';
import { children, stays } from '../db/schema/children';
import { coveredIsLive, coveredVersions } from '../db/schema/covered-versions';
import { wards } from '../db/schema/hospitals';
import { orderVersions } from '../db/schema/orders';
import type { Tx } from '../db/transaction';

/** What anyone may read of an order: from the view that has no author, figure, fluid or weight. */
export const COVERED = {
  versionId: coveredVersions.versionId,
  orderId: coveredVersions.orderId,
  code: coveredVersions.code,
  version: coveredVersions.version,
  childId: coveredVersions.childId,
  kind: coveredVersions.kind,
  urgency: coveredVersions.urgency,
  state: coveredVersions.state,
  reason: coveredVersions.reason,
  askedStart: coveredVersions.askedStart,
  askedChecker: coveredVersions.askedChecker,
  signedAt: coveredVersions.signedAt,
  checkDueAt: coveredVersions.checkDueAt,
  isHighRisk: coveredVersions.isHighRisk,
} as const;

export type CoveredRow = {
  versionId: string;
  orderId: string;
  code: string;
  version: number;
  childId: string;
  kind: Kind;
  urgency: Urgency;
  state: VersionState;
  reason: string | null;
  askedStart: Instant | null;
  askedChecker: string | null;
  signedAt: Instant | null;
  checkDueAt: Instant | null;
  isHighRisk: boolean;
};

/** One covered order; undefined where there is none. */
export async function findCovered(tx: Tx, versionId: string): Promise<CoveredRow | undefined> {
  const [row] = await tx
    .select(COVERED)
    .from(coveredVersions)
    .where(eq(coveredVersions.versionId, versionId));
  return row;
}

const QUEUED: readonly VersionState[] = ['awaiting-check', 'given', 'disputed'];

/** Live orders that wait for one who checks, and disputes of the reader's own. */
const forChecker = (actor: Actor): SQL | undefined =>
  and(
    coveredIsLive,
    inArray(coveredVersions.state, [...QUEUED]),
    or(
      ne(coveredVersions.state, 'disputed'),
      and(eq(checks.checkerId, actor.id), eq(checks.state, 'differed')),
    ),
  );

/** The reader's wards; a lead sees the hospital. */
const onWards = (actor: Actor): SQL | undefined =>
  actor.roles.includes('lead')
    ? undefined
    : inArray(
        stays.wardId,
        actor.wards.map(({ wardId }) => wardId),
      );

/** Facts told relative to the reader; nobody is named. */
function relativeFacts(actor: Actor, now: Instant) {
  const at = new Date(now).toISOString();
  const isAuthor = sql<boolean>`exists (select 1 from ${orderVersions} a where a.hospital_id = ${coveredVersions.hospitalId}
    and a.id = ${coveredVersions.versionId} and a.author_id = ${actor.id})`;
  const isGranter = sql<boolean>`exists (select 1 from ${exceptions} e where e.hospital_id = ${coveredVersions.hospitalId}
    and e.version_id = ${coveredVersions.versionId} and e.by_id = ${actor.id})`;
  const heldByOther = sql<boolean>`exists (select 1 from ${checks} c where c.hospital_id = ${coveredVersions.hospitalId}
    and c.version_id = ${coveredVersions.versionId} and c.checker_id <> ${actor.id}
    and c.state = 'locked-agreed' and c.reserved_until >= ${at}::timestamptz)`;
  const slippedBefore = sql<boolean>`exists (select 1 from ${checks} c where c.hospital_id = ${coveredVersions.hospitalId}
    and c.version_id = ${coveredVersions.versionId} and c.state = 'slip')`;
  const startBy = sql<string | null>`(select v.start_by::text from ${orderVersions} v
    where v.hospital_id = ${coveredVersions.hospitalId} and v.id = ${coveredVersions.versionId} and v.given_at is null)`;
  // another version of the same order, read or written by the reader, counts as well
  const sawAt = sql<string | null>`(select max(seen.at)::text from (
      select s.at from ${seenFigures} s join ${orderVersions} v on v.hospital_id = s.hospital_id and v.id = s.version_id
      where s.hospital_id = ${coveredVersions.hospitalId} and v.order_id = ${coveredVersions.orderId} and s.account_id = ${actor.id}
      union all
      select v.state_since from ${orderVersions} v where v.hospital_id = ${coveredVersions.hospitalId}
      and v.order_id = ${coveredVersions.orderId} and v.author_id = ${actor.id} and v.id <> ${coveredVersions.versionId}
    ) seen)`;
  return { isAuthor, isGranter, heldByOther, slippedBefore, startBy, sawAt };
}

/** Orders that wait for a check or a countersignature, each with what the reader is to it: one query. */
export const selectQueue = (tx: Tx, actor: Actor, now: Instant) =>
  tx
    .select({
      ...COVERED,
      ...relativeFacts(actor, now),
      checkState: checks.state,
      choicesDiffer: checks.choicesDiffer,
      number: children.number,
      surname: children.surname,
      given: children.given,
      bornOn: children.bornOn,
      bornAt: children.bornAt,
      bed: stays.bed,
      wardId: wards.id,
      wardName: wards.name,
    })
    .from(coveredVersions)
    .innerJoin(children, eq(children.id, coveredVersions.childId))
    .innerJoin(stays, and(eq(stays.childId, children.id), isNull(stays.to)))
    .innerJoin(wards, eq(wards.id, stays.wardId))
    .leftJoin(checks, and(eq(checks.versionId, coveredVersions.versionId), eq(checks.checkerId, actor.id)))
    .where(and(forChecker(actor), onWards(actor)))
    .orderBy(asc(coveredVersions.checkDueAt), asc(coveredVersions.code))
    .limit(200);
export type QueueRow = Awaited<ReturnType<typeof selectQueue>>[number];
