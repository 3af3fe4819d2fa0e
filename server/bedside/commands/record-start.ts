import type { Actor } from '@shared/accounts/actor';
import { compareAll } from '@shared/bedside/compare';
import { isByPump } from '@shared/bedside/compare-pump';
import { witnessNeeded } from '@shared/bedside/witness';
import { canonicalText } from '@shared/canonical';
import type { LineClass } from '@shared/calc/types';
import type { OrderContent } from '@shared/orders/content';
import type { BedsideEntries, StepVerdict } from '@shared/routes/bedside';
import { toRfc3339, type Instant } from '@shared/time';
import { millilitres, millilitresPerHour } from '@shared/units';
import { done, refused, type Outcome, type Refused } from '../../db/outcome';
import { infusionEvents, infusions } from '../../db/schema/bedside';
import type { Tx } from '../../db/transaction';
import type { LoadedVersion } from '../../orders/facts';
import { holdFor, noteOf } from '../../orders/lock-version';
import { moveVersion } from '../../orders/move-version';
import { sign } from '../../orders/sign-row';
import { bedsideErrors, bedsideMisses } from '../differences';
import { findWitness, type Witness } from '../find-witness';
import { loadBedside, type Bedside } from '../load-bedside';
import { judgeTotals } from '../judge-totals';
import { judgeWeight } from '../judge-weight';
import { judgeConnected, replaceOlder } from '../replace-older';
import type { RecordStart } from '../start-request';

/**
 * Records the start: all four comparisons again with the child held, the weight still the one the order was made
 * for, a witness where the rulebook asks for one, and no second maintenance beside a running one.
 */
export async function recordStart(
  tx: Tx,
  actor: Actor,
  request: RecordStart,
  now: Instant,
): Promise<Outcome<{ infusionId: string; startedAt: string }>> {
  const { versionId, entries } = request;
  const opened = await holdFor(tx, { act: 'start', actor, versionId, entry: 'infusion-started' }, now);
  if (!opened.ok) return opened.refusal;
  const version = opened.held;
  // its state rules this out; the giving is one act and is never repeated by it
  if (version.row.givenAt !== null) {
    return refused('order-state', {
      detail: 'This has been given already.',
      entries: [noteOf('infusion-started', version)],
    });
  }
  const bedside = await loadBedside(tx, actor.hospitalId, versionId, now);
  const verdicts = compareAll(bedside.content, entries, bedside.context);
  const refusal =
    judgeVerdicts(version, bedside.content, entries, verdicts) ??
    (await judgeWeight(tx, version, bedside, now)) ??
    (await judgeTotals(tx, version, bedside, now)) ??
    (await judgeConnected(tx, version, request));
  if (refusal) return refusal;
  const witnessed = await judgeWitness(tx, actor, version, bedside, request.witnessLogin);
  if (!witnessed.ok) return witnessed.refusal;
  const { witness } = witnessed;
  const replaced = await replaceOlder(tx, actor, request.replacesVersionId, version, now);
  const infusionId = await store(tx, actor, version, { ...bedside, entries, verdicts, witness }, now);
  await moveVersion(tx, versionId, 'running', now);
  const contentSha256 = version.row.contentSha256 ?? '';
  await sign(tx, actor, now, { versionId, contentSha256, meaning: 'bedside', how: 'session' });
  if (witness) await sign(tx, witness, now, { versionId, contentSha256, meaning: 'witness' });
  return done(
    { infusionId, startedAt: toRfc3339(now) },
    { entries: [...replaced, noteOf('infusion-started', version, { from: 'signed', to: 'running' })] },
  );
}

function judgeVerdicts(
  version: LoadedVersion,
  content: OrderContent,
  entries: BedsideEntries,
  verdicts: readonly StepVerdict[],
): Refused | undefined {
  const differing = verdicts.filter(({ agrees }) => !agrees);
  if (differing.length === 0) return undefined;
  const detail = differing.flatMap(({ findings }) => findings.map(({ text }) => text)).join(' ');
  return refused('bedside-differs', {
    detail,
    errors: bedsideErrors(differing),
    data: { verdicts },
    entries: [noteOf('infusion-started', version, { reason: detail })],
    nearMisses: differing.flatMap((verdict) => bedsideMisses(version, { verdict, entries, content })),
  });
}

type Witnessed = { ok: true; witness: Witness | null } | { ok: false; refusal: Refused };

async function judgeWitness(
  tx: Tx,
  actor: Actor,
  version: LoadedVersion,
  { content, context }: Bedside,
  loginId: string | null,
): Promise<Witnessed> {
  if (loginId === null) {
    if (!witnessNeeded(content, context.rulebook)) return { ok: true, witness: null };
    const refusal = refused('witness-needed', {
      detail: 'A second person has to see this bag, pump and line: they sign in here as witness.',
      entries: [noteOf('infusion-started', version, { reason: 'witness-needed' })],
    });
    return { ok: false, refusal };
  }
  const found = await findWitness(tx, loginId, version.ward?.id ?? '', actor.id);
  if (found.ok) return found;
  const entries = [noteOf('infusion-started', version, { reason: 'witness-unfit' })];
  return { ok: false, refusal: { ...found.refusal, entries } };
}

type Start = Bedside & { entries: BedsideEntries; verdicts: StepVerdict[]; witness: Witness | null };

async function store(
  tx: Tx,
  actor: Actor,
  { row }: LoadedVersion,
  { content, entries, verdicts, witness }: Start,
  now: Instant,
): Promise<string> {
  const { bag, line, pump } = entries;
  const byPump = isByPump(content);
  const rate = byPump ? millilitresPerHour(Number(pump.rate)) : null;
  const volume = millilitres(Number(pump.volume));
  const [infusion] = await tx
    .insert(infusions)
    .values({
      versionId: row.id,
      authorId: row.authorId,
      childId: row.childId,
      startedBy: actor.id,
      witnessId: witness?.id ?? null,
      startedAt: now,
      bagProductId: bag.productId,
      bagVolumeMl: millilitres(Number(bag.sizeMl)),
      bagNumber: bag.bagNumber.trim() || null,
      bagBatch: bag.batch.trim() || null,
      bagExpiresOn: bag.expiry.trim(),
      way: content.inputs.kind === 'bolus' ? content.inputs.route : 'pump',
      pump: pump.device.trim() || null,
      channel: pump.channel.trim() || null,
      line: lineName(content, line.site),
      lineClass: line.lineClass as LineClass,
      pumpRateMlH: rate,
      pumpVolumeMl: volume,
      comparisons: canonicalText({ entries, verdicts }),
    })
    .returning({ id: infusions.id });
  if (infusion === undefined) throw new Error('the infusion was not stored');
  await tx.insert(infusionEvents).values({
    infusionId: infusion.id,
    kind: 'started',
    at: now,
    by: actor.id,
    rateMlH: rate,
    volumeMl: volume,
  });
  return infusion.id;
}

/** A bolus may share a line with what runs; it is another way in, not another maintenance. */
export const lineName = ({ kind }: Pick<OrderContent, 'kind'>, site: string): string =>
  kind === 'bolus' ? `${site.trim()} (bolus)` : site.trim();
