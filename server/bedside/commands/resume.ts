import type { Actor } from '@shared/accounts/actor';
import { comparePump } from '@shared/bedside/compare';
import { canonicalText } from '@shared/canonical';
import type { BedsideEntries } from '@shared/routes/bedside';
import type { Instant } from '@shared/time';
import { millilitres, millilitresPerHour } from '@shared/units';
import { done, refused, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { holdFor, noteOf } from '../../orders/lock-version';
import { moveVersion } from '../../orders/move-version';
import { addEvent } from '../add-event';
import { bedsideMisses } from '../differences';
import { loadBedside } from '../load-bedside';

type Body = { versionId: string; pump: BedsideEntries['pump'] };

/** Resumes a held infusion after the pump has been compared again. */
export async function resume(
  tx: Tx,
  actor: Actor,
  { versionId, pump }: Body,
  now: Instant,
): Promise<Outcome<{ ok: true }>> {
  const opened = await holdFor(tx, { act: 'resume', actor, versionId, entry: 'infusion-resumed' }, now);
  if (!opened.ok) return opened.refusal;
  const version = opened.held;
  const { content, context, infusion } = await loadBedside(tx, actor.hospitalId, versionId, now);
  const verdict = comparePump(content, pump, context, infusion?.bagVolumeMl ?? null);
  if (!verdict.agrees) {
    const detail = verdict.findings.map(({ text }) => text).join(' ');
    const entries = { pump } as BedsideEntries;
    return refused('bedside-differs', {
      detail,
      errors: verdict.findings.map(({ field, text }) => ({ pointer: `/pump/${field}`, detail: text })),
      data: { verdicts: [verdict] },
      entries: [noteOf('infusion-resumed', version, { reason: detail })],
      nearMisses: bedsideMisses(version, { verdict, entries, content }),
    });
  }
  const rateMlH = pump.rate.trim() === '' ? null : millilitresPerHour(Number(pump.rate));
  const volumeMl = millilitres(Number(pump.volume));
  await addEvent(
    tx,
    actor,
    versionId,
    { kind: 'resumed', rateMlH, volumeMl, detail: canonicalText(pump) },
    now,
  );
  await moveVersion(tx, versionId, 'running', now);
  return done(
    { ok: true },
    { entries: [noteOf('infusion-resumed', version, { from: 'held', to: 'running' })] },
  );
}
