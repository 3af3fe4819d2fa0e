import type { FluidComposition } from '../calc/types';
import { atMost, below } from '../rounding';

/** The stocked product of a base with that much ready-mixed potassium, mmol/L. */
export const findProduct = (
  products: readonly FluidComposition[],
  base: string,
  addedPotassium: number,
): FluidComposition | undefined =>
  products.find((product) => product.base === base && product.addedPotassium === addedPotassium);

/** Where isotonic begins and hypertonic begins, mmol/L of sodium; rulebook section `tonicity`. */
export type TonicityLines = { isotonicFrom: number; hypertonicAbove: number };

/**
 * Same tonicity and same glucose: within one class a fluid is a choice, across classes it is a fact. Isotonic
 * fluids are one class; outside it the sodium itself has to be the same, as half-strength and fifth-strength
 * saline are not alike. Ours.
 */
export function isSameClass(a: FluidComposition, b: FluidComposition, lines: TonicityLines): boolean {
  const isIsotonic = ({ sodium }: FluidComposition) =>
    !below(sodium, lines.isotonicFrom) && atMost(sodium, lines.hypertonicAbove);
  const sameTonicity = (isIsotonic(a) && isIsotonic(b)) || a.sodium === b.sodium;
  return sameTonicity && a.glucoseGPerL === b.glucoseGPerL;
}
