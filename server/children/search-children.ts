import type { Actor } from '@shared/accounts/actor';
import type { ChildHead } from '@shared/routes/children';
import type { Instant } from '@shared/time';
import { and, asc, desc, eq, inArray, or, sql, type SQL } from 'drizzle-orm';
import { children, stays } from '../db/schema/children';
import { wards } from '../db/schema/hospitals';
import type { Tx } from '../db/transaction';
import { loadZone } from '../orders/load-context';
import { presentChild } from './present';

const SHOWN = 20;
/** Sorts after every character a name holds. */
const LAST = '\u{10fffd}';

/** Text that begins like this, told as a range: under row-level security `like` cannot use an index. */
const beginsWith = (column: SQL | typeof children.number, prefix: SQL): SQL =>
  sql`(${column} >= ${prefix} and ${column} < ${prefix} || ${LAST}::text)`;

/**
 * Children by the beginning of the hospital number, the surname, the given name (of those here now), or
 * "surname, given". People find children of their own wards, a lead those of the hospital.
 */
export async function searchChildren(
  tx: Tx,
  actor: Actor,
  text: string,
  now: Instant,
): Promise<{ children: ChildHead[]; more: boolean }> {
  const typed = text.normalize('NFC').trim();
  if (typed === '') return { children: [], more: false };
  const stay = newestStay(tx);
  const query = tx
    .select({ child: children, wardId: stay.wardId, wardName: wards.name, bed: stay.bed, to: stay.to })
    .from(children)
    .innerJoinLateral(stay, sql`true`)
    .innerJoin(wards, eq(wards.id, stay.wardId));
  const rows = await query
    .where(and(matches(typed, stay), onWardsOf(actor, stay)))
    .orderBy(asc(children.surnameKey), asc(children.given), asc(children.number))
    .limit(SHOWN + 1);
  const zone = await loadZone(tx, actor.hospitalId);
  return {
    children: rows.slice(0, SHOWN).map(({ child, wardId, wardName, bed, to }) => {
      const place = to === null ? { wardId, wardName, bed } : { wardId: null, wardName: null, bed: null };
      return presentChild(child, place, now, zone);
    }),
    more: rows.length > SHOWN,
  };
}

const newestStay = (tx: Tx) =>
  tx
    .select({ wardId: stays.wardId, bed: stays.bed, to: stays.to })
    .from(stays)
    .where(eq(stays.childId, children.id))
    .orderBy(desc(sql`${stays.to} is null`), desc(stays.from))
    .limit(1)
    .as('newest_stay');
type NewestStay = ReturnType<typeof newestStay>;

function onWardsOf(actor: Actor, stay: NewestStay): SQL | undefined {
  if (actor.roles.includes('lead')) return undefined;
  const ids = actor.wards.map(({ wardId }) => wardId);
  return ids.length === 0 ? sql`false` : inArray(stay.wardId, ids);
}

function matches(typed: string, stay: NewestStay): SQL | undefined {
  const given = sql`lower(${children.given})`;
  const [surname = '', rest] = typed.split(/\s*,\s*/, 2);
  const bySurname = beginsWith(sql`${children.surnameKey}`, sql`lower(${surname})`);
  if (rest !== undefined) return and(bySurname, beginsWith(given, sql`lower(${rest})`));
  return or(
    bySurname,
    beginsWith(children.number, sql`${typed}::text`),
    beginsWith(children.number, sql`upper(${typed})`),
    and(sql`${stay.to} is null`, beginsWith(given, sql`lower(${typed})`)),
  );
}
