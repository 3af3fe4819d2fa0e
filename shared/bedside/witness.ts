import type { OrderContent } from '../orders/content';
import type { Rulebook } from '../rulebook/document';
import { ruleValues } from '../rulebook/read';

/** Whether the rulebook asks for a witness at the start of this order. */
export function witnessNeeded({ isHighRisk }: Pick<OrderContent, 'isHighRisk'>, rulebook: Rulebook): boolean {
  const { witness } = ruleValues(rulebook, 'risk');
  return witness === 'always' || (witness === 'high-risk' && isHighRisk);
}
