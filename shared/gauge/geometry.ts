import { formatNumber } from '@shared/rounding';
import type { GaugeInput } from './input';
import type { GhostLabel, Text } from './labels';
import { bandLabels, ghostLabel, pointerWords } from './labels';
import { describeGauge } from './sentence';

export type Tick = { y: number; isMajor: boolean; text: Text | null };
export type Bracket = { path: string; label: Text; volume: Text };
export type Over = {
  box: { x: number; y: number; width: number; height: number };
  outline: string;
  hatch: string[];
  words: Text[];
};

export type GaugeDrawing = {
  width: number;
  height: number;
  vessel: { left: number; right: number; top: number; bottom: number };
  wall: string;
  /** The inside of the vessel, to which fill and ghost are clipped. */
  inside: string;
  brimY: number;
  fillY: number;
  /** Top of the ghost; null without one. */
  ghostY: number | null;
  ghostLine: string | null;
  /** Band boundaries within the fill, and above it. */
  engraved: string[];
  dashed: string[];
  ticks: Tick[];
  brackets: Bracket[];
  pointer: { path: string; volume: Text; note: Text } | null;
  ghostLabel: GhostLabel | null;
  brim: { line: string; flag: string; title: Text; note: Text };
  over: Over | null;
  sentence: string;
};

const BRIM_AT = 0.76;
const LEFT = 82;
const TOP = 10;
const BELOW = 12;
const INSET = 5;
const LIP = 6;
const CORNER = 14;
const HATCH_STEP = 7;
const MARKS_AT_LEAST = 3;
const LADDER = [1, 2, 5];

type Frame = {
  left: number;
  right: number;
  top: number;
  bottom: number;
  width: number;
  brimY: number;
  yOf: (ml: number) => number;
};

const px = (value: number): number => Number(formatNumber(value, 2));

/** The height of a volume, px from the top: the brim is at 0.76 of the inner height, whatever its value. */
const frameOf = (input: GaugeInput): Frame => {
  const bottom = input.heightPx - BELOW;
  const inner = bottom - TOP;
  const scale = (BRIM_AT * inner) / input.brimMl;
  const yOf = (ml: number) => bottom - scale * ml;
  const right = LEFT + (input.vesselPx ?? 60);
  return { left: LEFT, right, top: TOP, bottom, width: input.widthPx ?? 252, brimY: yOf(input.brimMl), yOf };
};

/** Millilitres between two numbered marks: 1, 2 or 5 times a power of ten, at least three of them under the brim. */
export const markStep = (brimMl: number): number => {
  const power = 10 ** Math.floor(Math.log10(brimMl / MARKS_AT_LEAST));
  const fitting = LADDER.map((factor) => factor * power).filter((step) => brimMl / step >= MARKS_AT_LEAST);
  return fitting.at(-1) ?? power;
};

const wallPath = ({ left, right, top, bottom }: Frame): string =>
  `M${left - LIP} ${top}q6 0 6 6V${bottom - CORNER}q0 14 14 14H${right - CORNER}q14 0 14-14V${top + LIP}q0-6 6-6`;

const insidePath = ({ left, right, top, bottom }: Frame): string =>
  `M${left + INSET} ${top}V${bottom - INSET - 8}q0 8 8 8H${right - INSET - 8}q8 0 8-8V${top}z`;

/** Number texts may not touch what stands at the pointer, at the ghost's label or under the flag. */
const isFree = (y: number, taken: readonly (readonly [number, number])[]): boolean =>
  taken.every(([from, to]) => y < from || y > to);

const ticksOf = (input: GaugeInput, frame: Frame, taken: readonly (readonly [number, number])[]): Tick[] => {
  const step = markStep(input.brimMl) / 2;
  const count = Math.ceil(input.brimMl / step - 1e-9) - 1;
  return Array.from({ length: count }, (_, index) => {
    const ml = (index + 1) * step;
    const y = frame.yOf(ml);
    const isMajor = index % 2 === 1;
    const text =
      isMajor && isFree(y, taken) ? { x: frame.right + 15, y: px(y + 4), text: formatNumber(ml, 2) } : null;
    return { y: px(y), isMajor, text };
  });
};

const boundariesOf = (input: GaugeInput, frame: Frame): { engraved: string[]; dashed: string[] } => {
  const engraved: string[] = [];
  const dashed: string[] = [];
  let sum = 0;
  for (const band of input.bands.slice(0, -1)) {
    sum += band.ml;
    const line = `M${frame.left + INSET} ${px(frame.yOf(sum))}H${frame.right - INSET}`;
    if (sum < input.brimMl) (sum <= input.orderMl ? engraved : dashed).push(line);
  }
  return { engraved, dashed };
};

