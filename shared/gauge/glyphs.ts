import { formatNumber } from '@shared/rounding';

/** One stroke or filled shape of a glyph, in a 16 × 16 box. */
export type GlyphShape = {
  d: string;
  /** Filled and not stroked. */
  filled?: true;
  /** Filled and stroked, for solid shapes that must be as large as the open ones. */
  solid?: true;
  /** Stroke width where it is not 1.6. */
  width?: number;
  butt?: true;
  dash?: string;
  dashOffset?: number;
};

const circle = (cx: number, cy: number, r: number): string =>
  `M${formatNumber(cx - r, 2)} ${cy}a${r} ${r} 0 1 0 ${2 * r} 0a${r} ${r} 0 1 0 ${-2 * r} 0z`;

const ring = { d: circle(8, 8, 6.4), width: 1.4 };
const dashed: GlyphShape = { d: circle(8, 8, 5.7), dash: '2.2 1.38', dashOffset: 1.1, butt: true };
const drop = 'M8 1.4c2.9 3.7 5 6.1 5 8.4a5 5 0 0 1-10 0c0-2.3 2.1-4.7 5-8.4z';
const refusal: GlyphShape[] = [{ d: circle(8, 8, 6.2) }, { d: 'm5.7 5.7 4.6 4.6M10.3 5.7l-4.6 4.6' }];

const SHAPES = {
  draft: [dashed],
  'awaiting-check': [{ d: circle(8, 8, 5.7) }, { d: 'M2.3 8a5.7 5.7 0 0 0 11.4 0z', filled: true }],
  // the check's half and the pharmacist's quarter still to come
  'awaiting-pharmacist': [{ d: circle(8, 8, 5.7) }, { d: 'M8 8V2.3A5.7 5.7 0 1 1 2.3 8z', filled: true }],
  // the rings of "signed", apart
  disputed: [{ d: circle(3.8, 8, 2.9) }, { d: circle(12.2, 8, 2.9) }, { d: 'M8 3.4v9.2', dash: '1.6 2.2' }],
  returned: [ring, { d: 'M11 8H5.2M7.4 5.7 5.1 8l2.3 2.3' }],
  signed: [{ d: 'M6.85 11.8A4.1 4.1 0 1 1 8.86 10.04' }, { d: 'M9.15 4.2A4.1 4.1 0 1 1 7.14 5.96' }],
  running: [
    ring,
    { d: 'M8 3.9c1.5 2 2.6 3.5 2.6 4.9a2.6 2.6 0 0 1-5.2 0c0-1.4 1.1-2.9 2.6-4.9z', filled: true },
  ],
  held: [ring, { d: 'M6.4 5.8v4.4M9.6 5.8v4.4' }],
  away: [{ d: 'M11.3 3.4A5.7 5.7 0 1 0 11.3 12.6' }, { d: 'M6.6 8h8M12.3 5.7 14.6 8l-2.3 2.3' }],
  stopped: [
    {
      d: 'M3.9 3.3h8.2a.6.6 0 0 1 .6.6v8.2a.6.6 0 0 1-.6.6H3.9a.6.6 0 0 1-.6-.6V3.9a.6.6 0 0 1 .6-.6z',
      solid: true,
    },
  ],
  finished: [{ d: circle(8, 8, 5.7), solid: true }],
  // a later one lies over it
  replaced: [
    { d: circle(10.4, 8, 4.5) },
    { d: 'M6.3 3.7a4.5 4.5 0 1 0 0 8.6 7 7 0 0 1 0-8.6z', solid: true },
  ],
  revised: [{ d: 'M13.4 6.1A5.7 5.7 0 1 0 13.7 8' }, { d: 'M13.9 2.6v3.6h-3.6' }],
  withdrawn: [ring, { d: 'M5.2 8h5.6' }],
  discarded: [dashed, { d: 'M4.2 11.8 11.8 4.2' }],
  lapsed: [{ d: 'M11.51 3.51A5.7 5.7 0 1 1 4.49 3.51' }],
  // half filled as "awaiting check": the second person comes afterwards
  given: [{ d: drop }, { d: 'M3 9.8a5 5 0 0 0 10 0z', filled: true }],
  countersigned: [{ d: drop }, { d: 'm5.6 9.8 1.8 1.8 3.1-3.4' }],

  agrees: [{ d: 'm3 8.6 3.3 3.3L13 4.8', width: 2 }],
  refused: refusal,
  caution: [{ d: 'M8 2.3 14.3 13.3H1.7z' }, { d: 'M8 6.4v3.4' }, { d: circle(8, 11.5, 0.95), filled: true }],
  // goes up to someone
  senior: [ring, { d: 'M4.9 8.2 8 5.1l3.1 3.1M4.9 11.3 8 8.2l3.1 3.1' }],
  brim: [{ d: 'M4 1.8V11.2a3 3 0 0 0 3 3h2a3 3 0 0 0 3-3V1.8' }, { d: 'M.8 5.8h14.4', width: 2, butt: true }],
  covered: [{ d: circle(8, 8, 6.2) }, { d: 'M4 11.8 11.8 4M2.2 9 9 2.2M7 13.8 13.8 7', width: 1.3 }],
  information: [{ d: circle(8, 8, 6.2) }, { d: 'M8 7.6v3.4' }, { d: circle(8, 5, 0.95), filled: true }],
  offline: [{ d: 'M2 8h3.5M10.5 8H14M6.5 11.5l3-7' }],
  clock: [{ d: circle(8, 8, 6.2) }, { d: 'M8 4.6V8l2.4 1.7' }],
  find: [{ d: circle(7, 7, 4.6) }, { d: 'm10.5 10.5 3.6 3.6' }],
  'chevron-down': [{ d: 'm3 5.5 5 5 5-5' }],
  'arrow-right': [{ d: 'M2.5 8h11M9.3 3.8 13.5 8l-4.2 4.2' }],
  'arrow-left': [{ d: 'M13.5 8h-11M6.7 3.8 2.5 8l4.2 4.2' }],
  up: [{ d: 'M8 13.5v-11M3.8 6.7 8 2.5l4.2 4.2' }],
  down: [{ d: 'M8 2.5v11M3.8 9.3 8 13.5l4.2-4.2' }],
  menu: [{ d: 'M2 4.5h12M2 8h12M2 11.5h12' }],
  close: [{ d: 'm3.5 3.5 9 9M12.5 3.5l-9 9' }],
} as const satisfies Record<string, readonly GlyphShape[]>;

export type GlyphName = keyof typeof SHAPES;

/** Every glyph, in the order of the kit page. */
export const GLYPH_NAMES = Object.keys(SHAPES) as readonly GlyphName[];

/** The shapes of a glyph, drawn in order. */
export const glyphShapes = (name: GlyphName): readonly GlyphShape[] => SHAPES[name];
