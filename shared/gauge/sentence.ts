import { formatNumber } from '@shared/rounding';
import type { GaugeInput } from './input';

const ml = (value: number): string => `${formatNumber(value, 1)} mL`;

const joined = (parts: readonly string[]): string =>
  parts.length < 2 ? parts.join('') : `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)!}`;

/** The gauge in words, for those who cannot see it: order, bands, reductions, brim. */
export const describeGauge = (input: GaugeInput): string => {
  const { orderMl, brimMl, brimNote } = input;
  if (orderMl > brimMl) {
    return `Brim gauge: the order asks for ${ml(orderMl)}. The fill stops at the brim, ${ml(brimMl)} ${brimNote}, and ${ml(orderMl - brimMl)} is shown hatched above it.`;
  }
  const bands = input.bands.map((band) =>
    band.ml === band.fullMl
      ? `${band.label} gives ${ml(band.ml)}`
      : `${band.label} gives ${ml(band.ml)} of ${ml(band.fullMl)}`,
  );
  const ghosts = input.ghosts.filter((ghost) => ghost.ml > 0).map((ghost) => ghost.label);
  return [
    `Brim gauge: the order gives ${ml(orderMl)} ${brimNote}.`,
    bands.length > 0 ? `In full, ${joined(bands)}.` : '',
    ghosts.length > 0 ? `Taken off: ${joined(ghosts)}.` : '',
    `The brim is ${ml(brimMl)} ${brimNote}.`,
  ]
    .filter(Boolean)
    .join(' ');
};
