import type { Actor } from '@shared/accounts/actor';
import type { Kind } from '@shared/calc/types';
import { readContent } from '@shared/orders/build-content';
import { formFromContent } from '@shared/orders/form-from-content';
import type { OrderForm } from '@shared/orders/form';
import { proposeForm, proposeTimes } from '@shared/orders/propose-form';
import type { DraftContext } from '@shared/routes/orders';
import type { Instant } from '@shared/time';
import { and, desc, eq, isNotNull } from 'drizzle-orm';
import { findChild } from '../../children/find-child';
import { done, refused, type Outcome } from '../../db/outcome';
import { drafts, orders, orderVersions } from '../../db/schema/orders';
import type { Tx } from '../../db/transaction';
import { loadContext } from '../load-context';
import { followedIsReplaced } from '../work-out-version';
import { makeCode } from './make-code';

export type StartDraft = { childId: string; kind: Kind; followsOrderId: string | null };
export type StartedDraft = { orderId: string; versionId: string; code: string };

/** Opens a new order for a child: its code, version 1, and a first form. */
export async function startDraft(
  tx: Tx,
  now: Instant,
  actor: Actor,
  { childId, kind, followsOrderId }: StartDraft,
): Promise<Outcome<StartedDraft>> {
  const found = await findChild(tx, actor, 'start-draft', childId);
  if (!found.ok) return found;
  const followed = followsOrderId === null ? null : await findFollowed(tx, childId, kind, followsOrderId);
  if (followed === undefined) {
    return refused('not-found', { detail: 'The order to follow is not one of this child.' });
  }
  const except = followsOrderId !== null && followedIsReplaced(kind) ? [followsOrderId] : [];
  const loaded = await loadContext(tx, { hospitalId: actor.hospitalId, childId, except }, now);
  if (loaded === null) return refused('not-found');
  const { context } = loaded;
  const code = await makeCode(tx, now, context.zone);
  const [order] = await tx
    .insert(orders)
    .values({ code, childId, kind, follows: followsOrderId, madeBy: actor.id, madeAt: now })
    .returning({ id: orders.id });
  const orderId = order?.id ?? '';
  const form = followed === null ? proposeForm(kind, context) : followForm(followed, context);
  const versionId = await insertDraft(tx, now, {
    orderId,
    version: 1,
    childId,
    kind,
    authorId: actor.id,
    form,
  });
  const entry = {
    act: 'draft-started' as const,
    subject: { kind: 'order-version', id: versionId },
    child: childId,
    code,
    version: 1,
  };
  return done({ orderId, versionId, code }, { entries: [entry] });
}

/** A version in draft with its form; the order's own row exists. */
export async function insertDraft(
  tx: Tx,
  now: Instant,
  {
    form,
    ...version
  }: {
    orderId: string;
    version: number;
    childId: string;
    kind: Kind;
    authorId: string;
    form: OrderForm;
  },
): Promise<string> {
  const [row] = await tx
    .insert(orderVersions)
    .values({ ...version, state: 'draft', stateSince: now })
    .returning({ id: orderVersions.id });
  const versionId = row?.id ?? '';
  await tx.insert(drafts).values({ versionId, form, savedAt: now });
  return versionId;
}

/** The checked content of an order of this child and kind; null when none was checked, undefined when there is no such order. */
async function findFollowed(tx: Tx, childId: string, kind: Kind, orderId: string) {
  const [order] = await tx
    .select({ id: orders.id })
    .from(orders)
    .where(and(eq(orders.id, orderId), eq(orders.childId, childId), eq(orders.kind, kind)));
  if (order === undefined) return undefined;
  // only what a checker has signed is open to whoever copies it
  const [version] = await tx
    .select({ content: orderVersions.content })
    .from(orderVersions)
    .where(and(eq(orderVersions.orderId, orderId), isNotNull(orderVersions.checkedAt)))
    .orderBy(desc(orderVersions.version))
    .limit(1);
  return version?.content ?? null;
}

/** What was ordered before, on today's weight and times, with the other intake stated anew. */
function followForm(content: string, context: DraftContext): OrderForm {
  const earlier = readContent(content);
  const proposed = proposeForm(earlier.kind, context);
  const stocked = context.products.some(({ id }) => id === earlier.fluid.id);
  return {
    ...formFromContent(earlier, context),
    ...proposeTimes(earlier.kind, context, Number(proposed.hours || 24)),
    weightId: proposed.weightId,
    hours: proposed.hours,
    productId: stocked ? earlier.fluid.id : proposed.productId,
    feedsMl: '',
    drugsMl: '',
    typedRate: '',
    limitReasons: {},
  };
}
