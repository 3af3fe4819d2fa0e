import { above, formatNumber, snap } from '../rounding';
import type { MethodFigure } from './bands';
import type { Scene } from './scene';
import { step } from './step';
import type { Band } from './types';

/** The most maintenance and counted other intake may come to in 24 h, mL; NICE NG29 1.4, sex not recorded: the lower. */
export function ceilingOf({ request, rules }: Scene): number {
  const { ceilingBoys, ceilingGirls } = rules.maintenance;
  if (request.child.sex === 'male') return ceilingBoys;
  if (request.child.sex === 'female') return ceilingGirls;
  return Math.min(ceilingBoys, ceilingGirls);
}

/** Whose ceiling it is, in words. */
export function ceilingLabel({ request }: Scene): string {
  if (request.child.sex === undefined) return 'ceiling, sex not recorded';
  return request.child.sex === 'male' ? 'ceiling, boys' : 'ceiling, girls';
}

/** Holds a method's figure at the ceiling: a line in the workings, and the band it cuts keeps its full size beside it. */
export function holdAtCeiling(scene: Scene, figure: MethodFigure): MethodFigure {
  const ceiling = ceilingOf(scene);
  if (!above(figure.fullMl, ceiling)) return figure;
  const line = step(
    ceilingLabel(scene),
    `at most ${formatNumber(ceiling, 1)}`,
    [ceiling, 'mL'],
    scene.sources.maintenance.ceilingBoys,
    'stop',
  );
  return { fullMl: ceiling, bands: cutBands(figure.bands, ceiling), steps: [...figure.steps, line] };
}

function cutBands(bands: readonly Band[], ceiling: number): Band[] {
  let left = ceiling;
  return bands.map((band) => {
    const ml = Math.min(band.ml, left);
    left = snap(left - ml);
    return { ...band, ml };
  });
}
