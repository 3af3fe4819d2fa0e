import type { Rulebook } from '../rulebook/document';
import { ruleValues } from '../rulebook/read';
import type { FluidComposition } from './types';

/** Whether an order with this fluid is high risk: the shelf says so, or its potassium is past the rulebook's line. */
export const isHighRisk = (fluid: FluidComposition, rulebook: Rulebook): boolean =>
  fluid.highRisk || fluid.potassium > ruleValues(rulebook, 'risk').potassiumAbove;