const bracketsOf = (input: GaugeInput, frame: Frame): Bracket[] => {
  const x = frame.left - 7;
  let sum = 0;
  const spans = input.bands
    .filter((band) => band.ml > 0)
    .map((band) => {
      const from = frame.yOf(sum);
      sum += band.ml;
      return { band, from: from - 1.5, to: frame.yOf(sum) + 1.5 };
    });
  const labels = bandLabels(
    spans.map(({ band, from, to }) => ({ band, middle: (from + to) / 2 })),
    x - 12,
  );
  return spans.map(({ from, to }, index) => ({
    path: `M${x} ${px(to)}h-5V${px(from)}h5`,
    ...labels[index]!,
  }));
};

const overOf = (input: GaugeInput, frame: Frame): Over | null => {
  if (input.orderMl <= input.brimMl) return null;
  const top = Math.max(frame.yOf(input.orderMl), frame.top + 2);
  const height = frame.brimY - top;
  const x = frame.left + INSET;
  const width = frame.right - frame.left - 2 * INSET;
  const count = Math.ceil((width + height) / HATCH_STEP);
  const middle = top + height / 2;
  const excess = `${formatNumber(input.orderMl - input.brimMl, 1)} mL`;
  return {
    box: { x, y: px(top), width, height: px(height) },
    outline: `M${x + 1} ${px(frame.brimY)}V${px(top)}H${x + width - 1}V${px(frame.brimY)}`,
    hatch: Array.from({ length: count }, (_, index) => {
      const from = x - height + index * HATCH_STEP;
      return `M${px(from)} ${px(frame.brimY)}l${px(height)} ${px(-height)}`;
    }),
    words: [
      { x: frame.left - 12, y: px(middle - 4), text: excess },
      { x: frame.left - 12, y: px(middle + 12), text: 'over' },
    ],
  };
};

const brimOf = (input: GaugeInput, { left, right, width, brimY }: Frame): GaugeDrawing['brim'] => {
  const x = right + 11;
  return {
    line: `M${left - 14} ${px(brimY)}H${right + 63}`,
    flag: `M${x} ${px(brimY - 42)}H${width - 1}l-7 21 7 22.25H${x}z`,
    title: { x: right + 20, y: px(brimY - 25), text: `brim ${formatNumber(input.brimMl, 1)} mL` },
    note: { x: right + 20, y: px(brimY - 9), text: input.brimNote },
  };
};

/** The whole brim gauge as paths and placed texts, for the screen and for print; px, y grows downwards. */
export const drawGauge = (input: GaugeInput): GaugeDrawing => {
  const frame = frameOf(input);
  const over = overOf(input, frame);
  const fillY = over ? frame.brimY : frame.yOf(input.orderMl);
  const ghostMl = input.ghosts.reduce((sum, ghost) => sum + ghost.ml, 0);
  const ghostY = ghostMl > 0 && !over ? Math.max(frame.yOf(input.orderMl + ghostMl), frame.brimY) : null;
  const words = over ? null : pointerWords({ fillY, brimY: frame.brimY, x: frame.right + 16 }, input);
  const label =
    ghostY === null
      ? null
      : ghostLabel({ ghostY, fillY, right: frame.right, brimY: frame.brimY }, input.ghosts, words);
  const taken = [words?.taken, label?.taken].filter((span) => span !== undefined);
  return {
    width: frame.width,
    height: input.heightPx,
    vessel: { left: frame.left, right: frame.right, top: frame.top, bottom: frame.bottom },
    wall: wallPath(frame),
    inside: insidePath(frame),
    brimY: px(frame.brimY),
    fillY: px(fillY),
    ghostY: ghostY === null ? null : px(ghostY),
    ghostLine: ghostY === null ? null : `M${frame.left + INSET} ${px(ghostY)}H${frame.right - INSET}`,
    ...boundariesOf(input, frame),
    ticks: ticksOf(input, frame, taken),
    brackets: bracketsOf(input, frame),
    pointer: words && {
      path: `M${frame.right + 2} ${px(fillY)}l9-5.5v11z`,
      volume: words.volume,
      note: words.note,
    },
    ghostLabel: label,
    brim: brimOf(input, frame),
    over,
    sentence: describeGauge(input),
  };
};
