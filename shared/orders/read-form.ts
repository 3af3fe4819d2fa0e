import {
  BOLUS_ROUTES,
  FRACTIONS,
  KINDS,
  LINE_CLASSES,
  MAINTENANCE_METHODS,
  type BolusOrder,
  type FluidComposition,
  type Kind,
  type MaintenanceOrder,
  type OrderInputs,
  type WorkOutRequest,
} from '../calc/types';
import type { DraftContext } from '../routes/orders';
import { HOUR, parseInstant, type Instant } from '../time';
import { hours, millilitres, millilitresPerHour, millilitresPerKg, minutes } from '../units';
import { chartFacts, dosingWeight, fluidOf } from './chart-facts';
import { URGENCIES, type OrderForm, type OrderFormField, type Urgency } from './form';
import { FieldReader } from './read-fields';

/** What the form says beyond the calculation. */
export type OrderExtras = {
  reason: string;
  urgency: Urgency;
  plannedStart: Instant;
  reviewBy: Instant | null;
  bloodsBy: Instant | null;
  /** Null means anyone on the ward. */
  checkerId: string | null;
  weightId: string;
  productId: string;
  feedsNote: string;
  drugsNote: string;
};

export type FormReading =
  | { ok: true; request: WorkOutRequest; extras: OrderExtras }
  | {
      ok: false;
      /** Fields that are still empty: `fields` has their words too, a form shows them once it is asked to sign. */
      missing: OrderFormField[];
      fields: Partial<Record<OrderFormField, string>>;
    };

/** How far a planned start may lie back or ahead; ours. */
const START_BACK_MS = HOUR;
const START_AHEAD_MS: Readonly<Record<Kind, number>> = { maintenance: 24 * HOUR, bolus: 2 * HOUR };

/**
 * Reads the raw text of an order form against its chart: every number by the rules of typed decimals, nothing
 * assumed and nothing repaired. The work-out is made for the planned start, so that the same draft gives the same
 * figures whenever it is read.
 */
export function readOrderForm(form: OrderForm, context: DraftContext): FormReading {
  const read = new FieldReader(form, context.zone);
  const kind = read.oneOf('kind', KINDS, 'Say what kind of order this is.');
  const parts = {
    reason: readReason(read),
    weight: readWeight(read, context),
    order: kind && readOrder(read, kind, context),
    line: read.oneOf('line', LINE_CLASSES, 'Say what kind of line it goes through.'),
    urgency: readUrgency(read, kind),
    ...readTimes(read, kind, context),
  };
  const { reason, weight, order, line, urgency, plannedStart } = parts;
  if (!read.isClean || !weight || !order || !line || !urgency || !reason || plannedStart === undefined) {
    return { ok: false, missing: read.missing, fields: read.fields };
  }
  return {
    ok: true,
    request: { ...chartFacts(context), at: plannedStart, weight: dosingWeight(weight), line, order },
    extras: {
      reason,
      urgency,
      plannedStart,
      reviewBy: parts.reviewBy ?? null,
      bloodsBy: parts.bloodsBy ?? null,
      checkerId: read.text('checkerId') === '' ? null : read.text('checkerId'),
      weightId: weight.id,
      productId: order.fluid.id,
      feedsNote: read.text('feedsNote'),
      drugsNote: read.text('drugsNote'),
    },
  };
}

/** A number with the unit of a dose: the reason is read by the checker before the check. */
const FIGURE = /\d\s*(?:%|ml|mls|l\b|litres?\b|kg|g\b|mg|mmol|mol)/i;

function readReason(read: FieldReader): string | undefined {
  const reason = read.required('reason', 'Say what the fluid is for, in a few words.');
  if (reason === undefined) return undefined;
  if (reason.length < 3) return read.wrong('reason', 'Say what the fluid is for, in a few words.');
  if (FIGURE.test(reason)) {
    return read.wrong('reason', 'Leave doses and volumes out: the checker reads this before the check.');
  }
  return reason;
}

function readWeight(read: FieldReader, context: DraftContext): DraftContext['weights'][number] | undefined {
  const id = read.required('weightId', 'Choose the weight to dose on, or record one first.');
  if (id === undefined) return undefined;
  const weight = context.weights.find((row) => row.id === id);
  if (weight === undefined) return read.wrong('weightId', 'This weight is not on the chart any more.');
  return weight.usable
    ? weight
    : read.wrong('weightId', 'A second measurement of this weight is owed first.');
}

function readUrgency(read: FieldReader, kind: Kind | undefined): Urgency | undefined {
  const urgency = read.oneOf('urgency', URGENCIES, 'Say how urgent it is.');
  if (urgency === 'emergency' && kind === 'maintenance') {
    return read.wrong('urgency', 'Maintenance is routine or urgent; an emergency is a bolus.');
  }
  return urgency;
}

