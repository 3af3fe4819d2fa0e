import { coveredLimitWords } from '@shared/orders/limit-words';
import type { Draft } from '@shared/routes/orders';
import { toRfc3339, type Instant } from '@shared/time';
import { asc, eq, sql } from 'drizzle-orm';
import { accounts } from '../db/schema/accounts';
import { exceptions } from '../db/schema/checks';
import { statement } from '../db/statement';
import type { Tx } from '../db/transaction';

export type PresentedException = Draft['exceptions'][number];
type Titled = readonly { code: string; title: string }[];

const orNull = (at: Instant | null): string | null => (at === null ? null : toRfc3339(at));

const exceptionsOf = statement((tx) =>
  tx
    .select({ exception: exceptions, by: accounts.name })
    .from(exceptions)
    .leftJoin(accounts, eq(accounts.id, exceptions.by))
    .where(eq(exceptions.versionId, sql.placeholder('versionId')))
    .orderBy(asc(exceptions.askedAt), asc(exceptions.limitCode)),
);

/** Every exception of a version for someone who may see it; `limits` lends each its title. */
export async function loadExceptions(
  tx: Tx,
  versionId: string,
  limits: Titled,
): Promise<PresentedException[]> {
  const rows = await exceptionsOf(tx, { versionId });
  return rows.map(({ exception, by }) => ({
    id: exception.id,
    limitCode: exception.limitCode,
    title:
      limits.find(({ code }) => code === exception.limitCode)?.title ??
      coveredLimitWords(exception.limitCode),
    state: exception.state,
    by,
    how: exception.how,
    reason: exception.reason ?? exception.askedReason ?? '',
    countersignDueAt: orNull(exception.countersignDueAt),
    countersignedAt: orNull(exception.countersignedAt),
  }));
}
