import { decimalText } from '@shared/canonical';
import { ageAt } from '@shared/children/age';
import type { DraftContext } from '@shared/routes/orders';
import { parseInstant, toRfc3339, type Instant } from '@shared/time';
import { lastMeasuredAt } from '@shared/weights/dosing';
import { kilograms } from '@shared/units';
import { and, asc, desc, eq, isNull, sql } from 'drizzle-orm';
import { fluidPlans, results } from '../db/schema/children';
import { hospitals } from '../db/schema/hospitals';
import { statement } from '../db/statement';
import type { Tx } from '../db/transaction';
import { rulebookInForce } from '../rulebook/in-force';
import { stockedProducts } from '../shelf/queries';
import { loadChildHead, loadWeights } from './chart-parts';
import { countFluids, type HiddenBolus } from './count-fluids';

/** Whose chart is read, and for which order. */
export type ContextOf = {
  hospitalId: string;
  childId: string;
  /** This order, and the one it follows: neither counts as another fluid. */
  except: readonly string[];
};

export type LoadedContext = {
  context: DraftContext;
  /** Boluses of this child that wait for their check; counted at signing, shown to nobody. */
  hiddenBoluses: readonly HiddenBolus[];
};

/** The chart as every work-out on the server reads it; null where there is no such child. */
export async function loadContext(tx: Tx, of: ContextOf, now: Instant): Promise<LoadedContext | null> {
  const zone = await loadZone(tx, of.hospitalId);
  const child = await loadChildHead(tx, of.childId, now, zone);
  if (child === null) return null;
  const bornAt = child.bornAt === null ? undefined : parseInstant(child.bornAt);
  const { isNewborn } = ageAt({ bornOn: child.bornOn, bornAt }, now, zone);
  const weights = await loadWeights(tx, of.childId, { now, isNewborn });
  const { boluses, hidden, running } = await countFluids(tx, of.childId, of.except, now);
  const { number, sha256, content } = await rulebookInForce(tx);
  const context: DraftContext = {
    child,
    weights,
    lastMeasuredAt: lastWeighed(weights, now),
    products: await stockedProducts(tx),
    ...(await loadResults(tx, of.childId)),
    bolusesLast24h: boluses,
    running,
    plan: await loadPlan(tx, of.childId),
    rulebook: { number, sha256, content },
    zone,
    now: toRfc3339(now),
  };
  return { context, hiddenBoluses: hidden };
}

const zoneOfHospital = statement((tx) =>
  tx
    .select({ zone: hospitals.zone })
    .from(hospitals)
    .where(eq(hospitals.id, sql.placeholder('id'))),
);

/** The hospital's time zone. */
export async function loadZone(tx: Tx, hospitalId: string): Promise<string> {
  const [row] = await zoneOfHospital(tx, { id: hospitalId });
  if (row === undefined) throw new Error('no such hospital');
  return row.zone;
}

function lastWeighed(weights: DraftContext['weights'], now: Instant): string | null {
  const rows = weights.flatMap(({ kg, method, at, usable }) => {
    const moment = parseInstant(at);
    return moment === undefined ? [] : [{ kg: kilograms(Number(kg)), method, at: moment, usable }];
  });
  const last = lastMeasuredAt(rows, now);
  return last === undefined ? null : toRfc3339(last);
}

/** The analyte under which passing urine is charted; it has no value of its own. */
const URINE_PASSED = 'urine-passed';

async function loadResults(
  tx: Tx,
  childId: string,
): Promise<Pick<DraftContext, 'results' | 'urinePassedAt'>> {
  const rows = await tx
    .selectDistinctOn([results.analyte], {
      analyte: results.analyte,
      value: results.value,
      unit: results.unit,
      at: results.at,
    })
    .from(results)
    .where(and(eq(results.childId, childId), isNull(results.supersededBy)))
    .orderBy(asc(results.analyte), desc(results.at));
  const urine = rows.find(({ analyte }) => analyte === URINE_PASSED);
  return {
    results: rows
      .filter(({ analyte }) => analyte !== URINE_PASSED)
      .map(({ analyte, value, unit, at }) => ({
        analyte,
        value: decimalText(value, 3),
        unit,
        at: toRfc3339(at),
      })),
    urinePassedAt: urine === undefined ? null : toRfc3339(urine.at),
  };
}

async function loadPlan(tx: Tx, childId: string): Promise<DraftContext['plan']> {
  const [plan] = await tx
    .select()
    .from(fluidPlans)
    .where(and(eq(fluidPlans.childId, childId), isNull(fluidPlans.endedAt)));
  if (plan === undefined) return null;
  return {
    kind: plan.what,
    fraction: plan.fraction,
    mlPer24h: plan.allowanceMlPer24h === null ? null : decimalText(plan.allowanceMlPer24h, 1),
    words: plan.reason,
  };
}
