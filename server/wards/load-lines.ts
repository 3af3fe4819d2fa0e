import type { Actor } from '@shared/accounts/actor';
import { maySee } from '@shared/orders/coverage';
import type { VersionState } from '@shared/orders/states';
import { isDraft, isOverdue } from '@shared/orders/states';
import type { OrderLine } from '@shared/routes/children';
import { toRfc3339, type Instant } from '@shared/time';
import { and, asc, eq, gt, inArray, or, sql, type SQL } from 'drizzle-orm';
import { accounts } from '../db/schema/accounts';
import { coveredIsLive, coveredVersions } from '../db/schema/covered-versions';
import { orderVersions } from '../db/schema/orders';
import type { Tx } from '../db/transaction';
import { nextDue, presentOpen, type LineClock } from '../orders/present-line';

/** What the reader is to a version, told without naming its author. */
export type LineStanding = {
  viewerIsAuthor: boolean;
  everSignedByChecker: boolean;
  wasGiven: boolean;
  viewerCheck: string | null;
  viewerLockedIn: boolean;
  viewerDecided: boolean;
  viewerGranted: boolean;
  viewerSaw: boolean;
  heldByOther: boolean;
};

const mine = (table: string, rest: SQL): SQL<boolean> => sql<boolean>`exists (
  select 1 from ${sql.identifier(table)} t
  where t.hospital_id = ${coveredVersions.hospitalId} and t.version_id = ${coveredVersions.versionId} and ${rest})`;

/** Never a figure, fluid, weight or name: only whether. */
const standingColumns = (me: string, now: Instant) => {
  const at = new Date(now).toISOString();
  return {
    viewerIsAuthor: sql<boolean>`${orderVersions.authorId} = ${me}::uuid`,
    everSignedByChecker: sql<boolean>`${orderVersions.checkedAt} is not null`,
    wasGiven: sql<boolean>`${orderVersions.givenAt} is not null`,
    viewerCheck: sql<string | null>`(
      select t.state from checks t
      where t.hospital_id = ${coveredVersions.hospitalId} and t.version_id = ${coveredVersions.versionId}
        and t.checker_id = ${me}::uuid)`,
    viewerLockedIn: mine(
      'checks',
      sql`t.checker_id = ${me}::uuid and t.state in ('locked-agreed', 'agreed', 'differed', 'slip')`,
    ),
    viewerGranted: mine('exceptions', sql`t.by_id = ${me}::uuid`),
    viewerDecided: sql<boolean>`(${mine('exceptions', sql`t.by_id = ${me}::uuid`)}
      or ${mine('signatures', sql`t.by_id = ${me}::uuid and t.meaning = 'settlement'`)})`,
    viewerSaw: mine('seen_figures', sql`t.account_id = ${me}::uuid`),
    heldByOther: mine(
      'checks',
      sql`t.checker_id <> ${me}::uuid and t.state = 'locked-agreed' and t.reserved_until >= ${at}::timestamptz`,
    ),
  };
};

const selectCovered = (tx: Tx, me: string, now: Instant, where: SQL | undefined) =>
  tx
    .select({
      childId: coveredVersions.childId,
      orderId: coveredVersions.orderId,
      versionId: coveredVersions.versionId,
      code: coveredVersions.code,
      version: coveredVersions.version,
      kind: coveredVersions.kind,
      state: coveredVersions.state,
      stateSince: coveredVersions.stateSince,
      signedAt: coveredVersions.signedAt,
      checkDueAt: coveredVersions.checkDueAt,
      askedChecker: coveredVersions.askedChecker,
      isHighRisk: coveredVersions.isHighRisk,
      ...standingColumns(me, now),
    })
    .from(coveredVersions)
    .innerJoin(orderVersions, eq(orderVersions.id, coveredVersions.versionId))
    .where(where)
    .orderBy(asc(coveredVersions.code), asc(coveredVersions.version));

export type CoveredLine = Awaited<ReturnType<typeof selectCovered>>[number] & LineStanding;

/** One line and what is known of it on the server; only `line` leaves. */
export type LoadedLine = { row: CoveredLine; isOpen: boolean; line: OrderLine; lapsesAt: Instant | null };

export type LinesOf = {
  childIds: readonly string[];
  /** Ended versions in these states, ended since then, are listed too. */
  ended: { states: readonly VersionState[]; since: Instant };
};

/**
 * The order lines of some children. What is covered to the reader comes from the covered view alone; figures are
 * selected in a second statement, for the open versions by their ids.
 */
export async function loadLines(
  tx: Tx,
  actor: Pick<Actor, 'id'>,
  { childIds, ended }: LinesOf,
  clock: LineClock,
): Promise<LoadedLine[]> {
  if (childIds.length === 0) return [];
  const wanted = and(
    inArray(coveredVersions.childId, [...childIds]),
    or(
      coveredIsLive,
      and(inArray(coveredVersions.state, [...ended.states]), gt(coveredVersions.stateSince, ended.since)),
    ),
  );
  const rows = await selectCovered(tx, actor.id, clock.now, wanted);
  const openIds = rows.filter(maySee).map((row) => row.versionId);
  const opened = await loadOpened(tx, openIds);
  return rows.map((row) => loadedLine(row, opened.get(row.versionId), clock));
}

type Opened = {
  content: string | null;
  startBy: Instant | null;
  lapsesAt: Instant | null;
  endReason: string | null;
  author: string;
};

async function loadOpened(tx: Tx, ids: readonly string[]): Promise<Map<string, Opened>> {
  if (ids.length === 0) return new Map();
  const rows = await tx
    .select({
      id: orderVersions.id,
      content: orderVersions.content,
      startBy: orderVersions.startBy,
      lapsesAt: orderVersions.lapsesAt,
      endReason: orderVersions.endReason,
      author: accounts.name,
    })
    .from(orderVersions)
    .innerJoin(accounts, eq(accounts.id, orderVersions.authorId))
    .where(inArray(orderVersions.id, [...ids]));
  return new Map(rows.map(({ id, ...rest }) => [id, rest]));
}

function loadedLine(row: CoveredLine, opened: Opened | undefined, clock: LineClock): LoadedLine {
  const { startBy = null, lapsesAt = null, endReason = null } = opened ?? {};
  const { state, stateSince, signedAt, checkDueAt } = row;
  const due = nextDue({ state, stateSince, signedAt, checkDueAt, startBy, lapsesAt, endReason }, clock);
  const note = row.viewerIsAuthor && isDraft(state) ? `yours, ${due.note}` : due.note;
  return {
    row,
    isOpen: opened !== undefined,
    lapsesAt,
    line: {
      orderId: row.orderId,
      versionId: row.versionId,
      code: row.code,
      version: row.version,
      kind: row.kind,
      state,
      stateSince: toRfc3339(stateSince),
      isOverdue: isOverdue(state, lapsesAt, clock.now),
      isYours: row.viewerIsAuthor,
      open:
        opened === undefined || opened.content === null ? null : presentOpen(opened.content, opened.author),
      nextDue: { ...due, note },
    },
  };
}
