import type { Actor } from '@shared/accounts/actor';
import { isConnected, isDraft } from '@shared/orders/states';
import type { CoverageFacts } from '@shared/orders/coverage';
import type { VersionFacts } from '@shared/orders/decide';
import type { Relation } from '@shared/orders/transitions';
import type { Instant } from '@shared/time';
import { and, eq, isNull, sql } from 'drizzle-orm';
import { checks, exceptions, seenFigures } from '../db/schema/checks';
import { stays } from '../db/schema/children';
import { wards } from '../db/schema/hospitals';
import { orders, orderVersions } from '../db/schema/orders';
import { signatures } from '../db/schema/signatures';
import { statement } from '../db/statement';
import type { Tx } from '../db/transaction';
import { findCheckers } from './find-checkers';

/** Everything about a version but what is covered: no content, no figure, no fluid. */
const UNCOVERED = {
  id: orderVersions.id,
  orderId: orderVersions.orderId,
  version: orderVersions.version,
  childId: orderVersions.childId,
  kind: orderVersions.kind,
  state: orderVersions.state,
  stateSince: orderVersions.stateSince,
  authorId: orderVersions.authorId,
  urgency: orderVersions.urgency,
  reason: orderVersions.reason,
  askedStart: orderVersions.askedStart,
  askedChecker: orderVersions.askedChecker,
  checkDueAt: orderVersions.checkDueAt,
  contentSha256: orderVersions.contentSha256,
  isHighRisk: orderVersions.isHighRisk,
  startBy: orderVersions.startBy,
  lapsesAt: orderVersions.lapsesAt,
  signedAt: orderVersions.signedAt,
  checkedAt: orderVersions.checkedAt,
  givenAt: orderVersions.givenAt,
  endedAt: orderVersions.endedAt,
  endReason: orderVersions.endReason,
  rev: orderVersions.rev,
} as const;

const selectVersion = (tx: Tx) =>
  tx
    .select(UNCOVERED)
    .from(orderVersions)
    .where(eq(orderVersions.id, sql.placeholder('id')));
const versionById = statement(selectVersion);
const heldVersionById = statement((tx) => selectVersion(tx).for('update'));
const codeOfOrder = statement((tx) =>
  tx
    .select({ code: orders.code })
    .from(orders)
    .where(eq(orders.id, sql.placeholder('id'))),
);
const checksOfVersion = statement((tx) =>
  tx
    .select()
    .from(checks)
    .where(eq(checks.versionId, sql.placeholder('versionId'))),
);
export type VersionRow = Awaited<ReturnType<typeof versionById>>[number];
export type CheckRow = typeof checks.$inferSelect;

export type LoadedVersion = {
  /** What deciding needs, told relative to the actor. */
  facts: VersionFacts;
  coverage: CoverageFacts;
  row: VersionRow;
  code: string;
  /** Where the child is now; null after discharge. */
  ward: { id: string; name: string } | null;
  checks: readonly CheckRow[];
};

/** What the version's deciding needs; null where there is no such version. With `lock` its row is held until commit. */
export async function loadFacts(
  tx: Tx,
  actor: Pick<Actor, 'id'>,
  versionId: string,
  now: Instant,
  { lock = false }: { lock?: boolean } = {},
): Promise<LoadedVersion | null> {
  const [row] = await (lock ? heldVersionById : versionById)(tx, { id: versionId });
  if (row === undefined) return null;
  const [order] = await codeOfOrder(tx, { id: row.orderId });
  const ward = await findWard(tx, row.childId);
  const checkRows = await checksOfVersion(tx, { versionId });
  const standing = await loadStanding(tx, actor.id, row, checkRows);
  const facts: VersionFacts = {
    state: row.state,
    wardId: ward?.id ?? '',
    isHighRisk: row.isHighRisk,
    you: standing.you,
    yourCheck: yourCheck(checkRows.find((check) => check.checkerId === actor.id)),
    heldByOther: checkRows.some((check) => check.checkerId !== actor.id && isHeld(check, now)),
    slippedBefore: checkRows.some((check) => statusOf(check) === 'slip'),
    sawFiguresAt: standing.sawFiguresAt,
    anotherCheckerAvailable: false,
    lapsesAt: waitingLapse(row),
  };
  if (facts.sawFiguresAt !== null && ward !== null) {
    const matter = { ...row, versionId, wardId: ward.id };
    const others = await findCheckers(tx, matter);
    facts.anotherCheckerAvailable = others.some((other) => other.id !== actor.id);
  }
  return { facts, coverage: standing.coverage, row, code: order?.code ?? '', ward, checks: checkRows };
}

