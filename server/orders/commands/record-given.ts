import type { Actor } from '@shared/accounts/actor';
import type { BolusRoute } from '@shared/calc/types';
import { buildContent } from '@shared/orders/build-content';
import { rulebookOf } from '@shared/orders/chart-facts';
import { columnsOf } from '@shared/orders/content-columns';
import { emptyOrderForm, type OrderForm } from '@shared/orders/form';
import { proposeForm } from '@shared/orders/propose-form';
import { isIncomplete, isWorkedOut, workOutDraft, type WorkedOutDraft } from '@shared/orders/work-out-draft';
import { limitSentences } from '@shared/orders/words';
import { formatVolume } from '@shared/rounding';
import type { DraftContext } from '@shared/routes/orders';
import { ruleValues } from '@shared/rulebook/read';
import {
  DAY,
  formatTime,
  instant,
  localDateTimeToInstant,
  MINUTE,
  toRfc3339,
  type Instant,
} from '@shared/time';
import { millilitres } from '@shared/units';
import { findChild } from '../../children/find-child';
import { done, refused, type NearMiss, type Outcome, type Refused } from '../../db/outcome';
import { exceptions } from '../../db/schema/checks';
import { orders, orderVersions } from '../../db/schema/orders';
import type { Tx } from '../../db/transaction';
import { findWard, loadFacts } from '../facts';
import { findCheckers, findColleagues } from '../find-checkers';
import { hashContent, type HashedContent } from '../hash-content';
import { loadContext } from '../load-context';
import { noteOf } from '../lock-version';
import { mailTo } from '../mails';
import { sign } from '../sign-row';
import { makeCode } from './make-code';

export type RecordGiven = {
  childId: string;
  kind: 'bolus';
  weightId: string | null;
  productId: string;
  volumeMl: string;
  overMinutes: string;
  route: BolusRoute;
  givenAt: string;
  onWordOfId: string;
  reason: string;
};
export type RecordedGiven = { versionId: string; code: string; words: string };

/**
 * Writes down a bolus that was given in an emergency, on whose word, counted at once in every total. Brims on volume
 * and fluid hold; whatever a senior would have been asked falls due afterwards, and so does the countersignature.
 */
export async function recordGiven(
  tx: Tx,
  now: Instant,
  actor: Actor,
  given: RecordGiven,
): Promise<Outcome<RecordedGiven>> {
  const { childId } = given;
  const found = await findChild(tx, actor, 'record-given', childId, { lock: true });
  if (!found.ok) return found;
  const loaded = await loadContext(tx, { hospitalId: actor.hospitalId, childId, except: [] }, now);
  if (loaded === null) return refused('not-found');
  const at = readGivenAt(given.givenAt, loaded.context.zone, now);
  if (typeof at === 'string') return wrongField('givenAt', at);
  const onWordOf = await findPrescriber(tx, childId, given.onWordOfId);
  if (onWordOf === undefined)
    return wrongField('onWordOfId', 'Name the prescriber of this ward who said so.');
  // the chart as it counts at the moment of giving
  const context = { ...loaded.context, now: toRfc3339(at) };
  const work = workOutDraft(givenForm(given, context, onWordOf), context);
  if (!isWorkedOut(work)) return unfinished(work);
  if (work.brims.length > 0) return overTheBrim(work, childId);
  return write(tx, now, actor, { given, at, context, work });
}

function readGivenAt(text: string, zone: string, now: Instant): Instant | string {
  const reading = localDateTimeToInstant(text, zone);
  if (!reading.ok) return reading.message;
  if (reading.instant > now + MINUTE) return 'This lies ahead: write down what has been given.';
  return reading.instant < now - DAY ? 'More than a day ago: chart it as given elsewhere.' : reading.instant;
}

const wrongField = (field: string, detail: string): Refused =>
  refused('bad-input', { detail, errors: [{ pointer: `/${field}`, detail }] });

/** Who said so: a prescriber of the ward, the one who writes it down included. */
async function findPrescriber(tx: Tx, childId: string, accountId: string): Promise<string | undefined> {
  const ward = await findWard(tx, childId);
  const colleagues = ward === null ? [] : await findColleagues(tx, ward.id);
  return colleagues.find(({ id, roles }) => id === accountId && roles.includes('prescriber'))?.name;
}

function givenForm(given: RecordGiven, context: DraftContext, onWordOf: string): OrderForm {
  const proposed = proposeForm('bolus', context);
  return {
    ...emptyOrderForm('bolus'),
    reason: given.reason,
    weightId: given.weightId ?? proposed.weightId,
    doseBy: 'volume',
    volumeMl: given.volumeMl,
    overMinutes: given.overMinutes,
    route: given.route,
    productId: given.productId,
    advisedBy: onWordOf,
    // the careful reading: a peripheral line has the stricter limits
    line: 'peripheral',
    plannedStart: given.givenAt,
    urgency: 'emergency',
  };
}

