import type { BolusOrder, MaintenanceOrder, WorkOut, WorkOutRequest } from '../calc/types';
import { canonicalText, decimalText } from '../canonical';
import { ageAt, ageText } from '../children/age';
import { toDecimals } from '../rounding';
import type { DraftContext } from '../routes/orders';
import type { Rulebook } from '../rulebook/document';
import { toRfc3339 } from '../time';
import { CONTENT_SCHEMA, orderContentSchema, type OrderContent } from './content';
import type { OrderForm } from './form';
import { isHighRisk } from './high-risk';
import { orderWindows } from './order-windows';
import type { OrderExtras } from './read-form';
import { reasonFor } from './sort-limits';

type WorkedOut = Extract<WorkOut, { ok: true }>;

export type ContentParts = {
  code: string;
  version: number;
  form: Pick<OrderForm, 'limitReasons'>;
  request: WorkOutRequest;
  extras: OrderExtras;
  workOut: WorkedOut;
  context: Pick<DraftContext, 'child' | 'weights' | 'products' | 'rulebook'>;
  rulebook: Rulebook;
};

/** A figure that must fit its scale as it is: throws where it does not. */
const exact = (value: number, scale: number): string => decimalText(value, scale);
/** A derived figure, rounded to its scale. */
const rounded = (value: number, scale: number): string => decimalText(toDecimals(value, scale), scale);
const orNull = (value: number | undefined, scale: number): string | null =>
  value === undefined ? null : exact(value, scale);

/**
 * What is signed, made from the draft and the chart alone: no clock enters it, so the same draft gives the same
 * bytes when a senior is asked, agrees, and when it is signed.
 */
export function buildContent(parts: ContentParts): OrderContent {
  const { code, version, request, extras, workOut, context, rulebook } = parts;
  const { order } = request;
  return {
    schema: CONTENT_SCHEMA,
    code,
    version,
    kind: order.kind,
    child: childSnapshot(parts),
    weight: weightSnapshot(parts),
    reason: extras.reason,
    urgency: extras.urgency,
    line: request.line,
    inputs: order.kind === 'maintenance' ? maintenanceInputs(order, extras) : bolusInputs(order),
    fluid: fluidSnapshot(parts),
    figures: figureTexts(workOut),
    ...workings(parts),
    gauge: gaugeTexts(workOut),
    readBack: workOut.readBack,
    calc: workOut.calc,
    rulebook: { number: context.rulebook.number, sha256: context.rulebook.sha256 },
    isHighRisk: highRisk(parts),
    ...timeTexts(orderWindows(order, extras.plannedStart, rulebook)),
    reviewBy: extras.reviewBy === null ? null : toRfc3339(extras.reviewBy),
    bloodsBy: extras.bloodsBy === null ? null : toRfc3339(extras.bloodsBy),
  };
}

const timeTexts = ({ plannedStart, startBy, lapsesAt }: ReturnType<typeof orderWindows>) => ({
  plannedStart: toRfc3339(plannedStart),
  startBy: toRfc3339(startBy),
  lapsesAt: toRfc3339(lapsesAt),
});

function childSnapshot({ context: { child }, request }: ContentParts): OrderContent['child'] {
  const { gestationWeeks: weeks, gestationDays: days } = child;
  return {
    id: child.id,
    number: child.number,
    surname: child.surname,
    given: child.given,
    bornOn: child.bornOn,
    bornAt: child.bornAt,
    sex: child.sex,
    gestation: weeks === null ? null : days === null ? String(weeks) : `${weeks}+${days}`,
    flags: child.flags,
    allergies: child.allergies,
    ageText: ageText(ageAt(request.child, request.at, request.zone)),
  };
}

const weightRow = ({ context, extras }: ContentParts) =>
  context.weights.find((row) => row.id === extras.weightId);

function weightSnapshot(parts: ContentParts): OrderContent['weight'] {
  const { weight } = parts.request;
  return {
    id: parts.extras.weightId,
    kg: exact(weight.kg, 3),
    method: weight.method,
    at: toRfc3339(weight.at),
  };
}

function maintenanceInputs(order: MaintenanceOrder, extras: OrderExtras): OrderContent['inputs'] {
  return {
    kind: 'maintenance',
    method: order.method,
    fraction: order.fraction,
    fractionReason: order.fractionReason ?? null,
    temperatureC: orNull(order.temperatureC, 1),
    newbornMlPerKgPerDay: orNull(order.newbornMlPerKgPerDay, 1),
    feedsMl: exact(order.feeds, 1),
    feedsNote: extras.feedsNote,
    drugsMl: exact(order.drugs, 1),
    drugsNote: extras.drugsNote,
    typedRate: orNull(order.typedRate, 1),
    hours: exact(order.hours, 0),
  };
}

