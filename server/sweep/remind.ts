import { isAwaitingCheck, isConnected, isGiven, isSigned } from '@shared/orders/states';
import type { Rulebook } from '@shared/rulebook/document';
import { ruleValues } from '@shared/rulebook/read';
import type { Instant } from '@shared/time';
import { and, eq, inArray, isNull, lt } from 'drizzle-orm';
import { done, type Mail, type Outcome } from '../db/outcome';
import { exceptions } from '../db/schema/checks';
import { orderVersions } from '../db/schema/orders';
import type { Tx } from '../db/transaction';
import type { LoadedVersion } from '../orders/facts';
import { findCheckers, findColleagues, isSenior } from '../orders/find-checkers';
import { noteOf } from '../orders/lock-version';
import { mailTo } from '../orders/mails';
import { LAPSING_MS } from './find-due';

const NOTHING = done(null);

/** How many of the four reminders are due: checker, second checker, senior, author, by share of the time that passed. */
export function stageDue(signedAt: number, dueAt: number, now: number, rulebook: Rulebook): number {
  const { remindAt, secondAt, seniorAt, telephoneAt } = ruleValues(rulebook, 'check');
  const percent = ((now - signedAt) / (dueAt - signedAt)) * 100;
  return [remindAt, secondAt, seniorAt, telephoneAt].filter((at) => percent >= at).length;
}

/** Sends the reminders of a waiting check that have fallen due, each once. */
export async function remind(
  tx: Tx,
  held: LoadedVersion,
  now: Instant,
  rulebook: Rulebook,
): Promise<Outcome<null>> {
  const { row } = held;
  if (!isAwaitingCheck(row.state) || row.signedAt === null || row.checkDueAt === null) return NOTHING;
  const stage = await stageOf(tx, row.id);
  const due = stageDue(row.signedAt, row.checkDueAt, now, rulebook);
  if (due <= stage) return NOTHING;
  const people = await peopleOf(tx, held);
  const mails: Mail[] = [];
  const entries = [];
  for (let next = stage + 1; next <= due; next++) {
    mails.push(...mailsAt(next, held, people));
    entries.push(noteOf(next === 1 ? 'reminder-sent' : 'escalated', held, { to: next }));
  }
  await tx.update(orderVersions).set({ reminderStage: due }).where(eq(orderVersions.id, row.id));
  return done(null, { mails, entries });
}

async function stageOf(tx: Tx, versionId: string): Promise<number> {
  const [row] = await tx
    .select({ stage: orderVersions.reminderStage })
    .from(orderVersions)
    .where(eq(orderVersions.id, versionId));
  return row?.stage ?? 0;
}

type People = { named: string | null; checkers: string[]; seniors: string[] };

async function peopleOf(tx: Tx, { row, ward }: LoadedVersion): Promise<People> {
  if (ward === null) return { named: row.askedChecker, checkers: [], seniors: [] };
  const checkers = await findCheckers(tx, { ...row, versionId: row.id, wardId: ward.id });
  const colleagues = await findColleagues(tx, ward.id);
  return {
    named: row.askedChecker,
    checkers: checkers.map(({ id }) => id),
    seniors: colleagues
      .filter((colleague) => isSenior(colleague) && colleague.id !== row.authorId)
      .map(({ id }) => id),
  };
}

/** Who is told at each of the four stages. */
function mailsAt(stage: number, held: LoadedVersion, { named, checkers, seniors }: People): Mail[] {
  const { checkDueAt, authorId } = held.row;
  const to = (kind: Parameters<typeof mailTo>[0], ids: readonly string[]) =>
    ids.map((id) => mailTo(kind, id, held, checkDueAt));
  switch (stage) {
    case 1:
      return to('check-reminder', named === null ? checkers : [named]);
    case 2:
      // asked of everyone at first: the second is then one of those who know
      return to('check-second', checkers.filter((id) => id !== named).slice(0, 1));
    case 3:
      return to('check-senior', seniors);
    default:
      return to('check-author', [authorId]);
  }
}

/** Tells the author once that an order soon lapses, started or not. */
export async function tellLapsing(tx: Tx, held: LoadedVersion, now: Instant): Promise<Outcome<null>> {
  const { row } = held;
  const end = isSigned(row.state) ? row.startBy : isConnected(row.state) ? row.lapsesAt : null;
  if (end === null || end >= now + LAPSING_MS) return NOTHING;
  await tx.update(orderVersions).set({ lapsingToldAt: now }).where(eq(orderVersions.id, row.id));
  return done(null, { mails: [mailTo('order-lapsing', row.authorId, held, end)] });
}

/** Calls the seniors once for what was given and is not countersigned in time. */
export async function callForGiven(tx: Tx, held: LoadedVersion, now: Instant): Promise<Outcome<null>> {
  const { row } = held;
  if (!isGiven(row.state) || row.checkDueAt === null || now <= row.checkDueAt) return NOTHING;
  const { seniors } = await peopleOf(tx, held);
  await tx.update(orderVersions).set({ reminderStage: 4 }).where(eq(orderVersions.id, row.id));
  return done(null, {
    mails: seniors.map((id) => mailTo('countersign-asked', id, held, row.checkDueAt)),
    entries: [noteOf('escalated', held)],
  });
}

/** Calls once for a senior's countersignature that is overdue: the one named, else every senior of the ward. */
export async function callForExceptions(tx: Tx, held: LoadedVersion, now: Instant): Promise<Outcome<null>> {
  const overdue = await tx
    .update(exceptions)
    .set({ overdueToldAt: now })
    .where(
      and(
        eq(exceptions.versionId, held.row.id),
        inArray(exceptions.state, ['asked', 'granted']),
        lt(exceptions.countersignDueAt, now),
        isNull(exceptions.countersignedAt),
        isNull(exceptions.overdueToldAt),
      ),
    )
    .returning({ by: exceptions.by, dueAt: exceptions.countersignDueAt });
  const [first] = overdue;
  if (first === undefined) return NOTHING;
  const { seniors } = await peopleOf(tx, held);
  const called = new Set(overdue.flatMap(({ by }) => (by === null ? seniors : [by])));
  return done(null, {
    mails: [...called].map((id) => mailTo('exception-countersign', id, held, first.dueAt)),
    entries: [noteOf('escalated', held)],
  });
}
