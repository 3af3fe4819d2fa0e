import type { Actor } from '@shared/accounts/actor';
import { decideByClock } from '@shared/orders/decide';
import { isOnPump, STATE_WORDS } from '@shared/orders/states';
import type { Instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { refused, type Refused } from '../db/outcome';
import { infusionEvents, infusions } from '../db/schema/bedside';
import type { Tx } from '../db/transaction';
import type { LedgerNote } from '../ledger/entries';
import { loadFacts, type LoadedVersion } from '../orders/facts';
import { noteOf } from '../orders/lock-version';
import { moveVersion } from '../orders/move-version';
import type { RecordStart } from './start-request';
import { connectedTo, findInfusion, type Connected } from './queries';

/**
 * Two maintenance orders never run side by side unnoticed: the older one is named as replaced, or stopped first. A
 * line that something else holds is not taken over.
 */
export async function judgeConnected(
  tx: Tx,
  version: LoadedVersion,
  { replacesVersionId, entries }: Pick<RecordStart, 'replacesVersionId' | 'entries'>,
): Promise<Refused | undefined> {
  const { row } = version;
  if (row.kind !== 'maintenance') return undefined;
  const others = await connectedTo(tx, row.childId, row.id);
  const older = others.filter(({ kind }) => kind === 'maintenance');
  const replaced = older.find(({ versionId }) => versionId === replacesVersionId);
  if (replacesVersionId !== null && replaced === undefined) {
    return somethingRuns(version, older, 'What was to be replaced does not run any more. Look again.');
  }
  if (replaced !== undefined && !isOnPump(replaced.state)) {
    const words = `${replaced.code} is ${STATE_WORDS[replaced.state].toLowerCase()}. Stop it, then start this one.`;
    return somethingRuns(version, [replaced], words);
  }
  const left = older.filter(({ versionId }) => versionId !== replacesVersionId);
  if (left[0] !== undefined) {
    const words = `${left[0].code} is still connected. Say that this order replaces it, or stop it first.`;
    return somethingRuns(version, left, words);
  }
  const sharing = others.find(
    (other) => other.line === entries.line.site.trim() && other.versionId !== replacesVersionId,
  );
  if (sharing) return somethingRuns(version, [sharing], `${sharing.code} runs on this line.`);
  return undefined;
}

const somethingRuns = (version: LoadedVersion, others: readonly Connected[], detail: string): Refused =>
  refused('something-runs', {
    detail,
    data: { connected: others.map(({ versionId, code }) => ({ versionId, code })) },
    entries: [noteOf('infusion-started', version, { reason: 'something-runs' })],
  });

/** Ends the order that the newer one takes over at the pump. */
export async function replaceOlder(
  tx: Tx,
  actor: Actor,
  replacesVersionId: string | null,
  newer: LoadedVersion,
  now: Instant,
): Promise<LedgerNote[]> {
  if (replacesVersionId === null) return [];
  const older = await loadFacts(tx, actor, replacesVersionId, now, { lock: true });
  const infusion = await findInfusion(tx, replacesVersionId);
  if (older === null || infusion === undefined) throw new Error('what is replaced has no infusion');
  const verdict = decideByClock('replace', older.facts, now);
  if (!verdict.allowed) throw new Error('judged before: only what runs is replaced');
  const endReason = `replaced by ${newer.code}`;
  await tx
    .update(infusions)
    .set({ endedAt: now, endedBy: actor.id, endedHow: 'replaced', endReason })
    .where(eq(infusions.id, infusion.id));
  await tx.insert(infusionEvents).values({
    infusionId: infusion.id,
    kind: 'replaced',
    at: now,
    by: actor.id,
    reason: endReason,
  });
  await moveVersion(tx, replacesVersionId, 'replaced', now, { endReason });
  return [noteOf('order-replaced', older, { from: 'running', to: 'replaced', reason: endReason })];
}