const wardOfChild = statement((tx) =>
  tx
    .select({ id: wards.id, name: wards.name })
    .from(stays)
    .innerJoin(wards, eq(wards.id, stays.wardId))
    .where(and(eq(stays.childId, sql.placeholder('childId')), isNull(stays.to))),
);

/** The ward of a child's open stay. */
export async function findWard(tx: Tx, childId: string): Promise<{ id: string; name: string } | null> {
  const [ward] = await wardOfChild(tx, { childId });
  return ward ?? null;
}

const statusOf = (check: CheckRow): CheckRow['state'] => check.state;

const LOCKED_IN: readonly CheckRow['state'][] = ['locked-agreed', 'agreed', 'differed', 'slip'];
const isLockedIn = (check: CheckRow): boolean => LOCKED_IN.includes(check.state);

/** Agreed figures hold the check for their reservation. */
const isHeld = (check: CheckRow, now: Instant): boolean =>
  statusOf(check) === 'locked-agreed' && check.reservedUntil !== null && now <= check.reservedUntil;

function yourCheck(check: CheckRow | undefined): VersionFacts['yourCheck'] {
  if (check === undefined) return 'none';
  switch (statusOf(check)) {
    case 'open':
      return 'open';
    // handed on before lock-in: nothing was fixed, so it may come back
    case 'passed-on':
      return 'none';
    case 'locked-agreed':
      return check.choicesDiffer ? 'choices-differ' : 'agreed';
    case 'differed':
      return 'differed';
    default:
      return 'ended';
  }
}

/** Until it runs a version lapses when it can no longer be started; what was given has been given. */
const waitingLapse = (row: VersionRow): Instant | null =>
  isDraft(row.state) || isConnected(row.state) || row.givenAt !== null ? null : row.startBy;

const grantedBy = statement((tx) =>
  tx
    .select({ id: exceptions.id })
    .from(exceptions)
    .where(
      and(
        eq(exceptions.versionId, sql.placeholder('versionId')),
        eq(exceptions.by, sql.placeholder('accountId')),
      ),
    )
    .limit(1),
);
const signedBy = statement((tx) =>
  tx
    .select({ meaning: signatures.meaning })
    .from(signatures)
    .where(
      and(
        eq(signatures.versionId, sql.placeholder('versionId')),
        eq(signatures.by, sql.placeholder('accountId')),
      ),
    ),
);

async function loadStanding(tx: Tx, accountId: string, row: VersionRow, checkRows: readonly CheckRow[]) {
  const [granted] = await grantedBy(tx, { versionId: row.id, accountId });
  const signed = await signedBy(tx, { versionId: row.id, accountId });
  const signedAs = (meaning: string) => signed.some((signature) => signature.meaning === meaning);
  const isAuthor = row.authorId === accountId;
  const hasLockedIn = checkRows.some((check) => check.checkerId === accountId && isLockedIn(check));
  const you: Relation[] = [];
  if (isAuthor) you.push('author');
  if (isAuthor && row.givenAt !== null) you.push('giver');
  if (hasLockedIn) you.push('checker');
  if (granted !== undefined) you.push('granter');
  if (signedAs('pharmacist')) you.push('pharmacist');
  const coverage: CoverageFacts = {
    state: row.state,
    everSignedByChecker: row.checkedAt !== null,
    wasGiven: row.givenAt !== null,
    viewerIsAuthor: isAuthor,
    viewerLockedIn: hasLockedIn,
    viewerDecided: granted !== undefined || signedAs('settlement'),
  };
  return { you, coverage, sawFiguresAt: await lastSeen(tx, accountId, row) };
}

const seenBy = statement((tx) =>
  tx
    .select({ at: seenFigures.at })
    .from(seenFigures)
    .innerJoin(orderVersions, eq(orderVersions.id, seenFigures.versionId))
    .where(
      and(
        eq(orderVersions.orderId, sql.placeholder('orderId')),
        eq(seenFigures.accountId, sql.placeholder('accountId')),
      ),
    ),
);
const writtenBy = statement((tx) =>
  tx
    .select({ id: orderVersions.id, at: orderVersions.stateSince })
    .from(orderVersions)
    .where(
      and(
        eq(orderVersions.orderId, sql.placeholder('orderId')),
        eq(orderVersions.authorId, sql.placeholder('accountId')),
      ),
    ),
);

/** When this person last saw the figures of any version of the order, or signed another version of it themselves. */
async function lastSeen(tx: Tx, accountId: string, row: VersionRow): Promise<Instant | null> {
  const seen = await seenBy(tx, { orderId: row.orderId, accountId });
  const authored = await writtenBy(tx, { orderId: row.orderId, accountId });
  const moments = [...seen, ...authored.filter(({ id }) => id !== row.id)].map(({ at }) => at);
  return moments.length === 0 ? null : (Math.max(...moments) as Instant);
}
