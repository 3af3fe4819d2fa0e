import type { Actor } from '@shared/accounts/actor';
import { can } from '@shared/orders/can';
import type { registerChildBody } from '@shared/routes/children';
import { and, eq, isNull } from 'drizzle-orm';
import type { z } from 'zod';
import { done, refused, type Outcome } from '../../db/outcome';
import { children, stays } from '../../db/schema/children';
import { wards } from '../../db/schema/hospitals';
import type { Command } from '../../db/in-hospital';
import type { Tx } from '../../db/transaction';
import { loadZone } from '../../orders/load-context';
import { readChildForm } from '../read-child-form';

type Body = z.output<typeof registerChildBody>;

export const isOpenWard = async (tx: Tx, wardId: string): Promise<boolean> =>
  (
    await tx
      .select({ id: wards.id })
      .from(wards)
      .where(and(eq(wards.id, wardId), isNull(wards.closedAt)))
  ).length > 0;

/** Registers a child and admits it to a bed of a ward. */
export const registerChild =
  (actor: Actor, body: Body): Command<{ childId: string }> =>
  async (tx, now): Promise<Outcome<{ childId: string }>> => {
    const verdict = can(actor, 'register-child', body.wardId);
    if (!verdict.allowed) return refused(verdict.code, { detail: verdict.words });
    const read = readChildForm(body, now, await loadZone(tx, actor.hospitalId));
    if (!read.ok) return read;
    if (!(await isOpenWard(tx, body.wardId))) {
      return refused('bad-input', { errors: [{ pointer: '/wardId', detail: 'There is no such ward.' }] });
    }
    const fields = read.value;
    const taken = await tx
      .select({ id: children.id })
      .from(children)
      .where(eq(children.number, fields.number));
    if (taken.length > 0) return numberTaken();
    const [child] = await tx
      .insert(children)
      .values({ ...fields, registeredBy: actor.id, registeredAt: now })
      .returning({ id: children.id });
    const childId = child!.id;
    await tx.insert(stays).values({ childId, wardId: body.wardId, bed: body.bed || null, from: now });
    const to = { number: fields.number, bornOn: fields.bornOn, ward: body.wardId, bed: body.bed };
    return done(
      { childId },
      {
        entries: [{ act: 'child-registered', subject: { kind: 'child', id: childId }, child: childId, to }],
      },
    );
  };

export const numberTaken = () =>
  refused('bad-input', {
    detail: 'This hospital number is registered already. Find the child instead.',
    errors: [{ pointer: '/number', detail: 'This hospital number is registered already.' }],
  });
