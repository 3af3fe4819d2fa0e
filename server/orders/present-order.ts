import type { Actor } from '@shared/accounts/actor';
import { maySee } from '@shared/orders/coverage';
import { decide } from '@shared/orders/decide';
import { isOverdue } from '@shared/orders/states';
import { ACTS, TRANSITIONS } from '@shared/orders/transitions';
import { waitingWords } from '@shared/orders/words';
import type { OrderView } from '@shared/routes/orders';
import { toRfc3339, type Instant } from '@shared/time';
import { asc, eq, sql } from 'drizzle-orm';
import { refused, type Refused } from '../db/outcome';
import { orderVersions } from '../db/schema/orders';
import { statement } from '../db/statement';
import type { Tx } from '../db/transaction';
import { findChild } from '../children/find-child';
import { loadChildHead } from './chart-parts';
import { loadFacts, type LoadedVersion } from './facts';
import { loadZone } from './load-context';
import { NO_SUCH_ORDER } from './lock-version';
import { presentOpen } from './present-open';
import { loadTimeline } from './timeline';

export type ReadOrder =
  { ok: true; view: OrderView; loaded: LoadedVersion } | { ok: false; refusal: Refused };

/**
 * An order's page for one reader. What is covered to them is not blanked: it is never selected. `uncovered` opens
 * it to a reader whose opening has just been written down.
 */
export async function readOrder(
  tx: Tx,
  actor: Actor,
  versionId: string,
  now: Instant,
  { uncovered = false }: { uncovered?: boolean } = {},
): Promise<ReadOrder> {
  const loaded = await loadFacts(tx, actor, versionId, now);
  if (loaded === null) return { ok: false, refusal: NO_SUCH_ORDER };
  const { row } = loaded;
  const found = await findChild(tx, actor, 'read-child', row.childId);
  if (!found.ok) return { ok: false, refusal: found };
  const zone = await loadZone(tx, actor.hospitalId);
  const child = await loadChildHead(tx, row.childId, now, zone);
  if (child === null) return { ok: false, refusal: refused('not-found') };
  const open = uncovered || maySee(loaded.coverage) ? await presentOpen(tx, loaded, child) : null;
  const view: OrderView = {
    ...headOf(loaded, now),
    child,
    open,
    timeline: await loadTimeline(tx, versionId, open !== null || loaded.coverage.viewerIsAuthor),
    otherVersions: await otherVersions(tx, loaded),
    you: { isAuthor: loaded.coverage.viewerIsAuthor },
    acts: actsOf(actor, loaded, now),
  };
  return { ok: true, view, loaded };
}

const orNull = (at: Instant | null): string | null => (at === null ? null : toRfc3339(at));

/** What everyone on the ward may read of any version. */
function headOf({ row, code }: LoadedVersion, now: Instant) {
  const waits = row.checkedAt === null && row.endedAt === null ? row.signedAt : null;
  return {
    orderId: row.orderId,
    versionId: row.id,
    code,
    version: row.version,
    kind: row.kind,
    state: row.state,
    stateSince: toRfc3339(row.stateSince),
    isOverdue: isOverdue(row.state, row.lapsesAt, now),
    isEmergency: row.urgency === 'emergency',
    reason: row.reason ?? '',
    askedStart: orNull(row.askedStart),
    urgency: row.urgency,
    checkDueAt: orNull(row.checkDueAt),
    waitingWords: waits === null ? '' : waitingWords(waits, row.checkDueAt, now),
  };
}

/** The acts the version's state allows anyone, each with whether this reader may and why not. */
function actsOf(actor: Actor, { facts }: LoadedVersion, now: Instant): OrderView['acts'] {
  return ACTS.filter(
    (act) => TRANSITIONS[act].roles.length > 0 && TRANSITIONS[act].from.includes(facts.state),
  ).map((act) => {
    const verdict = decide(act, actor, facts, now);
    return verdict.allowed
      ? { act, allowed: true, words: '' }
      : { act, allowed: false, words: verdict.words };
  });
}

const versionsOfOrder = statement((tx) =>
  tx
    .select({
      versionId: orderVersions.id,
      version: orderVersions.version,
      state: orderVersions.state,
    })
    .from(orderVersions)
    .where(eq(orderVersions.orderId, sql.placeholder('orderId')))
    .orderBy(asc(orderVersions.version)),
);

async function otherVersions(tx: Tx, { row }: LoadedVersion): Promise<OrderView['otherVersions']> {
  const rows = await versionsOfOrder(tx, { orderId: row.orderId });
  return rows.filter(({ versionId }) => versionId !== row.id);
}
