import type { Actor } from '@shared/accounts/actor';
import type { LimitFinding } from '@shared/calc/types';
import { rulebookOf } from '@shared/orders/chart-facts';
import { ruleValues } from '@shared/rulebook/read';
import { HOUR, instant, type Instant } from '@shared/time';
import { and, eq, inArray } from 'drizzle-orm';
import { done, refused, type Outcome, type Refused } from '../db/outcome';
import { exceptions } from '../db/schema/checks';
import type { Tx } from '../db/transaction';
import { judgeAsking, seniorMatters } from '../orders/commands/judge-signing';
import type { LoadedVersion } from '../orders/facts';
import { findColleagues, isSenior, type Colleague } from '../orders/find-checkers';
import { holdFor, noteOf } from '../orders/lock-version';
import { mailTo } from '../orders/mails';
import { noteSeen } from '../orders/note-seen';
import type { VersionWork } from '../orders/work-out-version';
import { voidExceptions } from './void-exceptions';
import { workOutAsked } from './would-be';

type WorkedOut = Extract<VersionWork, { ok: true }>;
type Asking = { held: LoadedVersion; worked: WorkedOut; matters: LimitFinding[]; people: Colleague[] };
type Prepared = ({ ok: true } & Asking) | { ok: false; refusal: Refused };

export type AskException = { versionId: string; rev: number; seniorId: string | null; reason: string };
export type TelephoneException = {
  versionId: string;
  rev: number;
  seniorId: string;
  heardById: string;
  reason: string;
};

const NOT_SENIOR = 'That person is no senior of this ward, or had a part in this order.';
const NOT_COLLEAGUE = 'Name another clinician of the ward, who heard it read back.';

/** Puts a draft's senior matters to one senior by name, or to every senior of the ward. */
export async function askException(
  tx: Tx,
  now: Instant,
  actor: Actor,
  { versionId, rev, seniorId, reason }: AskException,
): Promise<Outcome<{ ok: true }>> {
  const prepared = await prepare(tx, now, actor, { versionId, rev, entry: 'exception-asked' });
  if (!prepared.ok) return prepared.refusal;
  const { held, worked, matters, people } = prepared;
  const seniors = people.filter((person) => isSenior(person) && person.id !== actor.id);
  const asked = seniorId === null ? seniors : seniors.filter(({ id }) => id === seniorId);
  if (asked.length === 0) return unfit('/seniorId', NOT_SENIOR);
  await reset(tx, prepared);
  await tx.insert(exceptions).values(
    matters.map(({ code }) => ({
      ...ofMatter(prepared, code),
      state: 'asked' as const,
      askedAt: now,
      askedReason: reason,
      askedOf: seniorId,
    })),
  );
  const row = { ...held.row, urgency: worked.work.extras.urgency };
  const mails = asked.map(({ id }) => mailTo('exception-asked', id, { ...held, row }));
  return done({ ok: true }, { entries: [noteOf('exception-asked', held, { reason })], mails });
}

/**
 * Writes down what a senior agreed to by telephone: the senior named, read back to a second person, countersigned
 * within the rulebook's hours.
 */
export async function telephoneException(
  tx: Tx,
  now: Instant,
  actor: Actor,
  { versionId, rev, seniorId, heardById, reason }: TelephoneException,
): Promise<Outcome<{ ok: true }>> {
  const prepared = await prepare(tx, now, actor, { versionId, rev, entry: 'exception-granted' });
  if (!prepared.ok) return prepared.refusal;
  const { held, worked, matters, people } = prepared;
  const senior = people.find(({ id }) => id === seniorId);
  if (senior === undefined || senior.id === actor.id || !isSenior(senior)) {
    return unfit('/seniorId', NOT_SENIOR);
  }
  const heardBy = people.find(({ id }) => id === heardById);
  if (heardBy === undefined || heardBy.id === actor.id || heardBy.id === seniorId) {
    return unfit('/heardById', NOT_COLLEAGUE);
  }
  await reset(tx, prepared);
  const { telephoneHours } = ruleValues(rulebookOf(worked.context), 'check');
  const dueAt = instant(Math.round(now + telephoneHours * HOUR));
  await tx.insert(exceptions).values(
    matters.map(({ code }) => ({
      ...ofMatter(prepared, code),
      state: 'granted' as const,
      askedAt: now,
      askedReason: reason,
      askedOf: seniorId,
      by: seniorId,
      decidedAt: now,
      reason,
      how: 'telephone' as const,
      recordedBy: actor.id,
      readBackTo: heardById,
      countersignDueAt: dueAt,
    })),
  );
  await noteSeen(tx, versionId, seniorId, 'advised', now);
  await noteSeen(tx, versionId, heardById, 'advised', now);
  const entry = noteOf('exception-granted', held, { reason, to: { how: 'telephone', senior: seniorId } });
  return done(
    { ok: true },
    { entries: [entry], mails: [mailTo('exception-countersign', seniorId, held, dueAt)] },
  );
}

const unfit = (pointer: string, detail: string) =>
  refused('bad-input', { detail, errors: [{ pointer, detail }] });

/** Holds the draft, works it out, and finds what a senior has to agree to. */
async function prepare(
  tx: Tx,
  now: Instant,
  actor: Actor,
  of: { versionId: string; rev: number; entry: 'exception-asked' | 'exception-granted' },
): Promise<Prepared> {
  const found = await holdFor(
    tx,
    { act: 'ask-exception', actor, versionId: of.versionId, entry: of.entry },
    now,
  );
  if (!found.ok) return found;
  const { held } = found;
  const asked = await workOutAsked(tx, held, actor, now, of.rev);
  if (!asked.ok) return asked;
  const refusal = judgeAsking(asked.worked, held);
  if (refusal) return { ok: false, refusal };
  const people = held.ward === null ? [] : await findColleagues(tx, held.ward.id);
  return { ok: true, held, worked: asked.worked, matters: seniorMatters(asked.worked), people };
}

/** Earlier answers to other content are void, and so is an earlier question about the same. */
async function reset(tx: Tx, { held, worked, matters }: Asking): Promise<void> {
  await voidExceptions(tx, held.row.id, worked.wouldBe.sha256);
  const codes = matters.map(({ code }) => code);
  await tx
    .update(exceptions)
    .set({ state: 'void' })
    .where(
      and(
        eq(exceptions.versionId, held.row.id),
        inArray(exceptions.state, ['asked', 'granted']),
        inArray(exceptions.limitCode, codes),
      ),
    );
}

const ofMatter = ({ held, worked }: Asking, code: string) => ({
  versionId: held.row.id,
  authorId: held.row.authorId,
  limitCode: code,
  contentSha256: worked.wouldBe.sha256,
});
