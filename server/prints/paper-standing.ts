import type { Actor } from '@shared/accounts/actor';
import { can } from '@shared/orders/can';
import { maySee } from '@shared/orders/coverage';
import { isOverdue, isSigned } from '@shared/orders/states';
import { toRfc3339, type Instant } from '@shared/time';
import type { z } from 'zod';
import type { ROUTES } from '@shared/routes';
import type { Tx } from '../db/transaction';
import { loadFacts } from '../orders/facts';
import { findByCode, findStanding } from './queries';
import { isCurrent } from './watermark';

type Standing = z.input<(typeof ROUTES)['paper']['response']>;

export const UNKNOWN_PAPER: Standing = {
  known: false,
  isCurrent: false,
  words: 'No paper was printed under this code. Do not follow it.',
  version: null,
  printedAt: null,
  order: null,
};

/** The same words for every reason: a stranger does not learn what became of the order. */
const wordsFor = (current: boolean): string =>
  current ? 'This paper is current.' : 'This paper is not current. Do not follow it.';

/** A stranger hears current or not and the version; who may see the order also gets the way to it. */
export async function paperStanding(
  tx: Tx,
  code: string,
  actor: Actor | null,
  now: Instant,
): Promise<Standing> {
  const print = await findByCode(tx, code);
  const standing = print && (await findStanding(tx, print.versionId));
  if (!print || !standing) return UNKNOWN_PAPER;
  const late = isOverdue(standing.state, standing.lapsesAt, now);
  const missedStart = isSigned(standing.state) && standing.startBy !== null && now > standing.startBy;
  const current = isCurrent(standing.state) && !late && !missedStart;
  return {
    known: true,
    isCurrent: current,
    words: wordsFor(current),
    version: standing.version,
    printedAt: toRfc3339(print.at),
    order: actor === null ? null : await orderFor(tx, actor, print.versionId, now),
  };
}

async function orderFor(tx: Tx, actor: Actor, versionId: string, now: Instant): Promise<Standing['order']> {
  const loaded = await loadFacts(tx, actor, versionId, now);
  if (loaded === null || loaded.ward === null || !maySee(loaded.coverage)) return null;
  if (!can(actor, 'print-order', loaded.ward.id).allowed) return null;
  return { versionId, code: loaded.code };
}
