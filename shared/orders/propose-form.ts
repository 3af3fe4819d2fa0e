import {
  type BolusOrder,
  type FluidComposition,
  type Kind,
  type MaintenanceOrder,
  type WorkOutRequest,
} from '../calc/types';
import { ageAt, type Age } from '../children/age';
import { above } from '../rounding';
import type { DraftContext } from '../routes/orders';
import { ruleValues } from '../rulebook/read';
import type { Rulebook } from '../rulebook/document';
import { HOUR, instant, localDateTime, MINUTE, parseInstant, type Instant } from '../time';
import { hours, millilitres, millilitresPerKg, minutes } from '../units';
import { dosingWeight, type DosingChoice } from '../weights/dosing';
import { chartFacts, dosingWeight as dosingFacts, fluidOf, rulebookOf } from './chart-facts';
import { emptyOrderForm, type OrderForm } from './form';
import { proposeFluid } from './propose-fluid';

/** NICE NG29: reassess 12-hourly, electrolytes and glucose 24-hourly. */
const REVIEW_HOURS = 12;
const BLOODS_HOURS = 24;
const QUARTER = 15 * MINUTE;

/** The next quarter of an hour. */
const nextQuarter = (now: Instant): Instant => instant(Math.ceil(now / QUARTER) * QUARTER);

/** The three times of a form, as its fields take them. */
export function proposeTimes(
  kind: Kind,
  context: Pick<DraftContext, 'now' | 'zone'>,
  lifeHours = BLOODS_HOURS,
) {
  const now = nowOf(context);
  const start = kind === 'bolus' ? now : nextQuarter(now);
  const after = (ms: number) => localDateTime(instant(start + ms), context.zone);
  return {
    plannedStart: after(0),
    reviewBy: kind === 'bolus' ? '' : after(Math.min(REVIEW_HOURS, lifeHours) * HOUR),
    bloodsBy: kind === 'bolus' ? '' : after(BLOODS_HOURS * HOUR),
  };
}

function nowOf({ now }: Pick<DraftContext, 'now'>): Instant {
  const at = parseInstant(now);
  if (at === undefined) throw new RangeError(`not an instant: ${now}`);
  return at;
}

/**
 * The first form of a new draft. What has to be stated (feeds, drugs, the reason) stays empty; what is proposed is
 * never past a limit.
 */
export function proposeForm(kind: Kind, context: DraftContext): OrderForm {
  const rulebook = rulebookOf(context);
  const at = nowOf(context);
  const facts = chartFacts(context);
  const weight = proposeWeight(context, at);
  const age = ageAt(facts.child, at, context.zone);
  const form = { ...emptyOrderForm(kind), line: 'peripheral', weightId: weight?.weight.id ?? '' };
  const scene: Scene | undefined = weight && {
    request: { ...facts, at, line: 'peripheral', weight: dosingFacts(weight.weight.row) },
    fluids: context.products.map(fluidOf),
    rulebook,
    age,
    isEstimate: weight.isEstimate,
  };
  return kind === 'maintenance'
    ? proposeMaintenance(form, context, { rulebook, age, scene })
    : proposeBolus(form, context, { rulebook, age, scene });
}

type Scene = {
  request: Omit<WorkOutRequest, 'order'>;
  fluids: readonly FluidComposition[];
  rulebook: Rulebook;
  age: Age;
  isEstimate: boolean;
};
type Known = { rulebook: Rulebook; age: Age; scene: Scene | undefined };

type ChartRow = Parameters<typeof dosingWeight>[0][number] & {
  id: string;
  row: DraftContext['weights'][number];
};

function proposeWeight(context: DraftContext, at: Instant): DosingChoice<ChartRow> | undefined {
  const rows = context.weights.map((row) => ({ ...dosingFacts(row), id: row.id, usable: row.usable, row }));
  return dosingWeight<ChartRow>(rows, chartFacts(context).child, at, context.zone);
}

function proposeMaintenance(
  form: OrderForm,
  context: DraftContext,
  { rulebook, age, scene }: Known,
): OrderForm {
  const method = age.isNewborn ? 'newborn' : ruleValues(rulebook, 'maintenance').method;
  const fraction = proposeFraction(context, rulebook);
  const life = lifeHours(scene, rulebook);
  const order = (fluid: FluidComposition): MaintenanceOrder => ({
    kind: 'maintenance',
    method: method as MaintenanceOrder['method'],
    fraction: fraction || 'full',
    feeds: millilitres(0),
    drugs: millilitres(0),
    hours: hours(life),
    fluid,
  });
  const fluid = scene && proposeFluid(scene.request, order, scene.fluids, rulebook);
  return {
    ...form,
    ...proposeTimes('maintenance', context, life),
    method,
    fraction,
    productId: fluid?.id ?? '',
    hours: String(life),
    urgency: 'routine',
  };
}

/** A day; half of it on a weight that was not measured. */
function lifeHours(scene: Scene | undefined, rulebook: Rulebook): number {
  const { hoursMost } = ruleValues(rulebook, 'maintenance');
  const shortened = Math.floor(hoursMost / ruleValues(rulebook, 'weight').lifeDivisor);
  return scene?.isEstimate ? shortened : hoursMost;
}

/** By the plan on the chart, else by the flags; heart, kidney and liver trouble are asked about, never full by default. */
function proposeFraction(context: DraftContext, rulebook: Rulebook): MaintenanceOrder['fraction'] | '' {
  const plan = chartFacts(context).plan;
  if (plan?.kind === 'fraction') return plan.fraction;
  const { flags } = context.child;
  if (flags.includes('cardiac') || flags.includes('renal') || flags.includes('hepatic')) return '';
  return flags.includes('raised-adh') ? ruleValues(rulebook, 'fraction').raisedAdh : 'full';
}

function proposeBolus(form: OrderForm, context: DraftContext, { rulebook, age, scene }: Known): OrderForm {
  const rules = ruleValues(rulebook, 'bolus');
  const { flags } = context.child;
  const isCareful = flags.includes('cardiac') || flags.includes('renal') || flags.includes('low-albumin');
  const mlPerKg = isCareful
    ? rules.carefulMlPerKg
    : age.isNewborn
      ? rules.newbornMlPerKg
      : rules.childMlPerKg;
  const volume = mlPerKg * (scene?.request.weight.kg ?? 0);
  const dose = above(volume, rules.brimMl)
    ? { doseBy: 'volume', volumeMl: String(rules.brimMl) }
    : { doseBy: 'weight', mlPerKg: String(mlPerKg) };
  const order = (fluid: FluidComposition): BolusOrder => ({
    kind: 'bolus',
    dose: { by: 'weight', mlPerKg: millilitresPerKg(mlPerKg) },
    over: minutes(rules.overMinutes),
    route: 'syringe',
    fluid,
  });
  const fluid = scene && proposeFluid(scene.request, order, scene.fluids, rulebook);
  return {
    ...form,
    ...dose,
    ...proposeTimes('bolus', context),
    overMinutes: String(rules.overMinutes),
    route: 'syringe',
    productId: fluid?.id ?? '',
    urgency: 'urgent',
  };
}
