import type { Kind, LimitFinding, WorkOutRequest } from '@shared/calc/types';
import { workOut } from '@shared/calc/work-out';
import { buildContent } from '@shared/orders/build-content';
import { rulebookOf } from '@shared/orders/chart-facts';
import type { OrderForm } from '@shared/orders/form';
import {
  isWorkedOut,
  workOutDraft,
  type DraftWork,
  type WorkedOutDraft,
} from '@shared/orders/work-out-draft';
import type { DraftContext } from '@shared/routes/orders';
import type { Instant } from '@shared/time';
import { millilitres } from '@shared/units';
import { eq } from 'drizzle-orm';
import { orders } from '../db/schema/orders';
import type { Tx } from '../db/transaction';
import type { HiddenBolus } from './count-fluids';
import type { VersionRow } from './facts';
import { hashContent, type HashedContent } from './hash-content';
import { loadContext } from './load-context';

export type VersionWork =
  | { ok: false; context: DraftContext; work: Exclude<DraftWork, WorkedOutDraft> }
  | {
      ok: true;
      context: DraftContext;
      work: WorkedOutDraft;
      /** Senior matters that arise only with orders nobody may read yet. */
      hidden: LimitFinding[];
      /** What signing now would fix. */
      wouldBe: HashedContent;
    };

type Version = Pick<VersionRow, 'orderId' | 'childId' | 'version'>;

/** A maintenance takes the place of the one it follows; a bolus comes on top of the one it copies. */
export const followedIsReplaced = (kind: Kind): boolean => kind === 'maintenance';

/** The chart of a version's child, less the order itself and the maintenance it takes over from; null where the child is gone. */
export async function loadVersionContext(tx: Tx, version: Version, hospitalId: string, now: Instant) {
  const [order] = await tx
    .select({ code: orders.code, kind: orders.kind, follows: orders.follows })
    .from(orders)
    .where(eq(orders.id, version.orderId));
  const takesOver = order?.follows && followedIsReplaced(order.kind) ? [order.follows] : [];
  const except = [version.orderId, ...takesOver];
  const loaded = await loadContext(tx, { hospitalId, childId: version.childId, except }, now);
  return loaded && { ...loaded, code: order?.code ?? '', follows: order?.follows ?? null };
}

/**
 * Works a draft out with the server's own chart and rulebook, and fixes the bytes that signing it now would sign.
 * Throws where the version's child is gone, which the database does not let happen.
 */
export async function workOutVersion(
  tx: Tx,
  version: Version,
  form: OrderForm,
  hospitalId: string,
  now: Instant,
): Promise<VersionWork> {
  const loaded = await loadVersionContext(tx, version, hospitalId, now);
  if (loaded === null) throw new Error('the child of this version is gone');
  const { context, hiddenBoluses, code } = loaded;
  const work = workOutDraft(form, context);
  if (!isWorkedOut(work)) return { ok: false, context, work };
  const { request, extras } = work;
  const rulebook = rulebookOf(context);
  const content = buildContent({
    code,
    version: version.version,
    form,
    request,
    extras,
    workOut: work.workOut,
    context,
    rulebook,
  });
  const hidden = hiddenMatters(work, context, hiddenBoluses);
  return { ok: true, context, work, hidden, wouldBe: hashContent(content) };
}

/** The senior matters that arise only with boluses waiting for their check; told without any figure. */
function hiddenMatters(
  work: WorkedOutDraft,
  context: DraftContext,
  boluses: readonly HiddenBolus[],
): LimitFinding[] {
  if (boluses.length === 0 || work.request.order.kind !== 'bolus') return [];
  const worked = workOut(withBoluses(work.request, boluses), rulebookOf(context));
  if (!worked.ok) return [];
  const known = new Set(work.workOut.limits.filter((limit) => !limit.met).map(({ code }) => code));
  return worked.limits
    .filter((limit) => !limit.met && limit.strength === 'senior' && !known.has(limit.code))
    .map(({ code, strength, title, source, deferred }) => ({
      code,
      strength,
      title,
      text: 'Another bolus for this child waits for its check: with it, the total of 24 h needs a senior.',
      met: false,
      source,
      ...(deferred && { deferred }),
    }));
}

const withBoluses = (request: WorkOutRequest, boluses: readonly HiddenBolus[]): WorkOutRequest => ({
  ...request,
  intake: {
    ...request.intake,
    bolusesLast24h: [
      ...request.intake.bolusesLast24h,
      ...boluses.map(({ ml, at }) => ({ ml: millilitres(ml), at, here: true })),
    ],
  },
});
