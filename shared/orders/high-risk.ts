import type { LimitFinding } from '../calc/types';
import { above } from '../rounding';
import { ruleValues } from '../rulebook/read';
import type { Rulebook } from '../rulebook/document';

export type RiskFacts = {
  /** mmol/L in the bag that hangs. */
  potassium: number;
  /** The shelf calls the product high risk. */
  isHighRiskProduct: boolean;
  isNewborn: boolean;
  /** z-score of the dosing weight; null where there is none. */
  weightZ: number | null;
  limits: readonly Pick<LimitFinding, 'strength' | 'met'>[];
};

/** Whether an order needs the stricter check: a senior checker or a pharmacist. The rulebook's "risk" section decides. */
export function isHighRisk(facts: RiskFacts, rulebook: Rulebook): boolean {
  const risk = ruleValues(rulebook, 'risk');
  const reasons = [
    facts.isHighRiskProduct,
    above(facts.potassium, risk.potassiumAbove),
    risk.newborn === 'yes' && facts.isNewborn,
    risk.senior === 'yes' && facts.limits.some((limit) => limit.strength === 'senior' && !limit.met),
    facts.weightZ !== null && above(Math.abs(facts.weightZ), risk.weightZ),
  ];
  return reasons.includes(true);
}
