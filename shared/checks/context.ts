import { chartFacts, fluidOf, rulebookOf } from '../orders/chart-facts';
import type { CheckPage } from '../routes/checks';
import type { DraftContext } from '../routes/orders';
import { parseInstant, type Instant } from '../time';
import type { CheckContext } from './own';

const momentOf = (text: string): Instant => {
  const at = parseInstant(text);
  if (at === undefined) throw new RangeError(`not an instant: ${text}`);
  return at;
};

/** The chart as the server reads it for a comparison, at a moment of its own. */
export const contextOf = (chart: DraftContext, at: Instant): CheckContext => ({
  ...chartFacts(chart),
  at,
  rulebook: rulebookOf(chart),
  products: chart.products.map(fluidOf),
});

/**
 * What a check page holds of the chart, for the checker's own work-out. Running fluids, the plan and the age of the
 * weight only move limits, never the checker's figures, and the page does not hold them in numbers.
 */
export function contextOfPage(
  page: Pick<CheckPage, 'child' | 'results' | 'bolusesLast24h' | 'products' | 'zone' | 'now' | 'rulebook'>,
): CheckContext {
  const { child, results, bolusesLast24h, zone } = page;
  const rest = { running: [], plan: null, urinePassedAt: null, lastMeasuredAt: null };
  return {
    ...chartFacts({ child, results, bolusesLast24h, zone, ...rest }),
    at: momentOf(page.now),
    rulebook: rulebookOf({ rulebook: { ...page.rulebook, sha256: '' } }),
    products: page.products.map(fluidOf),
  };
}
