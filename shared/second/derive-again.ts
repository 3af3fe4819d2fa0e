import type { Rulebook } from '../rulebook/document';
import { bolusAgain } from './bolus';
import { maintenanceAgain } from './maintenance';
import type { RequestAgain, SecondFigures } from './request';
import { rulesOf, Silent } from './rules';

/** Works rate and volume out a second way: other algebra, exact fractions, nothing shared with the first. */
export function deriveAgain(request: RequestAgain, rulebook: Rulebook): SecondFigures {
  const rule = rulesOf(rulebook);
  const { order } = request;
  try {
    return order.kind === 'bolus' ? bolusAgain(request, order, rule) : maintenanceAgain(request, order, rule);
  } catch (fault) {
    if (fault instanceof Silent) return { ok: false, code: 'rulebook-silent' };
    throw fault;
  }
}

/** What `agrees` reads of a work-out. */
export type FirstFigures = { ok: true; figures: { rate?: number; volume: number } } | { ok: false };

/** Whether both derivations give the same rate and volume to the last digit; a refused work-out agrees with nothing. */
export const agrees = (first: FirstFigures, second: SecondFigures): boolean =>
  first.ok && second.ok && first.figures.rate === second.rate && first.figures.volume === second.volume;
