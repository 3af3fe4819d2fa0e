import {
  FRACTIONS,
  type ChildFacts,
  type DosingWeight,
  type FluidComposition,
  type ResultFacts,
  type WorkOutRequest,
} from '../calc/types';
import type { DraftContext, Product } from '../routes/orders';
import { parseRulebook, type Rulebook } from '../rulebook/document';
import { parseInstant, type Instant } from '../time';
import { kilograms, millilitres, millilitresPerHour, milliosmolesPerLitre, mmolPerLitre } from '../units';
import type { OrderContent } from './content';

/** What the work-out reads of the chart, whoever asks and whatever they order. */
export type ChartFacts = Pick<
  WorkOutRequest,
  'zone' | 'child' | 'lastMeasuredAt' | 'results' | 'intake' | 'plan'
>;

const moment = (text: string): Instant => {
  const at = parseInstant(text);
  if (at === undefined) throw new RangeError(`not an instant: ${text}`);
  return at;
};
const optionalMoment = (text: string | null): Instant | undefined =>
  text === null ? undefined : moment(text);

/** A shelf row, or the fluid of stored content, as the calculation needs it. */
export function fluidOf(fluid: OrderContent['fluid'] | Product): FluidComposition {
  return {
    id: fluid.id,
    name: fluid.name,
    base: fluid.base,
    addedPotassium: mmolPerLitre(Number(fluid.addedPotassium)),
    sodium: mmolPerLitre(Number(fluid.sodium)),
    potassium: mmolPerLitre(Number(fluid.potassium)),
    chloride: mmolPerLitre(Number(fluid.chloride)),
    calcium: mmolPerLitre(Number(fluid.calcium)),
    magnesium: mmolPerLitre(Number(fluid.magnesium)),
    lactate: mmolPerLitre(Number(fluid.lactate)),
    acetate: mmolPerLitre(Number(fluid.acetate)),
    gluconate: mmolPerLitre(Number(fluid.gluconate)),
    glucoseGPerL: Number(fluid.glucoseGPerL),
    osmolarity: milliosmolesPerLitre(Number(fluid.osmolarity)),
    bagSizes: [],
    readyMixed: fluid.readyMixed,
    highRisk: fluid.highRisk,
    ...('bagSizesMl' in fluid && shelfFacts(fluid)),
  };
}

/** What only the shelf knows of a fluid: an order's own snapshot has no sizes and no permitted uses. */
const shelfFacts = (product: Product) => ({
  bagSizes: product.bagSizesMl.map((ml) => millilitres(Number(ml))),
  permittedKinds: product.kinds,
  newbornOnly: product.newbornOnly,
});

export const childFacts = (child: DraftContext['child']): ChildFacts => ({
  bornOn: child.bornOn,
  bornAt: optionalMoment(child.bornAt),
  sex: child.sex ?? undefined,
  gestationWeeks: child.gestationWeeks ?? undefined,
  gestationDays: child.gestationDays ?? undefined,
  flags: child.flags,
});

const ANALYTES = ['sodium', 'potassium', 'glucose'] as const;

/** The newest of each result the work-out reads; absent stays absent. */
function resultFacts(context: Pick<DraftContext, 'results' | 'urinePassedAt'>): ResultFacts {
  const facts: ResultFacts = {};
  for (const analyte of ANALYTES) {
    const rows = context.results
      .filter((row) => row.analyte === analyte)
      .map((row) => ({ value: Number(row.value), at: moment(row.at) }));
    const newest = rows.reduce<(typeof rows)[number] | undefined>(
      (best, row) => (best === undefined || row.at > best.at ? row : best),
      undefined,
    );
    if (newest !== undefined) facts[analyte] = newest;
  }
  const urinePassedAt = optionalMoment(context.urinePassedAt);
  return urinePassedAt === undefined ? facts : { ...facts, urinePassedAt };
}

function planFacts(plan: DraftContext['plan']): WorkOutRequest['plan'] {
  if (plan?.kind === 'allowance' && plan.mlPer24h !== null) {
    return { kind: 'allowance', mlPer24h: millilitres(Number(plan.mlPer24h)) };
  }
  const fraction = FRACTIONS.find((each) => each === plan?.fraction);
  return fraction === undefined ? undefined : { kind: 'fraction', fraction };
}

/** The chart as the work-out reads it. */
export function chartFacts(
  context: Pick<
    DraftContext,
    'child' | 'lastMeasuredAt' | 'results' | 'urinePassedAt' | 'bolusesLast24h' | 'running' | 'plan' | 'zone'
  >,
): ChartFacts {
  return {
    zone: context.zone,
    child: childFacts(context.child),
    lastMeasuredAt: optionalMoment(context.lastMeasuredAt),
    results: resultFacts(context),
    intake: {
      bolusesLast24h: context.bolusesLast24h.map(({ ml, at, here }) => ({
        ml: millilitres(Number(ml)),
        at: moment(at),
        here,
      })),
      running: context.running.map(({ code, rateMlPerH, fluid }) => ({
        code,
        rate: millilitresPerHour(Number(rateMlPerH)),
        fluid: fluidOf(fluid),
      })),
    },
    plan: planFacts(context.plan),
  };
}

export const dosingWeight = (weight: DraftContext['weights'][number]): DosingWeight => ({
  kg: kilograms(Number(weight.kg)),
  method: weight.method,
  at: moment(weight.at),
});

const read = new WeakMap<object, Rulebook>();

/** The context's rulebook, parsed once for each context; throws where its content is no rulebook. */
export function rulebookOf(context: Pick<DraftContext, 'rulebook'>): Rulebook {
  const content = context.rulebook.content as object;
  const known = read.get(content);
  if (known !== undefined) return known;
  const rulebook = { ...parseRulebook(content), hash: context.rulebook.sha256 };
  read.set(content, rulebook);
  return rulebook;
}
