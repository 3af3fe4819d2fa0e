import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import { done, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { holdFor, noteOf } from '../../orders/lock-version';
import { moveVersion } from '../../orders/move-version';
import { addEvent } from '../add-event';

/** The child goes to theatre, a scan, intensive care, with the infusion. */
export async function sendAway(
  tx: Tx,
  actor: Actor,
  { versionId, where }: { versionId: string; where: string },
  now: Instant,
): Promise<Outcome<{ ok: true }>> {
  const opened = await holdFor(tx, { act: 'send-away', actor, versionId, entry: 'infusion-away' }, now);
  if (!opened.ok) return opened.refusal;
  await addEvent(tx, actor, versionId, { kind: 'away', reason: where }, now);
  await moveVersion(tx, versionId, 'away', now);
  const note = { from: 'running', to: 'away', reason: where };
  return done({ ok: true }, { entries: [noteOf('infusion-away', opened.held, note)] });
}
