import { formatNumber } from '@shared/rounding';

export type SmallGaugeInput = {
  /** How much, and how much at most, in one unit. */
  value: number;
  brim: number;
  /** Band boundaries and the full maintenance, in the same unit. */
  notches?: readonly number[];
  widthPx: number;
};

export type SmallGaugeDrawing = {
  width: number;
  height: number;
  wall: string;
  brim: string;
  fill: string | null;
  engraved: string[];
  dashed: string[];
  hatch: string[];
};

const BRIM_AT = 0.8;
const START = 3;
const LEAST_FILL = 6;
const HATCH_STEP = 4.5;

const px = (value: number): number => Number(formatNumber(value, 2));

/** The vessel on its side, mouth right: brim tick at 0.8 of the width, what passes it hatched; px. */
export const drawSmallGauge = ({
  value,
  brim,
  notches = [],
  widthPx,
}: SmallGaugeInput): SmallGaugeDrawing => {
  const brimX = BRIM_AT * widthPx;
  const xOf = (amount: number) => START + (amount / brim) * (brimX - START);
  const fillX = Math.max(LEAST_FILL, xOf(Math.min(value, brim)));
  const inside = notches.filter((notch) => notch > 0 && notch < brim && notch !== value);
  const mark = (notch: number) => `M${px(xOf(notch))} 6V12`;
  const overX = value > brim ? Math.min(xOf(value), widthPx - 1) : brimX;
  const hatches = value > brim ? Math.max(1, Math.floor((overX - brimX - START) / HATCH_STEP)) : 0;
  return {
    width: widthPx,
    height: 18,
    wall: `M${widthPx - 1} 4H5q-4 0-4 4v2q0 4 4 4H${widthPx - 1}`,
    brim: `M${px(brimX)} 1V17`,
    fill: value > 0 ? `M${px(fillX)} 6H5.5q-2.5 0-2.5 2.5v1q0 2.5 2.5 2.5H${px(fillX)}z` : null,
    engraved: inside.filter((notch) => notch < value).map(mark),
    dashed: inside.filter((notch) => notch > value).map(mark),
    hatch: Array.from(
      { length: hatches },
      (_, index) => `M${px(brimX + START + index * HATCH_STEP)} 12.4l5-6.8`,
    ),
  };
};
