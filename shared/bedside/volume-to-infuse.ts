import type { OrderContent } from '../orders/content';
import { formatNumber, snap } from '../rounding';
import { ruleValues } from '../rulebook/read';
import type { BedsideContext } from './finding';
import { isNewbornNow } from './newborn';

/** The most that may be set as volume to be infused, mL, and why. */
export type MostToInfuse = { ml: number; words: string };

/**
 * The smallest of what is left of the order, what the bag holds, and some hours of flow (4, newborn 2: rulebook).
 * An absent bag does not count yet.
 */
export function volumeToInfuse(
  content: OrderContent,
  context: BedsideContext,
  bagMl: number | null,
): MostToInfuse {
  const { figures } = content;
  const left = Math.max(0, snap(Number(figures.volumeMl) - context.infusedMl));
  const choices: MostToInfuse[] = [{ ml: left, words: `${formatNumber(left, 1)} mL of the order is left` }];
  if (bagMl !== null) choices.push({ ml: bagMl, words: `the bag holds ${formatNumber(bagMl, 1)} mL` });
  if (figures.rateMlPerH !== null) choices.push(hoursOfFlow(content, Number(figures.rateMlPerH), context));
  return choices.reduce((least, choice) => (choice.ml < least.ml ? choice : least));
}

function hoursOfFlow(content: OrderContent, rate: number, context: BedsideContext): MostToInfuse {
  const { bagHours, bagHoursNewborn } = ruleValues(context.rulebook, 'pump');
  const hours = isNewbornNow(content, context.at, context.zone) ? bagHoursNewborn : bagHours;
  const ml = snap(rate * hours);
  return { ml, words: `${formatNumber(hours, 1)} h of flow at ${formatNumber(rate, 1)} mL/h` };
}
