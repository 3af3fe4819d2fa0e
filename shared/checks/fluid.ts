import type { z } from 'zod';
import type { FluidComposition } from '../calc/types';
import type { contentFluidSchema } from '../orders/content';
import { atMost, below } from '../rounding';
import { milliosmolesPerLitre, millilitres, mmolPerLitre } from '../units';

type ContentFluid = z.infer<typeof contentFluidSchema>;

/** A fluid of the wire or of signed content as the calculation takes it. */
export function readFluid(fluid: ContentFluid & { bagSizesMl?: readonly string[] }): FluidComposition {
  const salt = (text: string) => mmolPerLitre(Number(text));
  return {
    id: fluid.id,
    name: fluid.name,
    base: fluid.base,
    addedPotassium: salt(fluid.addedPotassium),
    sodium: salt(fluid.sodium),
    potassium: salt(fluid.potassium),
    chloride: salt(fluid.chloride),
    calcium: salt(fluid.calcium),
    magnesium: salt(fluid.magnesium),
    lactate: salt(fluid.lactate),
    acetate: salt(fluid.acetate),
    gluconate: salt(fluid.gluconate),
    glucoseGPerL: Number(fluid.glucoseGPerL),
    osmolarity: milliosmolesPerLitre(Number(fluid.osmolarity)),
    bagSizes: (fluid.bagSizesMl ?? []).map((size) => millilitres(Number(size))),
    readyMixed: fluid.readyMixed,
    highRisk: fluid.highRisk,
  };
}

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
