import { isOnWard, type Actor } from '@shared/accounts/actor';
import { volumeToInfuse } from '@shared/bedside/volume-to-infuse';
import { witnessNeeded } from '@shared/bedside/witness';
import { decimalText } from '@shared/canonical';
import { toDecimals } from '@shared/rounding';
import type { Act } from '@shared/orders/transitions';
import type { BedsidePage } from '@shared/routes/bedside';
import { toRfc3339, type Instant } from '@shared/time';
import { presentActs } from '../checks/present';
import { done, refused, type Outcome } from '../db/outcome';
import type { Tx } from '../db/transaction';
import { loadChildHead } from '../orders/chart-parts';
import { loadFacts, type LoadedVersion } from '../orders/facts';
import { NO_SUCH_ORDER } from '../orders/lock-version';
import { loadBedside } from './load-bedside';
import { loadSignatures } from '../orders/present-open';
import { connectedTo } from './queries';

const ACTS: readonly Act[] = ['start', 'hold', 'resume', 'send-away', 'stop', 'finish'];

/** The signed order as a nurse needs it at the bedside. What its checker has not signed has no bedside. */
export async function readBedsidePage(
  tx: Tx,
  actor: Actor,
  versionId: string,
  now: Instant,
): Promise<Outcome<BedsidePage>> {
  const version = await loadFacts(tx, actor, versionId, now);
  if (version === null) return NO_SUCH_ORDER;
  const bar = barFrom(actor, version);
  if (bar !== null) return bar;
  const { content, context, products } = await loadBedside(tx, actor.hospitalId, versionId, now);
  const { row, code } = version;
  const child = await loadChildHead(tx, row.childId, now, context.zone);
  if (child === null) return NO_SUCH_ORDER;
  const most = volumeToInfuse(content, context, null);
  const connected = await connectedTo(tx, row.childId, versionId);
  return done({
    versionId,
    code,
    version: row.version,
    state: row.state,
    child,
    content,
    signatures: await loadSignatures(tx, row),
    volumeToInfuse: { mostMl: decimalText(toDecimals(most.ml, 1), 1), words: most.words },
    products,
    witnessNeeded: witnessNeeded(content, context.rulebook),
    startBy: content.startBy,
    lapsesAt: content.lapsesAt,
    connected: connected
      .filter(({ kind }) => kind === 'maintenance')
      .map((other) => ({
        versionId: other.versionId,
        code: other.code,
        version: other.version,
        state: other.state,
        fluid: other.fluid,
        rateMlPerH: decimalText(other.rateMlH ?? 0, 1),
      })),
    acts: presentActs(ACTS, actor, version.facts, now),
    now: toRfc3339(now),
    zone: context.zone,
  });
}

function barFrom(actor: Actor, { row, ward }: LoadedVersion) {
  if (ward === null || !isOnWard(actor, ward.id)) {
    return refused('on-ward', { detail: 'You are not a member of this child’s ward.' });
  }
  if (row.checkedAt === null || row.givenAt !== null) {
    return refused('order-state', {
      detail: 'This order is not signed by its checker: nothing may start on it.',
    });
  }
  return null;
}
