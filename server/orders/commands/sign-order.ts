import type { Actor } from '@shared/accounts/actor';
import { columnsOf } from '@shared/orders/content-columns';
import { orderFormSchema, type Urgency } from '@shared/orders/form';
import type { VersionState } from '@shared/orders/states';
import { rulebookOf } from '@shared/orders/chart-facts';
import { ruleValues } from '@shared/rulebook/read';
import type { Rulebook } from '@shared/rulebook/document';
import { instant, MINUTE, toRfc3339, type Instant } from '@shared/time';
import { and, eq, isNotNull } from 'drizzle-orm';
import { done, refused, type Mail, type Outcome, type Refused } from '../../db/outcome';
import { exceptions } from '../../db/schema/checks';
import { drafts } from '../../db/schema/orders';
import type { Tx } from '../../db/transaction';
import type { LoadedVersion } from '../facts';
import { findCheckers, findColleagues, mayCheck } from '../find-checkers';
import { holdFor, NO_SUCH_ORDER, noteOf } from '../lock-version';
import { mailTo } from '../mails';
import { moveVersion } from '../move-version';
import { sign } from '../sign-row';
import { workOutVersion, type VersionWork } from '../work-out-version';
import {
  deferredMatters,
  exceptionNeeded,
  judgeFigures,
  refuseUnfinished,
  unagreed,
  type SeenFigures,
} from './judge-signing';
import { draftMoved } from './save-draft';

export type SignOrder = { versionId: string; rev: number; seen: SeenFigures };
export type SignedOrder = { state: VersionState; checkDueAt: string };
type WorkedOut = Extract<VersionWork, { ok: true }>;

/**
 * Fixes a draft by its author's signature and asks for the check. The server works the order out again on the held
 * child; whatever differs from what the author saw signs nothing. The password has been verified before.
 */
export async function signOrder(
  tx: Tx,
  now: Instant,
  actor: Actor,
  { versionId, rev, seen }: SignOrder,
): Promise<Outcome<SignedOrder>> {
  const found = await holdFor(tx, { act: 'sign', actor, versionId, entry: 'order-signed' }, now);
  if (!found.ok) return found.refusal;
  const { held } = found;
  const [draft] = await tx.select().from(drafts).where(eq(drafts.versionId, versionId)).for('update');
  if (draft === undefined) return NO_SUCH_ORDER;
  if (draft.rev !== rev) return noted(draftMoved(draft), held);
  const form = orderFormSchema.parse(draft.form);
  const worked = await workOutVersion(tx, held.row, form, actor.hospitalId, now);
  if (!worked.ok) return noted(refuseUnfinished(worked), held);
  const refusal = await judge(tx, worked, held, seen);
  return refusal ? noted(refusal, held) : fix(tx, now, actor, { held, worked });
}

const noted = (refusal: Refused, held: LoadedVersion): Refused => ({
  ...refusal,
  entries: [noteOf('order-signed', held)],
});

async function judge(
  tx: Tx,
  worked: WorkedOut,
  held: LoadedVersion,
  seen: SeenFigures,
): Promise<Refused | undefined> {
  const refusal = judgeFigures(worked, held, seen);
  if (refusal) return refusal;
  const open = await unagreed(tx, held.row.id, worked);
  if (open.length > 0) return exceptionNeeded(open, held);
  const { checkerId } = worked.work.extras;
  return checkerId === null ? undefined : judgeChecker(tx, worked, held, checkerId);
}

/** The person asked by name must be one who could do it: on the ward, entitled, with no part in the order. */
async function judgeChecker(
  tx: Tx,
  { wouldBe }: WorkedOut,
  { row, ward }: LoadedVersion,
  checkerId: string,
): Promise<Refused | undefined> {
  const colleagues = ward === null ? [] : await findColleagues(tx, ward.id);
  const named = colleagues.find(({ id }) => id === checkerId);
  const granted = await tx
    .select({ by: exceptions.by })
    .from(exceptions)
    .where(and(eq(exceptions.versionId, row.id), isNotNull(exceptions.by)));
  const isFit =
    named !== undefined &&
    named.id !== row.authorId &&
    !granted.some(({ by }) => by === named.id) &&
    mayCheck(named, wouldBe.content.isHighRisk);
  if (isFit) return undefined;
  const detail = wouldBe.content.isHighRisk
    ? 'This high-risk order needs a senior checker or a pharmacist of the ward who had no part in it.'
    : 'That person cannot check this order: choose a checker of the ward who had no part in it.';
  return refused('checker-unfit', { detail, errors: [{ pointer: '/form/checkerId', detail }] });
}

/** The rulebook's time from asking to due. */
export function checkDue(urgency: Urgency, rulebook: Rulebook, now: Instant): Instant {
  const rules = ruleValues(rulebook, 'check');
  const due = { routine: rules.dueRoutine, urgent: rules.dueUrgent, emergency: rules.dueEmergency };
  return instant(Math.round(now + due[urgency] * MINUTE));
}

type Fixing = { held: LoadedVersion; worked: WorkedOut };

async function fix(
  tx: Tx,
  now: Instant,
  actor: Actor,
  { held, worked }: Fixing,
): Promise<Outcome<SignedOrder>> {
  const { content, text, sha256 } = worked.wouldBe;
  const { id: versionId } = held.row;
  const rulebook = rulebookOf(worked.context);
  const checkDueAt = checkDue(content.urgency, rulebook, now);
  await moveVersion(tx, versionId, 'awaiting-check', now, {
    ...columnsOf(content),
    content: text,
    contentSha256: sha256,
    askedChecker: worked.work.extras.checkerId,
    signedAt: now,
    checkDueAt,
  });
  await sign(tx, actor, now, { versionId, meaning: 'author', contentSha256: sha256 });
  await askAfterwards(tx, now, { held, worked });
  const entry = noteOf('order-signed', held, { from: 'draft', to: 'awaiting-check' });
  return done(
    { state: 'awaiting-check', checkDueAt: toRfc3339(checkDueAt) },
    { entries: [entry], mails: await askForCheck(tx, { held, worked }, checkDueAt) },
  );
}

/** An emergency's senior matters: the order goes on, the countersignatures fall due. */
async function askAfterwards(tx: Tx, now: Instant, { held, worked }: Fixing): Promise<void> {
  const matters = deferredMatters(worked);
  if (matters.length === 0) return;
  const { countersignMinutes } = ruleValues(rulebookOf(worked.context), 'check');
  const dueAt = instant(Math.round(now + countersignMinutes * MINUTE));
  await tx.insert(exceptions).values(
    matters.map(({ code, text }) => ({
      versionId: held.row.id,
      authorId: held.row.authorId,
      limitCode: code,
      contentSha256: worked.wouldBe.sha256,
      state: 'asked' as const,
      askedAt: now,
      askedReason: text,
      countersignDueAt: dueAt,
    })),
  );
}

/** One message to the named checker, or to everyone who could check; none in an emergency, which is checked at once. */
async function askForCheck(tx: Tx, { held, worked }: Fixing, dueAt: Instant): Promise<Mail[]> {
  const { content } = worked.wouldBe;
  const { checkerId } = worked.work.extras;
  if (content.urgency === 'emergency' || held.ward === null) return [];
  const row = { ...held.row, urgency: content.urgency };
  const to = (id: string) => mailTo('check-asked', id, { ...held, row }, dueAt);
  if (checkerId !== null) return [to(checkerId)];
  const matter = { ...row, versionId: row.id, wardId: held.ward.id, isHighRisk: content.isHighRisk };
  return (await findCheckers(tx, matter)).map(({ id }) => to(id));
}
