import type { DecimalSpec } from '../decimal-input';
import { DEFAULT_RULEBOOK } from '../rulebook/default';
import { ruleValues, type RuleValues } from '../rulebook/read';

/** The weight section of the rulebook in force, as plain values. */
export type WeightLimits = RuleValues['weight'];

/** What a hospital starts with. */
export const DEFAULT_WEIGHT_LIMITS: WeightLimits = ruleValues(DEFAULT_RULEBOOK, 'weight');

/** What the weight field takes at all: 0.3 to 200 kg to the gram. Ours; no rulebook widens it. */
export const KG_FIELD: DecimalSpec = { decimals: 3, min: 0.3, max: 200, unit: 'kg' };
