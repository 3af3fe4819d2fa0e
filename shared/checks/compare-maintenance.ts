import type { FluidComposition, MaintenanceFigures, MaintenanceOrder, WorkOut } from '../calc/types';
import { formatNumber, pumpStep } from '../rounding';
import { ruleValues } from '../rulebook/read';
import { hours, millilitres, millilitresPerHour, type Kilograms } from '../units';
import { apartBy, comparedRow, keepsBrims, type Bench, type KindComparison } from './bench';
import { comparePlan } from './compare-plan';
import { effectOfMaintenance } from './effect';
import { fluidOf } from '../orders/chart-facts';
import { findProduct, isSameClass } from './fluid';
import type { ComparedRow } from './form';
import { orderOf, workOutOn } from './own';
import type { MaintenanceEntries } from './read-form';
import { isSameIntake, isSameRate, isSameVolume } from './tolerance';
import { FRACTION_WORDS, METHOD_WORDS, potassiumWords } from './words';

type AuthorInputs = Extract<Bench['content']['inputs'], { kind: 'maintenance' }>;

/** What the author ordered, in numbers. */
type Author = {
  order: MaintenanceOrder;
  rate: number;
  volume: number;
  /** The rate that follows from the author's choices at the pump step, mL/h. */
  workedOutRate: number;
  isTyped: boolean;
};

const mlPerHour = (n: number): string => `${formatNumber(n, 1)} mL/h`;
const ml = (n: number): string => `${formatNumber(n, 1)} mL`;

/** Facts, choices and what follows of a maintenance order. */
export function compareMaintenance(bench: Bench, kg: Kilograms, entries: MaintenanceEntries): KindComparison {
  const { content, context } = bench;
  if (content.inputs.kind !== 'maintenance')
    throw new RangeError('the entries are of another kind than the order');
  const author = authorOf(bench, content.inputs);
  const fluid = findProduct(context.products, entries.base, entries.addedPotassium);
  const order = orderOf(entries, context.products);
  const own = order === undefined ? undefined : workOutOn(kg, order, context, content.line);
  const authorOnCheckers = workOutOn(
    kg,
    { ...author.order, feeds: entries.feeds, drugs: entries.drugs, typedRate: undefined },
    context,
    content.line,
  );
  const choices = [
    ...choiceRows(author, entries),
    ...fluidRows(bench, author, entries, fluid),
    ...typedRow(bench, author),
  ];
  const rows = [
    ...intakeRows(bench, author, entries),
    ...choices,
    ...arithmeticRows(bench, { author, entries, own, authorOnCheckers }),
    ...figureRows(bench, { author, entries, someChoiceDiffers: choices.some(({ agrees }) => !agrees) }),
    ...comparePlan(bench, { ...author.order, rate: author.rate }, entries),
  ];
  const bothAllowed = own !== undefined && keepsBrims(own) && keepsBrims(authorOnCheckers);
  return {
    rows,
    bothAllowed,
    effect: effectOfMaintenance(
      { ...author.order, rate: author.rate, kg: Number(content.weight.kg) },
      fluid === undefined ? undefined : { ...entries, kg, fluid },
    ),
  };
}

function authorOf({ content, steps }: Bench, inputs: AuthorInputs): Author {
  const { figures } = content;
  const exact = Number(figures.perHourExact ?? figures.rateMlPerH);
  const optional = (text: string | null) => (text === null ? undefined : Number(text));
  return {
    order: {
      kind: 'maintenance',
      method: inputs.method,
      fraction: inputs.fraction,
      temperatureC: optional(inputs.temperatureC),
      newbornMlPerKgPerDay: optional(inputs.newbornMlPerKgPerDay),
      feeds: millilitres(Number(inputs.feedsMl)),
      drugs: millilitres(Number(inputs.drugsMl)),
      hours: hours(Number(inputs.hours)),
      fluid: fluidOf(content.fluid),
      ...(inputs.fractionReason === null ? {} : { fractionReason: inputs.fractionReason }),
    },
    rate: Number(figures.rateMlPerH),
    volume: Number(figures.volumeMl),
    workedOutRate: pumpStep(millilitresPerHour(exact), steps),
    isTyped: inputs.typedRate !== null,
  };
}

function intakeRows({ rules }: Bench, { order }: Author, entries: MaintenanceEntries): ComparedRow[] {
  const [a, c] = [order.feeds + order.drugs, entries.feeds + entries.drugs];
  return [
    comparedRow('intake', 'Other intake in 24 h', 'fact', [ml(a), ml(c)], {
      agrees: isSameIntake(a, c, rules),
      apart: apartBy(a, c, 'mL'),
    }),
  ];
}

