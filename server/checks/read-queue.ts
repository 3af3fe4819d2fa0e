import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import { toRfc3339 } from '@shared/time';
import { and, eq, inArray, isNotNull, isNull } from 'drizzle-orm';
import { accounts, memberships } from '../db/schema/accounts';
import { exceptions, seenFigures } from '../db/schema/checks';
import { orderVersions } from '../db/schema/orders';
import type { Tx } from '../db/transaction';
import { mayCheck } from '../orders/find-checkers';
import { loadZone } from '../orders/load-context';
import { factsOf, presentQueueRow } from './present';
import { selectQueue, type QueueRow } from './queries';

const URGENCY_FIRST = { emergency: 0, urgent: 1, routine: 2 } as const;

/** What waits for a check, the most urgent first, each line as its reader may see it. */
export async function readQueue(tx: Tx, actor: Actor, now: Instant) {
  const rows = (await selectQueue(tx, actor, now)).filter(({ isAuthor }) => !isAuthor);
  const zone = await loadZone(tx, actor.hospitalId);
  const others = await withAnotherChecker(
    tx,
    actor,
    rows.filter(({ sawAt }) => sawAt !== null),
  );
  const lines = rows.map((row) =>
    presentQueueRow(row, factsOf(row, others.has(row.versionId)), { actor, now, zone }),
  );
  // the query's order, by due time, stands within one urgency
  return {
    rows: lines.sort((a, b) => URGENCY_FIRST[a.urgency] - URGENCY_FIRST[b.urgency]),
    now: toRfc3339(now),
  };
}

type Pair = { key: string; accountId: string };

/** Versions that somebody else on the ward could check. Asked only for those whose figures the reader has seen. */
async function withAnotherChecker(tx: Tx, actor: Actor, rows: readonly QueueRow[]): Promise<Set<string>> {
  if (rows.length === 0) return new Set();
  const colleagues = await colleaguesOn(tx, [...new Set(rows.map(({ wardId }) => wardId))]);
  const barred = await barredPairs(tx, rows);
  const isBarred = (row: QueueRow, accountId: string) =>
    barred.some(
      (pair) => pair.accountId === accountId && (pair.key === row.orderId || pair.key === row.versionId),
    );
  const free = rows.filter((row) =>
    colleagues.some(
      (other) =>
        other.wardId === row.wardId &&
        other.id !== actor.id &&
        mayCheck(other, row.isHighRisk) &&
        !isBarred(row, other.id),
    ),
  );
  return new Set(free.map(({ versionId }) => versionId));
}

const colleaguesOn = (tx: Tx, wardIds: string[]) =>
  tx
    .select({
      id: accounts.id,
      name: accounts.name,
      title: accounts.title,
      roles: accounts.roles,
      entitlements: memberships.entitlements,
      wardId: memberships.wardId,
    })
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(
      and(
        inArray(memberships.wardId, wardIds),
        isNull(accounts.deactivatedAt),
        isNotNull(accounts.registrationNumber),
      ),
    );

/** Who saw, wrote or granted: by order, or by version for a granter. */
async function barredPairs(tx: Tx, rows: readonly QueueRow[]): Promise<Pair[]> {
  const orderIds = rows.map(({ orderId }) => orderId);
  const saw = await tx
    .selectDistinct({ key: orderVersions.orderId, accountId: seenFigures.accountId })
    .from(seenFigures)
    .innerJoin(orderVersions, eq(orderVersions.id, seenFigures.versionId))
    .where(inArray(orderVersions.orderId, orderIds));
  const wrote = await tx
    .selectDistinct({ key: orderVersions.orderId, accountId: orderVersions.authorId })
    .from(orderVersions)
    .where(inArray(orderVersions.orderId, orderIds));
  const granted = await tx
    .selectDistinct({ key: exceptions.versionId, accountId: exceptions.by })
    .from(exceptions)
    .where(
      and(
        inArray(
          exceptions.versionId,
          rows.map(({ versionId }) => versionId),
        ),
        isNotNull(exceptions.by),
      ),
    );
  return [...saw, ...wrote, ...granted.map(({ key, accountId }) => ({ key, accountId: accountId ?? '' }))];
}
