import type { Actor } from '@shared/accounts/actor';
import type { editChildBody } from '@shared/routes/children';
import { toRfc3339 } from '@shared/time';
import { and, eq, ne } from 'drizzle-orm';
import type { z } from 'zod';
import type { Command } from '../../db/in-hospital';
import { done, refused } from '../../db/outcome';
import { children } from '../../db/schema/children';
import { loadZone } from '../../orders/load-context';
import { findChild } from '../find-child';
import type { ChildRow } from '../present';
import { readChildForm, type ReadChild } from '../read-child-form';
import { numberTaken } from './register-child';

type Body = z.output<typeof editChildBody>;
type Plain = Record<string, string | number | string[] | null>;

/** Corrects what is recorded of a child; the ledger keeps what changed, before and after. */
export const editChild =
  (actor: Actor, childId: string, body: Body): Command<{ rev: number }> =>
  async (tx, now) => {
    const found = await findChild(tx, actor, 'edit-child', childId, { lock: true });
    if (!found.ok) return found;
    const { child } = found;
    if (child.rev !== body.rev) {
      return refused('stale', {
        detail: 'Someone has changed this child’s details since you opened them.',
        data: { rev: child.rev },
      });
    }
    const read = readChildForm(body, now, await loadZone(tx, actor.hospitalId));
    if (!read.ok) return read;
    const fields = read.value;
    const taken = await tx
      .select({ id: children.id })
      .from(children)
      .where(and(eq(children.number, fields.number), ne(children.id, childId)));
    if (taken.length > 0) return numberTaken();
    const rev = child.rev + 1;
    await tx
      .update(children)
      .set({ ...fields, rev })
      .where(eq(children.id, childId));
    const entry = { act: 'child-edited', subject: { kind: 'child', id: childId }, child: childId } as const;
    return done({ rev }, { entries: [{ ...entry, ...changes(child, fields) }] });
  };

const KEYS = [
  'number',
  'surname',
  'given',
  'bornOn',
  'bornAt',
  'sex',
  'gestationWeeks',
  'gestationDays',
  'allergies',
  'flags',
] as const satisfies readonly (keyof ReadChild)[];

function changes(before: ChildRow, after: ReadChild): { from: Plain; to: Plain } {
  const plain = (child: Pick<ChildRow, (typeof KEYS)[number]>): Plain => ({
    ...child,
    bornAt: child.bornAt === null ? null : toRfc3339(child.bornAt),
  });
  const [from, to] = [plain(before), plain(after)];
  const changed = KEYS.filter((key) => JSON.stringify(from[key]) !== JSON.stringify(to[key]));
  const only = (of: Plain): Plain => Object.fromEntries(changed.map((key) => [key, of[key] ?? null]));
  return { from: only(from), to: only(to) };
}