function readTimes(read: FieldReader, kind: Kind | undefined, context: DraftContext) {
  const plannedStart = readStart(read, kind, context);
  const isMaintenance = kind === 'maintenance';
  const by = (field: 'reviewBy' | 'bloodsBy', missing: string) => {
    const at = isMaintenance ? read.moment(field, missing) : read.optionalMoment(field);
    if (at === undefined || plannedStart === undefined) return at;
    if (at <= plannedStart) return read.wrong(field, 'This lies before the start.');
    return at - plannedStart > 24 * HOUR ? read.wrong(field, 'At most 24 h after the start.') : at;
  };
  return {
    plannedStart,
    reviewBy: by('reviewBy', 'Say by when the child is reviewed.'),
    bloodsBy: by('bloodsBy', 'Say by when bloods are due.'),
  };
}

function readStart(read: FieldReader, kind: Kind | undefined, context: DraftContext): Instant | undefined {
  const start = read.moment('plannedStart', 'Say when it is to start.');
  const now = parseInstant(context.now);
  if (start === undefined || kind === undefined || now === undefined) return start;
  if (start < now - START_BACK_MS)
    return read.wrong('plannedStart', 'This start has passed. Give a new one.');
  const ahead = START_AHEAD_MS[kind];
  return start > now + ahead ? read.wrong('plannedStart', `At most ${ahead / HOUR} h ahead.`) : start;
}

function readOrder(read: FieldReader, kind: Kind, context: DraftContext): OrderInputs | undefined {
  const fluid = readFluid(read, context);
  return kind === 'maintenance' ? readMaintenance(read, fluid) : readBolus(read, fluid);
}

function readFluid(read: FieldReader, context: DraftContext): FluidComposition | undefined {
  const id = read.required('productId', 'Choose the fluid.');
  if (id === undefined) return undefined;
  const product = context.products.find((row) => row.id === id);
  return product ? fluidOf(product) : read.wrong('productId', 'This fluid is not on the shelf any more.');
}

function readMaintenance(
  read: FieldReader,
  fluid: FluidComposition | undefined,
): MaintenanceOrder | undefined {
  const method = read.oneOf('method', MAINTENANCE_METHODS, 'Choose the method.');
  const fraction = read.oneOf('fraction', FRACTIONS, 'Choose the fraction of full maintenance.');
  const feeds = read.number('feedsMl');
  const drugs = read.number('drugsMl');
  const life = read.number('hours');
  const optional = readMaintenanceOptions(read, method);
  if (!method || !fraction || feeds === undefined || drugs === undefined || !life || !fluid) return undefined;
  return {
    kind: 'maintenance',
    method,
    fraction,
    feeds: millilitres(feeds),
    drugs: millilitres(drugs),
    hours: hours(life),
    fluid,
    ...optional,
  };
}

/** What may be left out; a field that its method does not use is not read at all. */
function readMaintenanceOptions(
  read: FieldReader,
  method: MaintenanceOrder['method'] | undefined,
): Partial<MaintenanceOrder> {
  const temperatureC = method === 'who' ? read.optionalNumber('temperatureC') : undefined;
  const perKg = method === 'newborn' ? read.optionalNumber('newbornMlPerKgPerDay') : undefined;
  const typedRate = read.optionalNumber('typedRate');
  const fractionReason = read.text('fractionReason');
  return {
    ...(temperatureC !== undefined && { temperatureC }),
    ...(perKg !== undefined && { newbornMlPerKgPerDay: perKg }),
    ...(typedRate !== undefined && { typedRate: millilitresPerHour(typedRate) }),
    ...(fractionReason !== '' && { fractionReason }),
  };
}

function readBolus(read: FieldReader, fluid: FluidComposition | undefined): BolusOrder | undefined {
  const dose = readDose(read);
  const over = read.number('overMinutes');
  const route = read.oneOf('route', BOLUS_ROUTES, 'Say how it is given.');
  const advisedBy = read.text('advisedBy');
  if (!dose || !over || !route || !fluid) return undefined;
  return {
    kind: 'bolus',
    dose,
    over: minutes(over),
    route,
    fluid,
    ...(advisedBy !== '' && { advisedBy }),
  };
}

function readDose(read: FieldReader): BolusOrder['dose'] | undefined {
  const by = read.oneOf('doseBy', ['weight', 'volume'], 'Say whether the dose is by weight or by volume.');
  if (by === undefined) return undefined;
  if (by === 'weight') {
    const mlPerKg = read.number('mlPerKg');
    return mlPerKg === undefined ? undefined : { by, mlPerKg: millilitresPerKg(mlPerKg) };
  }
  const volume = read.number('volumeMl');
  return volume === undefined ? undefined : { by, volume: millilitres(volume) };
}
