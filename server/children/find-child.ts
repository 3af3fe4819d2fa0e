import type { Actor } from '@shared/accounts/actor';
import { can, type FreeAct } from '@shared/orders/can';
import { desc, eq, sql } from 'drizzle-orm';
import { refused, type Refused } from '../db/outcome';
import { children, stays } from '../db/schema/children';
import { statement } from '../db/statement';
import type { Tx } from '../db/transaction';
import type { ChildRow } from './present';

export type FoundChild = {
  ok: true;
  child: ChildRow;
  /** The newest stay; `to` is null while the child is here. */
  stay: { id: string; wardId: string; bed: string | null; to: number | null };
};

const selectChild = (tx: Tx) =>
  tx
    .select()
    .from(children)
    .where(eq(children.id, sql.placeholder('id')));
const childById = statement(selectChild);
const heldChildById = statement((tx) => selectChild(tx).for('update'));
const newestStay = statement((tx) =>
  tx
    .select({ id: stays.id, wardId: stays.wardId, bed: stays.bed, to: stays.to })
    .from(stays)
    .where(eq(stays.childId, sql.placeholder('childId')))
    .orderBy(desc(sql`${stays.to} is null`), desc(stays.from))
    .limit(1),
);

/** The refusal for an id that names nobody in this hospital. */
export const noSuchChild = () => refused('not-found', { detail: 'There is no such child in this hospital.' });

/**
 * The child a person wants to act on, or the refusal. Who was discharged is still read by the last ward; acts want
 * the child to be here. With `lock` the child's row is held until commit: it serialises what sums over a child.
 */
export async function findChild(
  tx: Tx,
  actor: Actor,
  act: FreeAct,
  childId: string,
  { lock = false }: { lock?: boolean } = {},
): Promise<FoundChild | Refused> {
  const [child] = await (lock ? heldChildById : childById)(tx, { id: childId });
  if (child === undefined) return noSuchChild();
  const [stay] = await newestStay(tx, { childId });
  const verdict = can(actor, act, stay?.wardId);
  if (!verdict.allowed) return refused(verdict.code, { detail: verdict.words });
  if (stay === undefined) return noSuchChild();
  if (stay.to !== null && act !== 'read-child' && act !== 'read-timeline') {
    return refused('conflict', { detail: 'The child has been discharged.' });
  }
  return { ok: true, child, stay };
}