function choiceRows({ order }: Author, entries: MaintenanceEntries): ComparedRow[] {
  const choice = (field: string, label: string, sides: [string, string], apart = '') =>
    comparedRow(field, label, 'choice', sides, { agrees: sides[0] === sides[1], apart });
  const number = (n: number | undefined, unit: string) =>
    n === undefined ? 'none' : `${formatNumber(n, 1)} ${unit}`;
  const rows = [
    choice('method', 'Method', [METHOD_WORDS[order.method], METHOD_WORDS[entries.method]]),
    choice('fraction', 'Fraction', [FRACTION_WORDS[order.fraction], FRACTION_WORDS[entries.fraction]]),
    choice(
      'hours',
      'Over',
      [`${formatNumber(order.hours, 1)} h`, `${formatNumber(entries.hours, 1)} h`],
      apartBy(order.hours, entries.hours, 'h'),
    ),
  ];
  if (order.method === 'who' && entries.method === 'who') {
    const sides: [string, string] = [number(order.temperatureC, '°C'), number(entries.temperatureC, '°C')];
    rows.push(choice('temperatureC', 'Temperature', sides));
  }
  if (order.newbornMlPerKgPerDay !== undefined && entries.newbornMlPerKgPerDay !== undefined) {
    const unit = 'mL/kg/24 h';
    const sides: [string, string] = [
      number(order.newbornMlPerKgPerDay, unit),
      number(entries.newbornMlPerKgPerDay, unit),
    ];
    rows.push(choice('newbornMlPerKgPerDay', 'Volume for a day', sides));
  }
  return rows;
}

/** The fluid is a choice within its class and a fact across classes; potassium is a choice. */
function fluidRows(
  { context, content }: Bench,
  { order }: Author,
  entries: MaintenanceEntries,
  fluid: FluidComposition | undefined,
): ComparedRow[] {
  const ordered = order.fluid;
  const tonicity = ruleValues(context.rulebook, 'tonicity');
  const sameClass = fluid !== undefined && isSameClass(ordered, fluid, tonicity);
  const agreesPotassium = ordered.addedPotassium === entries.addedPotassium;
  return [
    comparedRow('base', 'Fluid', sameClass ? 'choice' : 'fact', [content.fluid.base, entries.base], {
      agrees: ordered.base === entries.base,
      apart: sameClass ? 'another fluid of the same class' : 'another class of sodium or glucose',
    }),
    comparedRow(
      'addedPotassium',
      'Potassium',
      'choice',
      [potassiumWords(ordered.addedPotassium), potassiumWords(entries.addedPotassium)],
      { agrees: agreesPotassium, apart: apartBy(ordered.addedPotassium, entries.addedPotassium, 'mmol/L') },
    ),
  ];
}

/** A rate typed instead of the worked-out one is a choice of the author's, never silent. */
function typedRow({ rules, steps }: Bench, { isTyped, rate, workedOutRate }: Author): ComparedRow[] {
  if (!isTyped || isSameRate(workedOutRate, rate, rules, steps)) return [];
  return [
    comparedRow(
      'typedRate',
      'Rate set by hand',
      'choice',
      [mlPerHour(rate), `worked out: ${mlPerHour(workedOutRate)}`],
      {
        agrees: false,
        apart: apartBy(rate, workedOutRate, 'mL/h'),
      },
    ),
  ];
}

type Worked = { author: Author; entries: MaintenanceEntries; own?: WorkOut; authorOnCheckers: WorkOut };

const workedRate = (worked: WorkOut | undefined): number | undefined =>
  worked?.ok ? (worked.figures as MaintenanceFigures).workedOutRate : undefined;

/** The author's choices on the checker's weight give the author's rate; the checker's rate follows from theirs. */
function arithmeticRows(
  { rules, steps }: Bench,
  { author, entries, own, authorOnCheckers }: Worked,
): ComparedRow[] {
  const follows = (field: string, label: string, stated: number, worked: number | undefined): ComparedRow =>
    comparedRow(
      field,
      label,
      'fact',
      [mlPerHour(stated), worked === undefined ? 'cannot be worked out' : mlPerHour(worked)],
      {
        agrees: worked !== undefined && isSameRate(stated, worked, rules, steps),
        apart: worked === undefined ? '' : apartBy(stated, worked, 'mL/h'),
      },
    );
  const recomputed = follows(
    'author-arithmetic',
    'The order’s choices, on the checker’s weight and intake',
    author.workedOutRate,
    workedRate(authorOnCheckers),
  );
  const yours = follows('own-arithmetic', 'The checker’s rate, from the checker’s entries', entries.rate, workedRate(own));
  // here the stated figure is the checker's own
  return [recomputed, { ...yours, author: yours.checker, checker: yours.author }];
}

type Figured = { author: Author; entries: MaintenanceEntries; someChoiceDiffers: boolean };

/** Rate and volume follow where a choice differs; with every choice alike a difference is one of fact. */
function figureRows({ rules, steps }: Bench, { author, entries, someChoiceDiffers }: Figured): ComparedRow[] {
  const nature = someChoiceDiffers ? 'follows' : 'fact';
  const product = entries.rate * entries.hours;
  const rows = [
    comparedRow('rate', 'Rate', nature, [mlPerHour(author.rate), mlPerHour(entries.rate)], {
      agrees: isSameRate(author.rate, entries.rate, rules, steps),
      apart: apartBy(author.rate, entries.rate, 'mL/h'),
    }),
    comparedRow('volumeMl', 'Total volume', nature, [ml(author.volume), ml(entries.volume)], {
      agrees: isSameVolume(author.volume, entries.volume, rules, steps),
      apart: apartBy(author.volume, entries.volume, 'mL'),
    }),
  ];
  if (isSameVolume(product, entries.volume, rules, steps)) return rows;
  const sides = [ml(product), ml(entries.volume)] as const;
  const apart = apartBy(product, entries.volume, 'mL');
  return [
    ...rows,
    comparedRow('own-volume', 'The checker’s volume, from that rate and hours', 'fact', sides, {
      agrees: false,
      apart,
    }),
  ];
}
