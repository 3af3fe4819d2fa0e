import type { Actor } from '@shared/accounts/actor';
import { isConnected } from '@shared/orders/states';
import { and, eq } from 'drizzle-orm';
import type { Command } from '../../db/in-hospital';
import { done, refused } from '../../db/outcome';
import { stays } from '../../db/schema/children';
import { orderVersions, versionIsLive } from '../../db/schema/orders';
import { findChild } from '../find-child';
import { isOpenWard } from './register-child';

type Ok = { ok: true };
const OK: Ok = { ok: true };

/** Moves a child to a ward and bed; its orders go along, its earlier stay ends. */
export const transferChild =
  (actor: Actor, childId: string, to: { wardId: string; bed: string }): Command<Ok> =>
  async (tx, now) => {
    const found = await findChild(tx, actor, 'transfer-child', childId, { lock: true });
    if (!found.ok) return found;
    if (!(await isOpenWard(tx, to.wardId))) {
      return refused('bad-input', { errors: [{ pointer: '/wardId', detail: 'There is no such ward.' }] });
    }
    const { stay } = found;
    await tx.update(stays).set({ to: now }).where(eq(stays.id, stay.id));
    await tx.insert(stays).values({ childId, wardId: to.wardId, bed: to.bed || null, from: now });
    return done(OK, {
      entries: [
        {
          act: 'child-transferred',
          subject: { kind: 'child', id: childId },
          child: childId,
          from: { ward: stay.wardId, bed: stay.bed },
          to: { ward: to.wardId, bed: to.bed },
        },
      ],
    });
  };

/** Ends a child's stay; refused while fluid is connected. */
export const dischargeChild =
  (actor: Actor, childId: string): Command<Ok> =>
  async (tx, now) => {
    const found = await findChild(tx, actor, 'discharge-child', childId, { lock: true });
    if (!found.ok) return found;
    const live = await tx
      .select({ state: orderVersions.state })
      .from(orderVersions)
      .where(and(eq(orderVersions.childId, childId), versionIsLive));
    if (live.some(({ state }) => isConnected(state))) {
      return refused('something-runs', {
        detail: 'An infusion is still connected. Stop or finish it first.',
      });
    }
    await tx.update(stays).set({ to: now }).where(eq(stays.id, found.stay.id));
    return done(OK, {
      entries: [{ act: 'child-discharged', subject: { kind: 'child', id: childId }, child: childId }],
    });
  };
