import type { Actor } from '@shared/accounts/actor';
import type { CheckForm } from '@shared/checks/form';
import { decide } from '@shared/orders/decide';
import { toRfc3339, type Instant } from '@shared/time';
import { and, eq } from 'drizzle-orm';
import { done, refused, type Outcome } from '../../db/outcome';
import { checkDrafts, checks } from '../../db/schema/checks';
import type { Tx } from '../../db/transaction';
import { loadFacts, type LoadedVersion } from '../../orders/facts';
import { NO_SUCH_ORDER, noteOf, refusalOf } from '../../orders/lock-version';

type Saved = { rev: number; savedAt: string };
type Body = { rev: number; form: CheckForm };

/** Keeps a checker's unsent figures as typed; the first save opens their check. */
export async function saveCheck(
  tx: Tx,
  actor: Actor,
  { versionId, isBeside, rev, form }: Body & { versionId: string; isBeside: boolean },
  now: Instant,
): Promise<Outcome<Saved>> {
  const version = await loadFacts(tx, actor, versionId, now);
  if (version === null) return NO_SUCH_ORDER;
  const refusal = refusalOf(decide(actOf(version), actor, version.facts, now));
  if (refusal) return refusal;
  const saved = await store(tx, { versionId, accountId: actor.id }, { rev, form }, now);
  if (saved === undefined) return moved(tx, versionId, actor.id);
  const isNew = await openCheck(tx, actor, version, isBeside, now);
  return done(
    { rev: saved, savedAt: toRfc3339(now) },
    isNew ? { entries: [noteOf('check-opened', version)] } : {},
  );
}

const actOf = ({ row }: LoadedVersion) =>
  row.givenAt === null ? ('lock-in' as const) : ('countersign' as const);

type Owner = { versionId: string; accountId: string };

/** The new revision, or undefined when another tab was first. */
async function store(tx: Tx, owner: Owner, { rev, form }: Body, now: Instant): Promise<number | undefined> {
  if (rev === 0) {
    const made = await tx
      .insert(checkDrafts)
      .values({ ...owner, form, rev: 1, savedAt: now })
      .onConflictDoNothing()
      .returning({ rev: checkDrafts.rev });
    return made[0]?.rev;
  }
  const changed = await tx
    .update(checkDrafts)
    .set({ form, rev: rev + 1, savedAt: now })
    .where(and(ofOwner(owner), eq(checkDrafts.rev, rev)))
    .returning({ rev: checkDrafts.rev });
  return changed[0]?.rev;
}

const ofOwner = ({ versionId, accountId }: Owner) =>
  and(eq(checkDrafts.versionId, versionId), eq(checkDrafts.accountId, accountId));

async function moved(tx: Tx, versionId: string, accountId: string): Promise<Outcome<never>> {
  const [draft] = await tx.select().from(checkDrafts).where(ofOwner({ versionId, accountId }));
  const data = draft && { rev: draft.rev, form: draft.form, savedAt: toRfc3339(draft.savedAt) };
  return refused('draft-moved', { detail: 'These figures were changed in another tab of yours.', data });
}

async function openCheck(
  tx: Tx,
  actor: Actor,
  { row }: LoadedVersion,
  isBeside: boolean,
  now: Instant,
): Promise<boolean> {
  const made = await tx
    .insert(checks)
    .values({
      versionId: row.id,
      authorId: row.authorId,
      checkerId: actor.id,
      state: 'open',
      openedAt: now,
      isBeside,
    })
    .onConflictDoNothing()
    .returning({ id: checks.id });
  return made.length > 0;
}
