import { ruleValues } from '../rulebook/read';
import type { OrderContent } from '../orders/content';
import { formatNumber } from '../rounding';
import { kilograms } from '../units';
import { compareBolus } from './compare-bolus';
import { compareMaintenance } from './compare-maintenance';
import { apartBy, comparedRow, type Bench } from './bench';
import type { ComparedRow, Comparison } from './form';
import { stepsOf, type CheckContext } from './own';
import type { CheckEntries } from './read-form';
import { isSameWeight } from './tolerance';

/**
 * Holds a checker's locked-in figures against the signed content. Facts and arithmetic must match; where only
 * choices differ and both are allowed, the checker may accept the author's. The child was re-entered before.
 */
export function compareCheck(
  content: OrderContent,
  entries: CheckEntries,
  context: CheckContext,
): Comparison {
  const bench: Bench = {
    content,
    context,
    rules: ruleValues(context.rulebook, 'check'),
    steps: stepsOf(context.rulebook),
  };
  const kind =
    entries.order.kind === 'maintenance'
      ? compareMaintenance(bench, entries.kg, entries.order)
      : compareBolus(bench, entries.kg, entries.order);
  const rows = [...headRows(bench, entries), ...kind.rows];
  const differing = rows.filter(({ agrees }) => !agrees);
  const isFact = differing.some(({ nature }) => nature === 'fact');
  const outcome = differing.length === 0 ? 'agreed' : isFact ? 'facts-differ' : 'choices-differ';
  return {
    outcome,
    mayAccept: outcome === 'choices-differ' && kind.bothAllowed,
    rows,
    effect: outcome === 'agreed' ? '' : kind.effect,
  };
}

function headRows({ content, rules }: Bench, entries: CheckEntries): ComparedRow[] {
  const { given, surname } = content.child;
  const authorKg = kilograms(Number(content.weight.kg));
  const kg = (n: number) => `${formatNumber(n, 3)} kg`;
  return [
    comparedRow('child', 'Child', 'fact', [`${given} ${surname}`, entries.child.initials.toUpperCase()], {
      agrees: true,
    }),
    comparedRow('weightKg', 'Weight', 'fact', [kg(authorKg), kg(entries.kg)], {
      agrees: isSameWeight(authorKg, entries.kg, rules),
      apart: apartBy(authorKg, entries.kg, 'kg', 3),
    }),
  ];
}
