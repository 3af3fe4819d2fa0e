import type { Actor } from '@shared/accounts/actor';
import { isEntitled } from '@shared/accounts/actor';
import type { VersionState } from '@shared/orders/states';
import type { ROUTES } from '@shared/routes';
import { ruleValues } from '@shared/rulebook/read';
import { HOUR, instant, toRfc3339, type Instant } from '@shared/time';
import { ageText } from '@shared/children/age';
import type { z } from 'zod';
import { readQueue } from '../checks/read-queue';
import { ageOf } from '../children/present';
import { refused, type Refused } from '../db/outcome';
import type { Tx } from '../db/transaction';
import type { LineClock } from '../orders/present-line';
import { loadZone } from '../orders/load-context';
import { rulebookInForce } from '../rulebook/in-force';
import { forYou } from './for-you';
import { loadLines, type LoadedLine } from './load-lines';
import { workOutOwnDrafts } from './own-drafts';
import { childrenOnWard, findWard, mattersFor, presentWeight, type ChildOnWard } from './queries';

type WardPage = z.input<(typeof ROUTES)['ward']['response']>;

/** Ended orders stay on the ward's list for this long: what a child had is asked at the next round. Ours. */
const ENDED_SHOWN = 12 * HOUR;
const ENDED: readonly VersionState[] = ['stopped', 'finished', 'replaced', 'lapsed', 'countersigned'];

/** The ward page: children by bed, their weight, their orders as this person may see them, and what waits. */
export async function loadWard(
  tx: Tx,
  actor: Actor,
  wardId: string,
  now: Instant,
): Promise<{ ok: true; value: WardPage } | Refused> {
  const [ward, zone, { rulebook }, rows] = await Promise.all([
    findWard(tx, wardId),
    loadZone(tx, actor.hospitalId),
    rulebookInForce(tx),
    childrenOnWard(tx, wardId),
  ]);
  if (ward === undefined) return refused('not-found', { detail: 'There is no such ward.' });
  const clock: LineClock = { now, zone, holdHours: ruleValues(rulebook, 'windows').holdHours };
  const childIds = rows.map(({ child }) => child.id);
  const ended = { states: ENDED, since: instant(now - ENDED_SHOWN) };
  const [lines, matters, queue] = await Promise.all([
    loadLines(tx, actor, { childIds, ended }, clock),
    mattersFor(tx, actor, childIds, isEntitled(actor, 'senior', wardId)),
    readQueue(tx, actor, now),
  ]);
  await workOutOwnDrafts(tx, actor, lines, now);
  const limits = ruleValues(rulebook, 'weight');
  const names = new Map(rows.map(({ child }) => [child.id, `${child.surname}, ${child.given}`]));
  const toCheck = new Set(queue.rows.filter(({ barred }) => barred === null).map((row) => row.versionId));
  return {
    ok: true,
    value: {
      ward,
      now: toRfc3339(now),
      rows: rows.map((row) => ({
        child: presentRow(row, now, zone),
        weight: presentWeight(row, now, zone, limits),
        orders: linesOf(lines, row.child.id),
      })),
      forYou: forYou({ actor, lines, names, toCheck, ...matters, now, zone }),
    },
  };
}

const linesOf = (lines: readonly LoadedLine[], childId: string) =>
  lines.filter(({ row }) => row.childId === childId).map(({ line }) => line);

const presentRow = ({ child, bed }: ChildOnWard, now: Instant, zone: string) => ({
  id: child.id,
  number: child.number,
  surname: child.surname,
  given: child.given,
  ageText: ageText(ageOf(child, now, zone)),
  flags: child.flags,
  bed,
});
