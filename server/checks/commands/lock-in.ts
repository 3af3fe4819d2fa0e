import type { Actor } from '@shared/accounts/actor';
import { canonicalText } from '@shared/canonical';
import type { CheckForm, Comparison } from '@shared/checks/form';
import { ruleValues } from '@shared/rulebook/read';
import { instant, MINUTE, type Instant } from '@shared/time';
import { done, type NearMiss, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { nearMiss } from '../../near-misses/near-miss';
import type { LoadedVersion } from '../../orders/facts';
import { holdFor, noteOf } from '../../orders/lock-version';
import { mailTo } from '../../orders/mails';
import { moveVersion } from '../../orders/move-version';
import { noteSeen } from '../../orders/note-seen';
import { rulebookInForce } from '../../rulebook/in-force';
import { loadContent } from '../load-content';
import { dropDraft, expireOthers, writeCheck } from '../own-check';
import { compareWith, readOwnFigures, type OwnFigures } from '../own-figures';

type Body = { versionId: string; form: CheckForm; isBeside: boolean };

/**
 * Fixes a checker's figures for ever and compares them, in one transaction; the answer holds nothing of the author's,
 * so that nothing is uncovered before the commit.
 */
export async function lockIn(
  tx: Tx,
  actor: Actor,
  { versionId, form, isBeside }: Body,
  now: Instant,
): Promise<Outcome<{ ok: true }>> {
  const opened = await holdFor(tx, { act: 'lock-in', actor, versionId, entry: 'check-locked-in' }, now);
  if (!opened.ok) return opened.refusal;
  const version = opened.held;
  const read = await readOwnFigures(tx, actor, version, { form, ledger: 'check-locked-in', now });
  if (!read.ok) return read.refusal;
  const comparison = await compareWith(tx, await loadContent(tx, versionId), read.own);
  await expireOthers(tx, versionId, actor.id, now);
  await store(tx, actor, version, { own: read.own, comparison, isBeside }, now);
  await noteSeen(tx, versionId, actor.id, 'locked-in', now);
  await dropDraft(tx, versionId, actor.id);
  const { outcome } = comparison;
  const differs = outcome === 'facts-differ';
  if (differs) await moveVersion(tx, versionId, 'disputed', now);
  return done(
    { ok: true },
    {
      entries: [noteOf('check-locked-in', version, { from: 'awaiting-check', to: outcome })],
      mails: differs ? [mailTo('order-disputed', version.row.authorId, version)] : [],
      nearMisses: differs ? [factsMiss(version, actor, comparison)] : [],
    },
  );
}

type Result = { own: OwnFigures; comparison: Comparison; isBeside: boolean };

async function store(
  tx: Tx,
  actor: Actor,
  version: LoadedVersion,
  { own, comparison, isBeside }: Result,
  now: Instant,
): Promise<void> {
  const differs = comparison.outcome === 'facts-differ';
  const { rulebook } = await rulebookInForce(tx);
  const { agreedUnsigned } = ruleValues(rulebook, 'check');
  const { workedOutBy } = own.entries;
  await writeCheck(
    tx,
    version,
    actor.id,
    {
      state: differs ? 'differed' : 'locked-agreed',
      figures: own.text,
      figuresSha256: own.sha256,
      way: workedOutBy === undefined ? null : workedOutBy === 'program' ? 'worked-out' : 'by-hand',
      lockedInAt: now,
      reservedUntil: differs ? null : instant(Math.round(now + agreedUnsigned * MINUTE)),
      comparison: canonicalText(comparison),
      choicesDiffer: comparison.outcome === 'choices-differ',
      hadSeenFigures: version.facts.sawFiguresAt !== null,
      passedTo: null,
      decidedAt: null,
      reason: null,
      isBeside,
    },
    now,
  );
}

/** One near miss for each check: the first fact that differs, the others in its detail. */
export function factsMiss(
  { row }: LoadedVersion,
  actor: Actor,
  comparison: Comparison,
  missClass: 'check-differed' | 'given-differed' = 'check-differed',
): NearMiss {
  const facts = comparison.rows.filter(({ agrees, nature }) => !agrees && nature === 'fact');
  const first = facts[0] ?? comparison.rows.find(({ agrees }) => !agrees);
  return nearMiss({
    class: missClass,
    limitCode: first?.field ?? 'something-else',
    childId: row.childId,
    versionId: row.id,
    kind: row.kind,
    value: first?.author,
    limit: first?.checker,
    detail: facts.map(({ label, apart }) => (apart === '' ? label : `${label}: ${apart}`)).join('; '),
    once: [actor.id],
  });
}
