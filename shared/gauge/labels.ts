import { formatNumber } from '@shared/rounding';
import type { GaugeBand, GaugeGhost, GaugeInput } from './input';

/** A text and its place: the baseline's start, or its end where the drawing anchors it there. */
export type Text = { x: number; y: number; text: string };

/** Words at a leader line; `taken` is the height they use, px. */
export type GhostLabel = { leader: string | null; lines: Text[]; taken: readonly [number, number] };

type PointerWords = { volume: Text; note: Text; taken: readonly [number, number] };

const NEAR_BRIM = 26;
const BAND_PITCH = 34;
const LINE = 14;

const px = (value: number): number => Number(formatNumber(value, 2));

/** The order's volume at the fill; close under the brim the words move below the line. */
export const pointerWords = (
  at: { fillY: number; brimY: number; x: number },
  input: Pick<GaugeInput, 'orderMl' | 'orderNote'>,
): PointerWords => {
  const isNear = at.fillY - at.brimY < NEAR_BRIM;
  const baseline = isNear ? at.brimY + 25 : at.fillY + 7;
  return {
    volume: { x: at.x, y: px(baseline), text: `${formatNumber(input.orderMl, 1)} mL` },
    note: { x: at.x, y: px(baseline + 16), text: input.orderNote ?? 'this order' },
    taken: [baseline - 33, baseline + 27],
  };
};

/** One line for each reduction, above the ghost; under the pointer's words where the flag leaves no room. */
export const ghostLabel = (
  at: { ghostY: number; fillY: number; right: number; brimY: number },
  ghosts: readonly GaugeGhost[],
  words: PointerWords | null,
): GhostLabel => {
  const shown = ghosts.filter((ghost) => ghost.ml > 0);
  const lowest = Math.min(at.ghostY - 5, at.fillY - 11);
  const top = lowest - (shown.length - 1) * LINE - 10;
  const hasRoom = top > at.brimY + 4;
  const first = hasRoom ? lowest - (shown.length - 1) * LINE : (words?.note.y ?? at.brimY) + 17;
  const lines = shown.map((ghost, index) => ({
    x: at.right + 16,
    y: px(first + index * LINE),
    text: ghost.label,
  }));
  return {
    leader: hasRoom ? `M${at.right + 2} ${px(at.ghostY)}h6l5 ${px(lowest - 2 - at.ghostY)}` : null,
    lines,
    taken: [first - 24, first + (shown.length - 1) * LINE + 16],
  };
};

const volumeOf = (band: GaugeBand): string => {
  const shown = formatNumber(band.ml, 1);
  const full = formatNumber(band.fullMl, 1);
  return shown === full ? `${shown} mL` : `${shown} of ${full}`;
};

/** Two lines at the middle of each bracket, from the bottom up; short bands push the next label higher. */
export const bandLabels = (
  bands: readonly { band: GaugeBand; middle: number }[],
  x: number,
): { label: Text; volume: Text }[] => {
  let free = Infinity;
  return bands.map(({ band, middle }) => {
    const y = Math.min(middle, free);
    free = y - BAND_PITCH;
    return {
      label: { x, y: px(y - 2), text: band.label },
      volume: { x, y: px(y + 14), text: volumeOf(band) },
    };
  });
};