const NO_WEIGHT = 'Record a weight first: an estimate by age will do.';

function unfinished(work: Exclude<ReturnType<typeof workOutDraft>, WorkedOutDraft>): Refused {
  if (!isIncomplete(work)) return refused('cannot-work-out', { detail: work.detail });
  const errors = Object.entries(work.fields).map(([field, detail]) => ({
    pointer: field === 'plannedStart' ? '/givenAt' : `/${field}`,
    detail: field === 'weightId' && work.missing.includes('weightId') ? NO_WEIGHT : detail,
  }));
  return refused('bad-input', { detail: 'Some entries need another look.', errors });
}

function overTheBrim(work: WorkedOutDraft, childId: string): Refused {
  const nearMisses = work.brims.map(({ code, title }): NearMiss => ({
    class: 'brim',
    limitCode: code,
    childId,
    kind: 'bolus',
    detail: title,
    dedupe: `given:${childId}:${code}:${work.request.at}`,
  }));
  return refused('over-the-brim', {
    detail: limitSentences(work.brims),
    data: { limits: work.brims.map(({ code, title, text }) => ({ code, title, text })) },
    nearMisses,
    entries: [{ act: 'given-recorded', subject: { kind: 'child', id: childId }, child: childId }],
  });
}

type Writing = { given: RecordGiven; at: Instant; context: DraftContext; work: WorkedOutDraft };

async function write(tx: Tx, now: Instant, actor: Actor, writing: Writing): Promise<Outcome<RecordedGiven>> {
  const { given, context, work } = writing;
  const code = await makeCode(tx, now, context.zone);
  const hashed = givenContent(code, writing);
  const { countersignMinutes } = ruleValues(rulebookOf(context), 'check');
  const dueAt = instant(Math.round(now + countersignMinutes * MINUTE));
  const versionId = await insertGiven(tx, now, actor, { ...writing, code, hashed, dueAt });
  await sign(tx, actor, now, { versionId, meaning: 'author', contentSha256: hashed.sha256 });
  await askAfterwards(tx, now, actor, { versionId, work, dueAt, sha256: hashed.sha256 });
  const held = await loadFacts(tx, actor, versionId, now);
  if (held === null || held.ward === null) throw new Error('the version just written is gone');
  const checkers = await findCheckers(tx, { ...held.row, versionId, wardId: held.ward.id });
  const mails = checkers.map(({ id }) => mailTo('countersign-asked', id, held, dueAt));
  const volume = formatVolume(millilitres(Number(hashed.content.figures.volumeMl)));
  const words = `Written down and counted: ${volume}\u00a0mL of ${hashed.content.fluid.name}. A countersignature is due by ${formatTime(dueAt, context.zone)}.`;
  const entry = noteOf('given-recorded', held, { to: 'given', reason: given.reason });
  return done({ versionId, code, words }, { entries: [entry], mails });
}

function givenContent(code: string, { context, work }: Writing): HashedContent {
  return hashContent(
    buildContent({
      code,
      version: 1,
      form: { limitReasons: {} },
      request: work.request,
      extras: work.extras,
      workOut: work.workOut,
      context,
      rulebook: rulebookOf(context),
    }),
  );
}

async function insertGiven(
  tx: Tx,
  now: Instant,
  actor: Actor,
  { given, at, code, hashed, dueAt }: Writing & { code: string; hashed: HashedContent; dueAt: Instant },
): Promise<string> {
  const { childId } = given;
  const [order] = await tx
    .insert(orders)
    .values({ code, childId, kind: 'bolus', madeBy: actor.id, madeAt: now })
    .returning({ id: orders.id });
  const [version] = await tx
    .insert(orderVersions)
    .values({
      ...columnsOf(hashed.content),
      orderId: order?.id ?? '',
      version: 1,
      childId,
      kind: 'bolus',
      state: 'given',
      stateSince: now,
      authorId: actor.id,
      content: hashed.text,
      contentSha256: hashed.sha256,
      signedAt: now,
      givenAt: at,
      checkDueAt: dueAt,
    })
    .returning({ id: orderVersions.id });
  return version?.id ?? '';
}

async function askAfterwards(
  tx: Tx,
  now: Instant,
  actor: Actor,
  of: { versionId: string; work: WorkedOutDraft; dueAt: Instant; sha256: string },
): Promise<void> {
  if (of.work.deferred.length === 0) return;
  await tx.insert(exceptions).values(
    of.work.deferred.map(({ code, text }) => ({
      versionId: of.versionId,
      authorId: actor.id,
      limitCode: code,
      contentSha256: of.sha256,
      state: 'asked' as const,
      askedAt: now,
      askedReason: text,
      countersignDueAt: of.dueAt,
    })),
  );
}
