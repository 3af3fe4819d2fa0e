import type { Actor } from '@shared/accounts/actor';
import { canonicalText } from '@shared/canonical';
import type { CheckForm, Comparison } from '@shared/checks/form';
import type { VersionState } from '@shared/orders/states';
import type { Instant } from '@shared/time';
import { done, refused, type Outcome, type Refused } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import type { LoadedVersion } from '../../orders/facts';
import { holdFor, noteOf } from '../../orders/lock-version';
import { mailTo } from '../../orders/mails';
import { moveVersion } from '../../orders/move-version';
import { sign } from '../../orders/sign-row';
import { loadContent } from '../load-content';
import { dropDraft, writeCheck } from '../own-check';
import { compareWith, readOwnFigures, type OwnFigures } from '../own-figures';
import { factsMiss } from './lock-in';

type Body = { versionId: string; agree: boolean; form: CheckForm; reason: string };
type Countersigned = { state: VersionState; comparison: Comparison };

/** Countersigns what was given in an emergency by figures of one's own, or says what differs. */
export async function countersignGiven(
  tx: Tx,
  actor: Actor,
  body: Body,
  now: Instant,
): Promise<Outcome<Countersigned>> {
  const { versionId, agree } = body;
  const entry = agree ? 'given-countersigned' : 'given-differed';
  const opened = await holdFor(tx, { act: agree ? 'countersign' : 'differ', actor, versionId, entry }, now);
  if (!opened.ok) return opened.refusal;
  const version = opened.held;
  const read = await readOwnFigures(tx, actor, version, { form: body.form, ledger: entry, now });
  if (!read.ok) return read.refusal;
  const comparison = await compareWith(tx, await loadContent(tx, versionId), read.own);
  const refusal = refusalFor(version, body, comparison);
  if (refusal) return refusal;
  const state: VersionState = agree ? 'countersigned' : 'disputed';
  await store(tx, actor, version, { own: read.own, comparison, body }, now);
  await moveVersion(tx, versionId, state, now, agree ? { checkedAt: now } : {});
  if (!agree) return done({ state, comparison }, differTraces(version, actor, comparison, body.reason));
  const contentSha256 = version.row.contentSha256 ?? '';
  await sign(tx, actor, now, { versionId, contentSha256, meaning: 'countersignature' });
  return done(
    { state, comparison },
    { entries: [noteOf('given-countersigned', version, { from: 'given', to: state })] },
  );
}

const differTraces = (version: LoadedVersion, actor: Actor, comparison: Comparison, reason: string) => ({
  entries: [noteOf('given-differed', version, { from: 'given', to: 'disputed', reason })],
  mails: [mailTo('order-disputed', version.row.authorId, version)],
  nearMisses: [factsMiss(version, actor, comparison, 'given-differed')],
});

/** What was given cannot be changed: figures that differ are never countersigned, and a difference is said why. */
function refusalFor(
  version: LoadedVersion,
  { agree, reason }: Body,
  comparison: Comparison,
): Refused | undefined {
  if (agree && comparison.outcome === 'facts-differ') {
    const detail = 'Your figures differ from what was given. Say what differs instead of countersigning.';
    return refused('conflict', {
      detail,
      data: comparison,
      entries: [noteOf('given-countersigned', version)],
    });
  }
  if (!agree && reason.length < 3) {
    const errors = [{ pointer: '/reason', detail: 'Say what differs, in a few words.' }];
    return refused('reason-owed', { detail: 'Say what differs.', errors });
  }
  return undefined;
}

type Result = { own: OwnFigures; comparison: Comparison; body: Body };

async function store(
  tx: Tx,
  actor: Actor,
  version: LoadedVersion,
  { own, comparison, body }: Result,
  now: Instant,
): Promise<void> {
  await writeCheck(
    tx,
    version,
    actor.id,
    {
      state: body.agree ? 'agreed' : 'differed',
      figures: own.text,
      figuresSha256: own.sha256,
      lockedInAt: now,
      decidedAt: now,
      comparison: canonicalText(comparison),
      choicesDiffer: comparison.outcome === 'choices-differ',
      reason: body.reason === '' ? null : body.reason,
    },
    now,
  );
  await dropDraft(tx, version.row.id, actor.id);
}
