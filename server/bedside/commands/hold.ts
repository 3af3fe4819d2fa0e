import type { Actor } from '@shared/accounts/actor';
import { ruleValues } from '@shared/rulebook/read';
import { HOUR, instant, toRfc3339, type Instant } from '@shared/time';
import { done, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { holdFor, noteOf } from '../../orders/lock-version';
import { moveVersion } from '../../orders/move-version';
import { rulebookInForce } from '../../rulebook/in-force';
import { addEvent } from '../add-event';

/** Holds a running infusion for the time the rulebook gives one hold. */
export async function hold(
  tx: Tx,
  actor: Actor,
  { versionId, reason }: { versionId: string; reason: string },
  now: Instant,
): Promise<Outcome<{ until: string }>> {
  const opened = await holdFor(tx, { act: 'hold', actor, versionId, entry: 'infusion-held' }, now);
  if (!opened.ok) return opened.refusal;
  const { holdHours } = ruleValues((await rulebookInForce(tx)).rulebook, 'windows');
  await addEvent(tx, actor, versionId, { kind: 'held', reason: reason || null }, now);
  await moveVersion(tx, versionId, 'held', now);
  const until = instant(Math.round(now + holdHours * HOUR));
  const note = { from: 'running', to: 'held', ...(reason === '' ? {} : { reason }) };
  return done({ until: toRfc3339(until) }, { entries: [noteOf('infusion-held', opened.held, note)] });
}
