import type { Scene } from './scene';
import type { FluidComposition } from './types';

/** Potassium that the other fluids give, mmol/h. */
export function otherPotassium({ request }: Scene): number {
  let sum = 0;
  for (const { rate, fluid } of request.intake.running) sum += (rate * fluid.potassium) / 1000;
  return sum;
}

/** Glucose that the other fluids give, g/h. */
export function otherGlucose({ request }: Scene): number {
  let sum = 0;
  for (const { rate, fluid } of request.intake.running) sum += (rate * fluid.glucoseGPerL) / 1000;
  return sum;
}

/** What the other fluids run at together, mL/h. */
export function otherFlow({ request }: Scene): number {
  let sum = 0;
  for (const { rate } of request.intake.running) sum += rate;
  return sum;
}

/** A potassium bag carries more than a balanced fluid does; the line is the rulebook's. */
export const isPotassiumBag = (fluid: FluidComposition, bagAbove: number): boolean =>
  fluid.addedPotassium > 0 || fluid.potassium > bagAbove;

/** The most potassium all fluids may give by this line before the brim, mmol/h. */
export function potassiumBrim({ request, rules, peripheral }: Scene): number {
  const { peripheralPerKg, peripheralPerHour, centralPerKg, centralPerHour } = rules.potassium;
  return peripheral
    ? Math.min(peripheralPerKg * request.weight.kg, peripheralPerHour)
    : Math.min(centralPerKg * request.weight.kg, centralPerHour);
}

/** The most glucose all fluids may give before the brim, g/h; endless from the age at which the rate lines end. */
export const glucoseBrim = ({ request, rules, age }: Scene): number =>
  age.years < rules.glucose.untilYears ? (rules.glucose.brim * request.weight.kg * 60) / 1000 : Infinity;