const bolusInputs = (order: BolusOrder): OrderContent['inputs'] => ({
  kind: 'bolus',
  doseBy: order.dose.by,
  mlPerKg: order.dose.by === 'weight' ? exact(order.dose.mlPerKg, 1) : null,
  volumeMl: order.dose.by === 'volume' ? exact(order.dose.volume, 1) : null,
  overMinutes: exact(order.over, 0),
  route: order.route,
  advisedBy: order.advisedBy ?? null,
});

function fluidSnapshot({ request: { order } }: ContentParts): OrderContent['fluid'] {
  const { fluid } = order;
  return {
    id: fluid.id,
    name: fluid.name,
    base: fluid.base,
    addedPotassium: exact(fluid.addedPotassium, 2),
    sodium: exact(fluid.sodium, 2),
    potassium: exact(fluid.potassium, 2),
    chloride: exact(fluid.chloride, 2),
    calcium: exact(fluid.calcium, 2),
    magnesium: exact(fluid.magnesium, 2),
    lactate: exact(fluid.lactate, 2),
    acetate: exact(fluid.acetate, 2),
    gluconate: exact(fluid.gluconate, 2),
    glucoseGPerL: exact(fluid.glucoseGPerL, 2),
    osmolarity: exact(fluid.osmolarity, 2),
    readyMixed: fluid.readyMixed,
    highRisk: fluid.highRisk,
  };
}

function figureTexts({ figures }: WorkedOut): OrderContent['figures'] {
  if (figures.kind === 'maintenance') {
    return {
      rateMlPerH: exact(figures.rate, 1),
      volumeMl: exact(figures.volume, 1),
      hours: exact(figures.hours, 0),
      overMinutes: null,
      mlPerKg: null,
      perHourExact: rounded(figures.perHourExact, 4),
      fullMl: rounded(figures.fullMl, 1),
    };
  }
  return {
    rateMlPerH: orNull(figures.rate, 1),
    volumeMl: exact(figures.volume, 1),
    hours: null,
    overMinutes: exact(figures.over, 0),
    mlPerKg: rounded(figures.mlPerKg, 2),
    perHourExact: null,
    fullMl: null,
  };
}

function workings({
  workOut,
  form,
}: ContentParts): Pick<OrderContent, 'steps' | 'gives' | 'limits' | 'otherBrims'> {
  return {
    steps: workOut.steps.map(({ label, working, result, unit, source, mark }) => ({
      label,
      working,
      result,
      unit,
      source,
      mark: mark ?? null,
    })),
    gives: workOut.gives.map(({ code, label, text, unit }) => ({ code, label, text, unit })),
    limits: workOut.limits.map(({ code, strength, title, text, met, source }) => ({
      code,
      strength,
      title,
      text,
      met,
      source,
      reason: reasonFor(form, code) || null,
    })),
    otherBrims: workOut.otherBrims.map(({ code, label, value, limit, text }) => ({
      code,
      label,
      value: rounded(value, 4),
      limit: rounded(limit, 4),
      text,
    })),
  };
}

const gaugeTexts = ({ gauge }: WorkedOut): OrderContent['gauge'] => ({
  orderMl: rounded(gauge.orderMl, 1),
  brimMl: rounded(gauge.brimMl, 1),
  brimNote: gauge.brimNote,
  bands: gauge.bands.map(({ label, ml, fullMl }) => ({
    label,
    ml: rounded(ml, 1),
    fullMl: rounded(fullMl, 1),
  })),
  ghosts: gauge.ghosts.map(({ label, ml }) => ({ label, ml: rounded(ml, 1) })),
});

function highRisk(parts: ContentParts): boolean {
  const { request, workOut, rulebook } = parts;
  const z = weightRow(parts)?.z ?? null;
  const facts = {
    potassium: request.order.fluid.potassium,
    isHighRiskProduct: request.order.fluid.highRisk,
    isNewborn: ageAt(request.child, request.at, request.zone).isNewborn,
    weightZ: z === null ? null : Number(z),
    limits: workOut.limits,
  };
  return isHighRisk(facts, rulebook);
}

/** The bytes that are hashed, signed and stored. */
export const contentText = (content: OrderContent): string => canonicalText(content);

/** Stored content, read by the schema of its own shape number; throws where the text is no content. */
export const readContent = (text: string): OrderContent => orderContentSchema.parse(JSON.parse(text));
