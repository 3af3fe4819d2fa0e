import type { BolusFigures, BolusOrder, WorkOut } from '../calc/types';
import { formatNumber } from '../rounding';
import { ruleValues } from '../rulebook/read';
import { millilitres, millilitresPerKg, minutes, type Kilograms } from '../units';
import { apartBy, comparedRow, keepsBrims, type Bench, type KindComparison } from './bench';
import { effectOfBolus } from './effect';
import { fluidOf } from '../orders/chart-facts';
import { findProduct, isSameClass } from './fluid';
import type { ComparedRow } from './form';
import { orderOf, workOutOn } from './own';
import type { BolusEntries } from './read-form';
import { isSameVolume } from './tolerance';

type AuthorInputs = Extract<Bench['content']['inputs'], { kind: 'bolus' }>;

const ml = (n: number): string => `${formatNumber(n, 1)} mL`;

/** Facts and choices of a bolus: the volume is a fact, the fluid within its class and the time are choices. */
export function compareBolus(bench: Bench, kg: Kilograms, entries: BolusEntries): KindComparison {
  const { content, context, steps, rules } = bench;
  if (content.inputs.kind !== 'bolus') throw new RangeError('the entries are of another kind than the order');
  const volume = Number(content.figures.volumeMl);
  const over = Number(content.inputs.overMinutes);
  const order = orderOf(entries, context.products);
  const own = order === undefined ? undefined : workOutOn(kg, order, context, content.line);
  const authorOnCheckers = workOutOn(kg, authorOrder(bench, content.inputs), context, content.line);
  const recomputed = workedVolume(authorOnCheckers);
  const rows = [
    fluidRow(bench, entries),
    comparedRow(
      'author-arithmetic',
      'The order’s dose, on the checker’s weight',
      'fact',
      [ml(volume), recomputed === undefined ? 'cannot be worked out' : ml(recomputed)],
      {
        agrees: recomputed !== undefined && isSameVolume(volume, recomputed, rules, steps),
        apart: recomputed === undefined ? '' : apartBy(volume, recomputed, 'mL'),
      },
    ),
    comparedRow('volumeMl', 'Volume', 'fact', [ml(volume), ml(entries.volume)], {
      agrees: isSameVolume(volume, entries.volume, rules, steps),
      apart: apartBy(volume, entries.volume, 'mL'),
    }),
    comparedRow('overMinutes', 'Over', 'choice', [`${over} min`, `${entries.over} min`], {
      agrees: over === entries.over,
      apart: apartBy(over, entries.over, 'min', 0),
    }),
  ];
  const authorSide = { volume, over, kg: Number(content.weight.kg) };
  return {
    rows,
    bothAllowed: own !== undefined && keepsBrims(own) && keepsBrims(authorOnCheckers),
    effect: effectOfBolus(authorSide, { volume: entries.volume, over: entries.over, kg }),
  };
}

function fluidRow({ content, context }: Bench, entries: BolusEntries): ComparedRow {
  const fluid = findProduct(context.products, entries.base, 0);
  const ordered = fluidOf(content.fluid);
  const sameClass =
    fluid !== undefined && isSameClass(ordered, fluid, ruleValues(context.rulebook, 'tonicity'));
  return comparedRow(
    'base',
    'Fluid',
    sameClass ? 'choice' : 'fact',
    [content.fluid.name, fluid?.name ?? entries.base],
    {
      agrees:
        fluid !== undefined && ordered.base === fluid.base && ordered.addedPotassium === fluid.addedPotassium,
      apart: sameClass ? 'another fluid of the same class' : 'another class of sodium, glucose or potassium',
    },
  );
}

/** The author's order; a dose by weight moves with the checker's weight, a dose by volume does not. */
function authorOrder({ content }: Bench, inputs: AuthorInputs): BolusOrder {
  const dose =
    inputs.doseBy === 'weight' && inputs.mlPerKg !== null
      ? ({ by: 'weight', mlPerKg: millilitresPerKg(Number(inputs.mlPerKg)) } as const)
      : ({ by: 'volume', volume: millilitres(Number(content.figures.volumeMl)) } as const);
  return {
    kind: 'bolus',
    dose,
    over: minutes(Number(inputs.overMinutes)),
    route: inputs.route,
    fluid: fluidOf(content.fluid),
    ...(inputs.advisedBy === null ? {} : { advisedBy: inputs.advisedBy }),
  };
}

const workedVolume = (worked: WorkOut): number | undefined =>
  worked.ok ? (worked.figures as BolusFigures).volume : undefined;
