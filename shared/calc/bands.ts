import { formatNumber, snap } from '../rounding';
import type { Kilograms } from '../units';
import { printed, step } from './step';
import type { Band, Step } from './types';

/** What a method gives in 24 h before ceiling, fraction and other intake. */
export type MethodFigure = { fullMl: number; bands: Band[]; steps: Step[] };

/** How much of a weight lies in the first band, the second, and above both, kg. */
export function bandWeights(kg: Kilograms, first: number, second: number): [number, number, number] {
  const inFirst = Math.min(kg, first);
  const inSecond = Math.min(Math.max(snap(kg - first), 0), second);
  return [inFirst, inSecond, Math.max(snap(kg - first - second), 0)];
}

export type BandRule = {
  perKg: [number, number, number];
  edges: [number, number];
  unit: string;
  source: string;
};

const LABELS = ['first', 'next', 'rest,'];

/** One band for each part of the weight, mL per `unit` of time; bands that hold nothing are left out. */
export function sumBands(kg: Kilograms, rule: BandRule): MethodFigure {
  const weights = bandWeights(kg, ...rule.edges);
  const bands: Band[] = [];
  const steps: Step[] = [];
  let sum = 0;
  for (let i = 0; i < 3; i += 1) {
    const weight = weights[i] ?? 0;
    if (weight === 0) continue;
    const ml = snap(weight * (rule.perKg[i] ?? 0));
    const label = `${LABELS[i]} ${formatNumber(weight, 3)} kg`;
    sum += ml;
    bands.push({ label, ml, fullMl: ml });
    steps.push(
      step(label, `${printed(weight)} × ${printed(rule.perKg[i] ?? 0)}`, [ml, rule.unit], rule.source),
    );
  }
  return { fullMl: snap(sum), bands, steps };
}

/** The addition line under a row of bands: "1000 + 320". */
export const sumLine = (label: string, bands: readonly Band[], sum: number, unit: string): Step =>
  step(label, bands.map((band) => printed(band.ml)).join(' + '), [sum, unit], '', 'sum');
