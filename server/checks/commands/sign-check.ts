import type { Actor } from '@shared/accounts/actor';
import { comparisonSchema } from '@shared/checks/form';
import type { VersionState } from '@shared/orders/states';
import { ruleValues } from '@shared/rulebook/read';
import type { Instant } from '@shared/time';
import { done, refused, type Outcome, type Refused } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { nearMiss } from '../../near-misses/near-miss';
import type { CheckRow, LoadedVersion } from '../../orders/facts';
import { holdFor, noteOf } from '../../orders/lock-version';
import { mailTo } from '../../orders/mails';
import { moveVersion } from '../../orders/move-version';
import { sign } from '../../orders/sign-row';
import { rulebookInForce } from '../../rulebook/in-force';
import { writeCheck } from '../own-check';

type Body = { versionId: string; contentSha256: string; acceptReason: string | null };

/** The independent check, signed: the password was verified before. A differing choice is accepted with a reason. */
export async function signCheck(
  tx: Tx,
  actor: Actor,
  { versionId, contentSha256, acceptReason }: Body,
  now: Instant,
): Promise<Outcome<{ state: VersionState }>> {
  const opened = await holdFor(tx, { act: 'sign-check', actor, versionId, entry: 'check-signed' }, now);
  if (!opened.ok) return opened.refusal;
  const version = opened.held;
  const own = version.checks.find(({ checkerId }) => checkerId === actor.id);
  const refusal = refusalFor(version, own, { contentSha256, acceptReason }, now);
  if (refusal) return refusal;
  const reason = own?.choicesDiffer === true ? acceptReason : null;
  const state = await nextState(tx, version);
  await writeCheck(tx, version, actor.id, { state: 'agreed', decidedAt: now, reason }, now);
  await moveVersion(tx, versionId, state, now, { checkedAt: now });
  const note = reason === null ? {} : { note: `Accepted the author’s choice: ${reason}` };
  await sign(tx, actor, now, { versionId, contentSha256, meaning: 'independent-check', ...note });
  return done(
    { state },
    {
      entries: [
        noteOf('check-signed', version, {
          from: 'awaiting-check',
          to: state,
          ...(reason === null ? {} : { reason }),
        }),
      ],
      mails: [mailTo('order-signed', version.row.authorId, version)],
      nearMisses: reason === null || own === undefined ? [] : [acceptedMiss(version, own, reason)],
    },
  );
}

function refusalFor(
  version: LoadedVersion,
  own: CheckRow | undefined,
  { contentSha256, acceptReason }: Omit<Body, 'versionId'>,
  now: Instant,
): Refused | undefined {
  const entries = [noteOf('check-signed', version)];
  if (own?.reservedUntil == null || now > own.reservedUntil) {
    const detail =
      'Your figures agreed, and were kept for you for a time that has run out. Another checker is needed.';
    return refused('locked-in-agreed', { detail, entries });
  }
  if (contentSha256 !== version.row.contentSha256) {
    return refused('stale', { detail: 'The order is not the one you were shown. Open it again.', entries });
  }
  if (!own.choicesDiffer) return undefined;
  if (!comparisonSchema.parse(JSON.parse(own.comparison ?? 'null')).mayAccept) {
    const detail =
      'One of the two choices is not allowed by the rulebook: return the order to its prescriber.';
    return refused('locked-in-agreed', { detail, entries });
  }
  if (acceptReason !== null) return undefined;
  const errors = [{ pointer: '/acceptReason', detail: 'Say why you accept the author’s choice.' }];
  return refused('reason-owed', {
    detail: 'A choice differs: accept it with a reason, or return it.',
    errors,
    entries,
  });
}

/** Signed, or on to a pharmacist where the rulebook asks for one; a bolus for shock never waits for that. */
async function nextState(tx: Tx, { row }: LoadedVersion): Promise<VersionState> {
  const { verify } = ruleValues((await rulebookInForce(tx)).rulebook, 'pharmacist');
  const isAsked = verify === 'always' || (verify === 'high-risk' && row.isHighRisk);
  return isAsked && row.kind !== 'bolus' ? 'awaiting-pharmacist' : 'signed';
}

function acceptedMiss({ row }: LoadedVersion, own: CheckRow, reason: string) {
  const { rows } = comparisonSchema.parse(JSON.parse(own.comparison ?? 'null'));
  const choice = rows.find(({ agrees, nature }) => !agrees && nature === 'choice');
  return nearMiss({
    class: 'choice-accepted',
    limitCode: choice?.field ?? 'choice',
    childId: row.childId,
    versionId: row.id,
    kind: row.kind,
    value: choice?.author,
    limit: choice?.checker,
    detail: reason,
  });
}
