import type { Actor } from '@shared/accounts/actor';
import { compareStep } from '@shared/bedside/compare';
import { decide } from '@shared/orders/decide';
import { isConnected } from '@shared/orders/states';
import type { BedsideEntries, BedsideStep, StepVerdict } from '@shared/routes/bedside';
import type { Instant } from '@shared/time';
import { done, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { loadFacts } from '../../orders/facts';
import { NO_SUCH_ORDER, noteOf, refusalOf } from '../../orders/lock-version';
import { bedsideMisses } from '../differences';
import { loadBedside } from '../load-bedside';

type Body = { versionId: string; step: BedsideStep; entries: BedsideEntries };

/** One comparison at the bedside; what differs is answered in words and kept. */
export async function compareOne(
  tx: Tx,
  actor: Actor,
  { versionId, step, entries }: Body,
  now: Instant,
): Promise<Outcome<StepVerdict>> {
  const version = await loadFacts(tx, actor, versionId, now);
  if (version === null) return NO_SUCH_ORDER;
  const act = isConnected(version.row.state) ? 'resume' : 'start';
  const refusal = refusalOf(decide(act, actor, version.facts, now), noteOf('bedside-compared', version));
  if (refusal) return refusal;
  const { content, context } = await loadBedside(tx, actor.hospitalId, versionId, now);
  const verdict = compareStep(step, content, entries, context);
  if (verdict.agrees) return done(verdict);
  const misses = bedsideMisses(version, { verdict, entries, content });
  const reason = verdict.findings.map(({ text }) => text).join(' ');
  return done(verdict, {
    // an entry that is only unfinished is nothing to keep
    entries:
      misses.length === 0 ? [] : [noteOf('bedside-compared', version, { to: `${step}-differs`, reason })],
    nearMisses: misses,
  });
}
