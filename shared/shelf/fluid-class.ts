import type { FluidComposition } from '../calc/types';
import { ruleValues } from '../rulebook/read';
import type { Rulebook } from '../rulebook/document';

export type FluidClass = { tonicity: 'hypotonic' | 'isotonic' | 'hypertonic'; hasGlucose: boolean };

/** Tonicity by sodium (shelf property: isotonic from 130 to 154 mmol/L) and whether glucose is in it. */
export function fluidClass(
  fluid: Pick<FluidComposition, 'sodium' | 'glucoseGPerL'>,
  rulebook: Rulebook,
): FluidClass {
  const { isotonicFrom, hypertonicAbove } = ruleValues(rulebook, 'tonicity');
  const isLow = fluid.sodium < isotonicFrom;
  const tonicity = isLow ? 'hypotonic' : fluid.sodium > hypertonicAbove ? 'hypertonic' : 'isotonic';
  return { tonicity, hasGlucose: fluid.glucoseGPerL > 0 };
}
