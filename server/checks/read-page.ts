import { isOnWard, type Actor } from '@shared/accounts/actor';
import { isShortForm } from '@shared/checks/entries';
import { checkFormSchema, comparisonSchema, emptyCheckForm } from '@shared/checks/form';
import { maySee } from '@shared/orders/coverage';
import { refuse } from '@shared/orders/decide';
import { isDraft } from '@shared/orders/states';
import type { Act } from '@shared/orders/transitions';
import type { CheckPage } from '@shared/routes/checks';
import { toRfc3339, type Instant } from '@shared/time';
import { and, eq } from 'drizzle-orm';
import { done, refused, type Outcome } from '../db/outcome';
import { accounts } from '../db/schema/accounts';
import { checkDrafts } from '../db/schema/checks';
import type { Tx } from '../db/transaction';
import { loadFacts, type CheckRow, type LoadedVersion } from '../orders/facts';
import { loadContext } from '../orders/load-context';
import { NO_SUCH_ORDER } from '../orders/lock-version';
import { loadContent } from './load-content';
import { planWords, presentActs, presentCovered } from './present';
import { findCovered } from './queries';

const ACTS: readonly Act[] = [
  'lock-in',
  'sign-check',
  'cannot-verify',
  'pass-on',
  'slip',
  'countersign',
  'differ',
];

/**
 * What a checker may read: the covered order, the chart as measured, the shelf, the rulebook, their own unsent
 * figures. The signed content is read only for one who has locked in.
 */
export async function readCheckPage(
  tx: Tx,
  actor: Actor,
  versionId: string,
  now: Instant,
): Promise<Outcome<CheckPage>> {
  const loaded = await loadFacts(tx, actor, versionId, now);
  const covered = await findCovered(tx, versionId);
  if (loaded === null || covered === undefined || isDraft(covered.state) || covered.signedAt === null) {
    return NO_SUCH_ORDER;
  }
  const bar = barFrom(actor, loaded);
  if (bar !== null) return bar;
  const own = loaded.checks.find(({ checkerId }) => checkerId === actor.id);
  const of = { hospitalId: actor.hospitalId, childId: covered.childId, except: [covered.orderId] };
  const chart = await loadContext(tx, of, now);
  if (chart === null) return NO_SUCH_ORDER;
  const { context } = chart;
  const uncovered = own?.figures ? await readUncovered(tx, actor, loaded, own) : null;
  return done({
    order: presentCovered(covered),
    child: context.child,
    state: covered.state,
    weights: context.weights,
    results: context.results,
    bolusesLast24h: context.bolusesLast24h,
    running: context.running.map(({ code, rateMlPerH, fluid }) => ({ code, rateMlPerH, fluid: fluid.name })),
    plan: planWords(context.plan),
    products: context.products,
    rulebook: { number: context.rulebook.number, content: context.rulebook.content },
    isShortForm: isShortForm(covered.kind, covered.urgency),
    hasSeenFigures: loaded.facts.sawFiguresAt !== null && uncovered === null,
    draft: await readDraft(tx, actor, versionId),
    acts: presentActs(ACTS, actor, loaded.facts, now),
    zone: context.zone,
    now: toRfc3339(now),
    uncovered,
  });
}

function barFrom(actor: Actor, { facts, ward, coverage }: LoadedVersion) {
  if (ward === null || !isOnWard(actor, ward.id)) {
    const { code, words } = refuse('on-ward') as Extract<ReturnType<typeof refuse>, { allowed: false }>;
    return refused(code, { detail: words });
  }
  if (facts.you.includes('author')) {
    const detail = 'This is your own order: another person checks it.';
    return refused('second-person-required', { detail });
  }
  // whoever decided on it knows its figures and has the order's own page
  if (coverage.viewerDecided && maySee(coverage) && !coverage.viewerLockedIn && !coverage.wasGiven) {
    const detail = 'You agreed to or settled this order: another person checks it.';
    return refused('second-person-required', { detail });
  }
  return null;
}

async function readDraft(tx: Tx, actor: Actor, versionId: string): Promise<CheckPage['draft']> {
  const [draft] = await tx
    .select()
    .from(checkDrafts)
    .where(and(eq(checkDrafts.versionId, versionId), eq(checkDrafts.accountId, actor.id)));
  if (draft === undefined) return { rev: 0, form: emptyCheckForm(), savedAt: null };
  return { rev: draft.rev, form: checkFormSchema.parse(draft.form), savedAt: toRfc3339(draft.savedAt) };
}

async function readUncovered(
  tx: Tx,
  actor: Actor,
  { row }: LoadedVersion,
  own: CheckRow,
): Promise<CheckPage['uncovered']> {
  if (own.figures === null || own.comparison === null || own.lockedInAt === null) return null;
  const [author] = await tx
    .select({ name: accounts.name, title: accounts.title })
    .from(accounts)
    .where(eq(accounts.id, row.authorId));
  return {
    lockedInAt: toRfc3339(own.lockedInAt),
    yours: checkFormSchema.parse(JSON.parse(own.figures)),
    content: await loadContent(tx, row.id),
    contentSha256: row.contentSha256 ?? '',
    author: { name: author?.name ?? '', title: author?.title ?? '' },
    checkerName: actor.name,
    comparison: comparisonSchema.parse(JSON.parse(own.comparison)),
    signBy: own.reservedUntil === null ? null : toRfc3339(own.reservedUntil),
  };
}
