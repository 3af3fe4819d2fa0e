import type { Actor } from '@shared/accounts/actor';
import { decide, type Verdict } from '@shared/orders/decide';
import type { Act } from '@shared/orders/transitions';
import type { Instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { refused, type Refused } from '../db/outcome';
import { children } from '../db/schema/children';
import { orderVersions } from '../db/schema/orders';
import type { Tx } from '../db/transaction';
import type { LedgerNote } from '../ledger/entries';
import { loadFacts, type LoadedVersion } from './facts';

/** Holds the child until commit: whatever sums over a child's orders is done one at a time. */
export async function lockChild(tx: Tx, childId: string): Promise<void> {
  await tx.select({ id: children.id }).from(children).where(eq(children.id, childId)).for('update');
}

/** Child first, then the version, in the order every act locks. Null where there is no such version. */
export async function lockVersion(
  tx: Tx,
  actor: Pick<Actor, 'id'>,
  versionId: string,
  now: Instant,
): Promise<LoadedVersion | null> {
  const [version] = await tx
    .select({ childId: orderVersions.childId })
    .from(orderVersions)
    .where(eq(orderVersions.id, versionId));
  if (version === undefined) return null;
  await lockChild(tx, version.childId);
  return loadFacts(tx, actor, versionId, now, { lock: true });
}

/** The ledger's note of an act on a version; it never holds a figure, a fluid or a weight. */
export const noteOf = (
  act: LedgerNote['act'],
  { row, code }: Pick<LoadedVersion, 'row' | 'code'>,
  rest: Pick<LedgerNote, 'from' | 'to' | 'reason'> = {},
): LedgerNote => ({
  act,
  subject: { kind: 'order-version', id: row.id },
  child: row.childId,
  code,
  version: row.version,
  ...rest,
});

export const NO_SUCH_ORDER = refused('not-found', { detail: 'There is no such order.' });

/** A verdict of the transition table as an outcome; undefined where the act is allowed. */
export function refusalOf(verdict: Verdict, entry?: LedgerNote): Refused | undefined {
  if (verdict.allowed) return undefined;
  return refused(verdict.code, { detail: verdict.words, ...(entry && { entries: [entry] }) });
}

export type Held = { ok: true; held: LoadedVersion } | { ok: false; refusal: Refused };

/** Locks a version and asks the table whether this person may do this act to it now; a refusal is noted. */
export async function holdFor(
  tx: Tx,
  { act, actor, versionId, entry }: { act: Act; actor: Actor; versionId: string; entry: LedgerNote['act'] },
  now: Instant,
): Promise<Held> {
  const held = await lockVersion(tx, actor, versionId, now);
  if (held === null) return { ok: false, refusal: NO_SUCH_ORDER };
  const refusal = refusalOf(decide(act, actor, held.facts, now), noteOf(entry, held));
  return refusal ? { ok: false, refusal } : { ok: true, held };
}
