import type { WorkOut } from '../calc/types';
import type { OrderContent } from '../orders/content';
import { formatNumber, type Steps } from '../rounding';
import type { RuleValues } from '../rulebook/read';
import type { ComparedRow } from './form';
import type { CheckContext } from './own';

/** What both kinds of comparison work with. */
export type Bench = {
  content: OrderContent;
  context: CheckContext;
  rules: RuleValues['check'];
  steps: Steps;
};

/** Rows of one kind, the effect on the child in words, and whether both sets keep every brim. */
export type KindComparison = { rows: ComparedRow[]; effect: string; bothAllowed: boolean };

/** A row of the comparison; the distance is named only where the two differ. */
export const comparedRow = (
  field: string,
  label: string,
  nature: ComparedRow['nature'],
  [author, checker]: readonly [author: string, checker: string],
  { agrees, apart = '' }: { agrees: boolean; apart?: string },
): ComparedRow => ({ field, label, nature, author, checker, agrees, apart: agrees ? '' : apart });

export const apartBy = (a: number, c: number, unit: string, decimals = 1): string =>
  `${formatNumber(Math.abs(a - c), decimals)} ${unit} apart`;

/** Whether a work-out stands and passes no brim. */
export const keepsBrims = (worked: WorkOut): boolean =>
  worked.ok && worked.limits.every(({ strength, met }) => met || strength !== 'brim');
