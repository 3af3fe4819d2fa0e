import { propose, type BolusProposal, type MaintenanceProposal } from '../calc/propose';
import type { FluidComposition, Kind, OrderInputs, WorkOutRequest } from '../calc/types';
import type { DraftContext } from '../routes/orders';
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
 * never past a limit. Without a usable weight, or for a child out of scope, only the bare form.
 */
export function proposeForm(kind: Kind, context: DraftContext): OrderForm {
  const at = nowOf(context);
  const weight = proposeWeight(context, at)?.weight.row;
  const form: OrderForm = {
    ...emptyOrderForm(kind),
    ...proposeTimes(kind, context),
    line: 'peripheral',
    // a bolus is for shock: it does not wait its turn
    urgency: kind === 'bolus' ? 'urgent' : 'routine',
    weightId: weight?.id ?? '',
  };
  if (weight === undefined) return form;
  const before: BeforeOrder = {
    ...chartFacts(context),
    at,
    line: 'peripheral',
    weight: dosingFacts(weight),
  };
  const proposal = propose(kind, before, rulebookOf(context));
  if (!('kind' in proposal)) return form;
  const fields =
    proposal.kind === 'maintenance' ? maintenanceFields(proposal, context) : bolusFields(proposal);
  return { ...form, ...fields, productId: proposedProduct(proposal, before, context) };
}

type BeforeOrder = Omit<WorkOutRequest, 'order'>;
type ChartRow = ReturnType<typeof dosingFacts> & { usable: boolean; row: DraftContext['weights'][number] };

function proposeWeight(context: DraftContext, at: Instant): DosingChoice<ChartRow> | undefined {
  const rows = context.weights.map((row) => ({ ...dosingFacts(row), usable: row.usable, row }));
  return dosingWeight<ChartRow>(rows, chartFacts(context).child, at, context.zone);
}

const maintenanceFields = (proposal: MaintenanceProposal, context: DraftContext): Partial<OrderForm> => ({
  ...proposeTimes('maintenance', context, proposal.hours),
  method: proposal.method,
  fraction: proposal.fraction ?? '',
  newbornMlPerKgPerDay:
    proposal.newbornMlPerKgPerDay === undefined ? '' : String(proposal.newbornMlPerKgPerDay),
  hours: String(Math.floor(proposal.hours)),
});

const bolusFields = (proposal: BolusProposal): Partial<OrderForm> => ({
  ...(proposal.volumeMl === undefined
    ? { doseBy: 'weight', mlPerKg: String(proposal.mlPerKg) }
    : { doseBy: 'volume', volumeMl: String(proposal.volumeMl) }),
  overMinutes: String(proposal.overMinutes),
  route: 'syringe',
});

function proposedProduct(
  proposal: MaintenanceProposal | BolusProposal,
  before: BeforeOrder,
  context: DraftContext,
): string {
  const order = (fluid: FluidComposition): OrderInputs =>
    proposal.kind === 'maintenance'
      ? {
          kind: 'maintenance',
          method: proposal.method,
          fraction: proposal.fraction ?? 'full',
          feeds: millilitres(0),
          drugs: millilitres(0),
          hours: hours(proposal.hours),
          fluid,
        }
      : {
          kind: 'bolus',
          dose: { by: 'weight', mlPerKg: millilitresPerKg(proposal.mlPerKg) },
          over: minutes(proposal.overMinutes),
          route: 'syringe',
          fluid,
        };
  const fluid = proposeFluid(before, order, context.products.map(fluidOf), rulebookOf(context));
  return fluid?.id ?? '';
}
