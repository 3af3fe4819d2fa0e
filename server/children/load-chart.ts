import type { Actor } from '@shared/accounts/actor';
import { decimalText } from '@shared/canonical';
import { VERSION_STATES, isEnded } from '@shared/orders/states';
import type { Chart } from '@shared/routes/children';
import { ruleValues } from '@shared/rulebook/read';
import { DAY, instant, parseInstant, toRfc3339, type Instant } from '@shared/time';
import { kilograms } from '@shared/units';
import { dosingWeight } from '@shared/weights/dosing';
import { and, desc, eq, isNull } from 'drizzle-orm';
import { type Refused } from '../db/outcome';
import { accounts } from '../db/schema/accounts';
import { fluidPlans, intakes, results } from '../db/schema/children';
import type { Tx } from '../db/transaction';
import { loadChildHead, loadWeights } from '../orders/chart-parts';
import { loadZone } from '../orders/load-context';
import { rulebookInForce } from '../rulebook/in-force';
import { loadLines } from '../wards/load-lines';
import { workOutOwnDrafts } from '../wards/own-drafts';
import { findChild, noSuchChild } from './find-child';
import { ageOf, childFactsOf, type ChildRow } from './present';

/** Ended orders of the last fortnight stay on the chart; discarded drafts never were orders. Ours. */
const ENDED_SHOWN = 14 * DAY;
const ENDED = VERSION_STATES.filter((state) => isEnded(state) && state !== 'discarded');

/** A child's chart as this person may read it. */
export async function loadChart(
  tx: Tx,
  actor: Actor,
  childId: string,
  now: Instant,
): Promise<{ ok: true; value: Chart } | Refused> {
  const found = await findChild(tx, actor, 'read-child', childId);
  if (!found.ok) return found;
  const zone = await loadZone(tx, actor.hospitalId);
  const { isNewborn } = ageOf(found.child, now, zone);
  const { rulebook } = await rulebookInForce(tx);
  const clock = { now, zone, holdHours: ruleValues(rulebook, 'windows').holdHours };
  const ended = { states: ENDED, since: instant(now - ENDED_SHOWN) };
  const [head, weights, resultRows, intakeRows, plan, lines] = await Promise.all([
    loadChildHead(tx, childId, now, zone),
    loadWeights(tx, childId, { now, isNewborn }),
    loadResults(tx, childId),
    loadIntakes(tx, childId),
    loadPlan(tx, childId),
    loadLines(tx, actor, { childIds: [childId], ended }, clock),
  ]);
  if (head === null) return noSuchChild();
  await workOutOwnDrafts(tx, actor, lines, now);
  const newestFirst = [...lines].sort(
    (a, b) =>
      Number(isEnded(a.row.state)) - Number(isEnded(b.row.state)) || b.row.stateSince - a.row.stateSince,
  );
  return {
    ok: true,
    value: {
      child: head,
      weights,
      dosingWeightId: dosingId(weights, found.child, now, zone),
      results: resultRows,
      intakes: intakeRows,
      plan,
      orders: newestFirst.map(({ line }) => line),
      now: toRfc3339(now),
    },
  };
}

function dosingId(weights: Chart['weights'], child: ChildRow, now: Instant, zone: string): string | null {
  const rows = weights.map((row) => ({
    id: row.id,
    kg: kilograms(Number(row.kg)),
    method: row.method,
    at: parseInstant(row.at) as Instant,
    usable: row.usable,
  }));
  return dosingWeight(rows, childFactsOf(child), now, zone)?.weight.id ?? null;
}

async function loadResults(tx: Tx, childId: string): Promise<Chart['results']> {
  const rows = await tx
    .select()
    .from(results)
    .where(and(eq(results.childId, childId), isNull(results.supersededBy)))
    .orderBy(desc(results.at))
    .limit(60);
  return rows.map(({ analyte, value, unit, at }) => ({
    analyte,
    value: decimalText(value, 3),
    unit,
    at: toRfc3339(at),
  }));
}

async function loadIntakes(tx: Tx, childId: string): Promise<Chart['intakes']> {
  const rows = await tx
    .select({ intake: intakes, recordedBy: accounts.name })
    .from(intakes)
    .innerJoin(accounts, eq(accounts.id, intakes.by))
    .where(and(eq(intakes.childId, childId), isNull(intakes.supersededBy)))
    .orderBy(desc(intakes.at))
    .limit(60);
  return rows.map(({ intake, recordedBy }) => ({
    id: intake.id,
    what: intake.what,
    ml: decimalText(intake.ml, 1),
    at: toRfc3339(intake.at),
    where: intake.place ?? '',
    recordedBy,
  }));
}

async function loadPlan(tx: Tx, childId: string): Promise<Chart['plan']> {
  const [row] = await tx
    .select({ plan: fluidPlans, by: accounts.name })
    .from(fluidPlans)
    .innerJoin(accounts, eq(accounts.id, fluidPlans.by))
    .where(and(eq(fluidPlans.childId, childId), isNull(fluidPlans.endedAt)));
  if (row === undefined) return null;
  const { what, fraction, allowanceMlPer24h: ml, reason, at } = row.plan;
  return {
    kind: what,
    fraction,
    mlPer24h: ml === null ? null : decimalText(ml, 1),
    reason,
    by: row.by,
    at: toRfc3339(at),
  };
}
