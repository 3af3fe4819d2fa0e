import { isEntitled, type Actor } from '@shared/accounts/actor';
import { coveredLimitWords } from '@shared/orders/limit-words';
import { isDraft } from '@shared/orders/states';
import { toRfc3339 } from '@shared/time';
import { and, asc, eq, inArray, isNotNull, isNull, ne, or } from 'drizzle-orm';
import { checks, exceptions } from '../db/schema/checks';
import { children, stays } from '../db/schema/children';
import { wards } from '../db/schema/hospitals';
import { orders, orderVersions } from '../db/schema/orders';
import type { Tx } from '../db/transaction';

const select = (tx: Tx) =>
  tx
    .select({
      id: exceptions.id,
      versionId: exceptions.versionId,
      limitCode: exceptions.limitCode,
      askedAt: exceptions.askedAt,
      dueAt: exceptions.countersignDueAt,
      by: exceptions.by,
      code: orders.code,
      state: orderVersions.state,
      wardId: wards.id,
      ward: wards.name,
      surname: children.surname,
      given: children.given,
    })
    .from(exceptions)
    .innerJoin(orderVersions, eq(orderVersions.id, exceptions.versionId))
    .innerJoin(orders, eq(orders.id, orderVersions.orderId))
    .innerJoin(children, eq(children.id, orderVersions.childId))
    .innerJoin(stays, and(eq(stays.childId, children.id), isNull(stays.to)))
    .innerJoin(wards, eq(wards.id, stays.wardId));
type Row = Awaited<ReturnType<typeof select>>[number];

const nameOf = ({ surname, given }: Row): string => `${surname}, ${given}`;

/** What waits for this senior, named by child and order only, and what they have to countersign. */
export async function exceptionsFor(tx: Tx, actor: Actor) {
  const open = await select(tx)
    .where(
      and(
        ne(exceptions.authorId, actor.id),
        inArray(exceptions.state, ['asked', 'granted']),
        or(eq(exceptions.state, 'asked'), isNotNull(exceptions.countersignDueAt)),
        isNull(exceptions.countersignedAt),
      ),
    )
    .orderBy(asc(exceptions.askedAt));
  const checkedByYou = await checkedVersions(tx, actor, open);
  const yours = open.filter((row) => !checkedByYou.has(row.versionId));
  const isSenior = (row: Row) => isEntitled(actor, 'senior', row.wardId);
  const asked = yours.filter((row) => row.dueAt === null && isDraft(row.state) && isSenior(row));
  const toCountersign = yours.filter(
    (row) => row.dueAt !== null && (row.by === null ? isSenior(row) : row.by === actor.id),
  );
  return {
    asked: byVersion(asked),
    toCountersign: toCountersign.map((row) => ({
      exceptionId: row.id,
      versionId: row.versionId,
      code: row.code,
      child: nameOf(row),
      title: coveredLimitWords(row.limitCode),
      dueAt: toRfc3339(row.dueAt ?? row.askedAt),
    })),
  };
}

async function checkedVersions(tx: Tx, actor: Actor, rows: readonly Row[]): Promise<Set<string>> {
  if (rows.length === 0) return new Set();
  const ids = [...new Set(rows.map(({ versionId }) => versionId))];
  const checked = await tx
    .select({ id: checks.versionId })
    .from(checks)
    .where(and(eq(checks.checkerId, actor.id), isNotNull(checks.lockedInAt), inArray(checks.versionId, ids)));
  return new Set(checked.map(({ id }) => id));
}

function byVersion(rows: readonly Row[]) {
  const groups = new Map<string, Row[]>();
  for (const row of rows) groups.set(row.versionId, [...(groups.get(row.versionId) ?? []), row]);
  return [...groups.values()].flatMap((group) => {
    const [first] = group;
    if (first === undefined) return [];
    return [
      {
        versionId: first.versionId,
        code: first.code,
        child: nameOf(first),
        ward: first.ward,
        limits: [...new Set(group.map(({ limitCode }) => coveredLimitWords(limitCode)))],
        askedAt: toRfc3339(first.askedAt),
      },
    ];
  });
}
