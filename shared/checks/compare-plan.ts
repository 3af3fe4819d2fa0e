import type { Fraction } from '../calc/types';
import { atMost, formatNumber, stepAt } from '../rounding';
import { comparedRow, type Bench } from './bench';
import type { ComparedRow } from './form';
import { FRACTION_WORDS } from './words';

type Side = { fraction: Fraction; rate: number; feeds: number; drugs: number };

/**
 * A consultant's plan on the chart binds both sets: one that departs from it differs in a fact. Where a senior agreed
 * to the order's departure before it was signed, that departure stands and only the checker's own counts.
 */
export function comparePlan({ context, content, steps }: Bench, author: Side, checker: Side): ComparedRow[] {
  const { plan } = context;
  if (plan === undefined) return [];
  const isAgreedTo = content.limits.some(({ code, met }) => code.startsWith('plan-') && !met);
  const apart = 'the plan binds both';
  const row = (label: string, sides: readonly [string, string], keeps: (side: Side) => boolean) =>
    comparedRow('plan', `Fluid plan: ${label}`, 'fact', sides, {
      agrees: isAgreedTo || (keeps(author) && keeps(checker)),
      apart,
    });
  if (plan.kind === 'fraction') {
    const sides = [FRACTION_WORDS[author.fraction], FRACTION_WORDS[checker.fraction]] as const;
    return [row(FRACTION_WORDS[plan.fraction], sides, ({ fraction }) => fraction === plan.fraction)];
  }
  const dayOf = ({ rate, feeds, drugs }: Side) => rate * 24 + feeds + drugs;
  const ml = (n: number) => `${formatNumber(n, 0)} mL in 24 h`;
  return [
    row(`at most ${ml(plan.mlPer24h)}`, [ml(dayOf(author)), ml(dayOf(checker))], (side) =>
      // the pump's step may carry a day's total past the allowance by less than one step
      atMost(dayOf(side) - stepAt(side.rate, steps) * 24, plan.mlPer24h),
    ),
  ];
}
