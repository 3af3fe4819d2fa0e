import type { Actor } from '@shared/accounts/actor';
import { decimalText } from '@shared/canonical';
import type { Fraction } from '@shared/calc/types';
import { readDecimal } from '@shared/decimal-input';
import { millilitres } from '@shared/units';
import { and, eq, isNull } from 'drizzle-orm';
import type { Command } from '../../db/in-hospital';
import { done, refused, type Refused } from '../../db/outcome';
import { fluidPlans } from '../../db/schema/children';
import { findChild } from '../find-child';

type Body = {
  kind: 'fraction' | 'allowance' | 'none';
  fraction: Fraction | null;
  mlPer24h: string | null;
  reason: string;
};

/** What the field takes; the calculation holds it against the child's own figure. */
const ALLOWANCE = { decimals: 1, min: 1, max: 5000, unit: 'mL in 24 h' } as const;

type Plan = Pick<typeof fluidPlans.$inferInsert, 'what' | 'fraction' | 'allowanceMlPer24h'>;

/** A consultant's plan for all fluids of a child: the newest one holds, "none" ends it. */
export const setFluidPlan =
  (actor: Actor, childId: string, body: Body): Command<{ ok: true }> =>
  async (tx, now) => {
    const found = await findChild(tx, actor, 'set-fluid-plan', childId, { lock: true });
    if (!found.ok) return found;
    const plan = readPlan(body);
    if (plan !== null && 'ok' in plan) return plan;
    await tx
      .update(fluidPlans)
      .set({ endedAt: now, endedBy: actor.id })
      .where(and(eq(fluidPlans.childId, childId), isNull(fluidPlans.endedAt)));
    if (plan !== null) {
      await tx.insert(fluidPlans).values({ ...plan, childId, reason: body.reason, by: actor.id, at: now });
    }
    const entry = { act: 'fluid-plan-set', subject: { kind: 'child', id: childId }, child: childId } as const;
    return done({ ok: true as const }, { entries: [{ ...entry, to: inWords(plan), reason: body.reason }] });
  };

const owed = (pointer: string, detail: string): Refused =>
  refused('bad-input', { detail: 'Some entries need another look.', errors: [{ pointer, detail }] });

function readPlan({ kind, fraction, mlPer24h }: Body): Plan | Refused | null {
  if (kind === 'none') return null;
  if (kind === 'fraction') {
    return fraction === null ? owed('/fraction', 'Choose a fraction.') : { what: 'fraction', fraction };
  }
  const read = readDecimal(mlPer24h ?? '', ALLOWANCE);
  return read.ok
    ? { what: 'allowance', allowanceMlPer24h: millilitres(read.value) }
    : owed('/mlPer24h', read.message);
}

function inWords(plan: Plan | null): Record<string, string> {
  if (plan === null) return { kind: 'none' };
  const { what, fraction, allowanceMlPer24h: ml } = plan;
  if (typeof ml === 'number') return { kind: what, mlPer24h: decimalText(ml, 1) };
  return { kind: what, fraction: fraction ?? '' };
}
