import type { Actor } from '@shared/accounts/actor';
import { isEntitled } from '@shared/accounts/actor';
import { decide, refuse, type Verdict } from '@shared/orders/decide';
import { isDraft } from '@shared/orders/states';
import type { Instant } from '@shared/time';
import { and, eq, inArray } from 'drizzle-orm';
import { done, refused, type Outcome } from '../db/outcome';
import { exceptions } from '../db/schema/checks';
import type { Tx } from '../db/transaction';
import type { LoadedVersion } from '../orders/facts';
import { holdFor, lockVersion, NO_SUCH_ORDER, noteOf, refusalOf } from '../orders/lock-version';
import { mailTo } from '../orders/mails';
import { noteSeen } from '../orders/note-seen';
import { sign } from '../orders/sign-row';
import { loadMatter } from './would-be';

export type DecideException = {
  versionId: string;
  agree: boolean;
  contentSha256: string;
  reason: string;
};

/** A senior's answer to exactly the content that was read; the password has been verified before. */
export async function decideException(
  tx: Tx,
  now: Instant,
  actor: Actor,
  { versionId, agree, contentSha256, reason }: DecideException,
): Promise<Outcome<{ ok: true }>> {
  const act = agree ? 'grant-exception' : 'refuse-exception';
  const entry = agree ? 'exception-granted' : 'exception-refused';
  const found = await holdFor(tx, { act, actor, versionId, entry }, now);
  if (!found.ok) return found.refusal;
  const { held } = found;
  const matter = await loadMatter(tx, held, actor, now);
  if (!matter.ok) return matter.refusal;
  if (matter.sha256 !== contentSha256) return movedOn(held);
  const decided = await tx
    .update(exceptions)
    .set({
      state: agree ? 'granted' : 'refused',
      by: actor.id,
      decidedAt: now,
      reason,
      how: 'here',
    })
    .where(
      and(
        eq(exceptions.versionId, versionId),
        eq(exceptions.state, 'asked'),
        eq(exceptions.contentSha256, contentSha256),
      ),
    )
    .returning({ id: exceptions.id });
  if (decided.length === 0) return movedOn(held);
  if (agree) {
    for (const { id } of decided) {
      const signing = {
        versionId,
        meaning: 'exception',
        contentSha256,
        exceptionId: id,
        note: reason,
      } as const;
      await sign(tx, actor, now, signing);
    }
  }
  await noteSeen(tx, versionId, actor.id, 'exception', now);
  const row = { ...held.row, urgency: matter.content.urgency };
  const mails = [mailTo('exception-decided', row.authorId, { ...held, row })];
  return done({ ok: true }, { entries: [noteOf(entry, held, { reason })], mails });
}

const movedOn = (held: LoadedVersion) =>
  refused('stale', {
    detail: 'The draft has changed since it was put to you: nothing was decided. Open it again.',
    entries: [noteOf('exception-granted', held)],
  });

/** Who may read a senior matter: for a draft by the table, for an emergency's by the same rule without its state. */
function mayOpen(actor: Actor, { facts, row }: LoadedVersion, now: Instant): Verdict {
  if (isDraft(row.state)) return decide('grant-exception', actor, facts, now);
  if (!actor.roles.includes('prescriber') && !actor.roles.includes('lead')) return refuse('role-missing');
  if (facts.you.includes('author') || facts.you.includes('checker')) return refuse('second-person-required');
  if (!isEntitled(actor, 'senior', facts.wardId)) return refuse('entitlement-missing');
  return actor.registrationNumber === null ? refuse('registered') : { allowed: true };
}

/** Opens what a senior is asked about; it is written down, and bars this person from the check. */
export async function openException(
  tx: Tx,
  now: Instant,
  actor: Actor,
  versionId: string,
): Promise<
  Outcome<{
    held: LoadedVersion;
    matter: Extract<Awaited<ReturnType<typeof loadMatter>>, { ok: true }>;
    reason: string;
  }>
> {
  const held = await lockVersion(tx, actor, versionId, now);
  if (held === null) return NO_SUCH_ORDER;
  const refusal = refusalOf(mayOpen(actor, held, now));
  if (refusal) return refusal;
  const asked = await tx
    .select({ sha256: exceptions.contentSha256, reason: exceptions.askedReason })
    .from(exceptions)
    .where(and(eq(exceptions.versionId, versionId), inArray(exceptions.state, ['asked'])));
  const [first] = asked;
  if (first === undefined)
    return refused('conflict', { detail: 'Nothing waits for a senior here any more.' });
  const matter = await loadMatter(tx, held, actor, now);
  if (!matter.ok) return matter.refusal;
  if (first.sha256 !== matter.sha256) return movedOn(held);
  await noteSeen(tx, versionId, actor.id, 'exception', now);
  return done(
    { held, matter, reason: first.reason ?? '' },
    { entries: [noteOf('seen-figures', held, { reason: 'exception' })] },
  );
}

/** States of a senior matter in which nothing is owed any more. */
const OVER: readonly (typeof exceptions.$inferSelect)['state'][] = ['void', 'refused'];

/** The senior's own signature on what was agreed by telephone, or on what an emergency could not wait for. */
export async function countersignException(
  tx: Tx,
  now: Instant,
  actor: Actor,
  exceptionId: string,
): Promise<Outcome<{ ok: true }>> {
  const [found] = await tx
    .select({ versionId: exceptions.versionId })
    .from(exceptions)
    .where(eq(exceptions.id, exceptionId));
  const held = found === undefined ? null : await lockVersion(tx, actor, found.versionId, now);
  if (held === null) return NO_SUCH_ORDER;
  const [row] = await tx.select().from(exceptions).where(eq(exceptions.id, exceptionId)).for('update');
  if (row === undefined || row.countersignDueAt === null) return NO_SUCH_ORDER;
  const entry = noteOf('exception-countersigned', held);
  if (OVER.includes(row.state)) {
    return refused('conflict', {
      detail: 'The order has changed since: nothing is owed here.',
      entries: [entry],
    });
  }
  if (row.countersignedAt !== null) {
    return refused('conflict', { detail: 'This is countersigned already.', entries: [entry] });
  }
  const verdict = row.by === null ? mayCountersign(actor, held) : row.by === actor.id;
  if (!verdict) {
    return refused('own-check', { detail: 'Another senior has to countersign this.', entries: [entry] });
  }
  await tx
    .update(exceptions)
    .set({
      countersignedAt: now,
      countersignedBy: actor.id,
      ...(row.by === null && {
        state: 'granted' as const,
        by: actor.id,
        decidedAt: now,
        how: 'here' as const,
        reason: 'Countersigned afterwards: the emergency did not wait.',
      }),
    })
    .where(eq(exceptions.id, exceptionId));
  const { versionId, contentSha256 } = row;
  await sign(tx, actor, now, { versionId, meaning: 'countersignature', contentSha256, exceptionId });
  return done({ ok: true }, { entries: [entry] });
}

const mayCountersign = (actor: Actor, { facts }: LoadedVersion): boolean =>
  isEntitled(actor, 'senior', facts.wardId) &&
  actor.registrationNumber !== null &&
  !facts.you.includes('author') &&
  !facts.you.includes('checker');
