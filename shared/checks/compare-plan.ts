import type { Fraction } from '../calc/types';
import { atMost, formatNumber, stepAt } from '../rounding';
import { comparedRow, type Bench } from './bench';
import type { ComparedRow } from './form';
import { FRACTION_WORDS } from './words';

type Side = { fraction: Fraction; rate: number; feeds: number; drugs: number };

/** A consultant's plan on the chart binds both sets: a set that departs from it differs in a fact. */
export function comparePlan({ context, steps }: Bench, author: Side, checker: Side): ComparedRow[] {
  const { plan } = context;
  if (plan === undefined) return [];
  if (plan.kind === 'fraction') {
    const words = FRACTION_WORDS[plan.fraction];
    const sides = [FRACTION_WORDS[author.fraction], FRACTION_WORDS[checker.fraction]] as const;
    const agrees = author.fraction === plan.fraction && checker.fraction === plan.fraction;
    return [
      comparedRow('plan', `Fluid plan: ${words}`, 'fact', sides, { agrees, apart: 'the plan binds both' }),
    ];
  }
  const dayOf = ({ rate, feeds, drugs }: Side) => rate * 24 + feeds + drugs;
  // the pump's step may carry a day's total past the allowance by less than one step
  const isWithin = (side: Side) => atMost(dayOf(side) - stepAt(side.rate, steps) * 24, plan.mlPer24h);
  const ml = (n: number) => `${formatNumber(n, 0)} mL in 24 h`;
  return [
    comparedRow(
      'plan',
      `Fluid plan: at most ${ml(plan.mlPer24h)}`,
      'fact',
      [ml(dayOf(author)), ml(dayOf(checker))],
      {
        agrees: isWithin(author) && isWithin(checker),
        apart: 'the plan binds both',
      },
    ),
  ];
}
