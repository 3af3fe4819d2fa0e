import { atMost } from '../rounding';
import type { Scene } from './scene';
import { glucoseBrim, otherGlucose, otherPotassium, potassiumBrim } from './solutes';
import type { FluidComposition } from './types';

/** The rates at which this fluid meets a brim other than the 24 h volume, mL/h. */
export function soluteLines(scene: Scene, fluid: FluidComposition): [potassium: number, glucose: number] {
  const potassium =
    fluid.potassium > 0
      ? ((potassiumBrim(scene) - otherPotassium(scene)) * 1000) / fluid.potassium
      : Infinity;
  const glucose =
    fluid.glucoseGPerL > 0
      ? ((glucoseBrim(scene) - otherGlucose(scene)) * 1000) / fluid.glucoseGPerL
      : Infinity;
  return [potassium, glucose];
}

/** The lowest brim that the exact rate still keeps, mL/h: the one its rounding might pass. */
export function nextLine(exact: number, lines: readonly number[]): number {
  let next = Infinity;
  for (const line of lines) if (line < next && atMost(exact, line)) next = line;
  return next;
}
