import type { FluidComposition, Kind, LineClass } from '../calc/types';
import { millilitres, milliosmolesPerLitre, mmolPerLitre } from '../units';
import type { Millilitres } from '../units';

/** A stocked fluid before a hospital gives it an id; the shelf says for what, by which line and for whom. */
export type ShelfProduct = Omit<
  FluidComposition,
  'id' | 'permittedKinds' | 'permittedLines' | 'newbornOnly'
> & {
  permittedKinds: readonly Kind[];
  permittedLines: readonly LineClass[];
  newbornOnly: boolean;
};

type Row = {
  name: string;
  /** Sodium, potassium, chloride of the base fluid, mmol/L. */
  ions: [sodium: number, potassium: number, chloride: number];
  others?: Partial<Record<'calcium' | 'magnesium' | 'lactate' | 'acetate' | 'gluconate', number>>;
  glucose?: number;
  osmolarity: number;
  /** Ready-mixed potassium chloride, mmol/L; one product each. */
  withPotassium?: number[];
  bags?: number[];
  kinds?: Kind[];
  isHighRisk?: boolean;
  newbornOnly?: boolean;
};

const ANY_LINE: LineClass[] = ['peripheral', 'central', 'intraosseous'];
const BOTH: Kind[] = ['maintenance', 'bolus'];
const MAINTENANCE: Kind[] = ['maintenance'];
const SMALL_BAGS = [250, 500];

/** Label values; mmol/L, g/L, mOsm/L. */
const ROWS: Row[] = [
  {
    name: 'Sodium chloride 0.9%',
    ions: [154, 0, 154],
    osmolarity: 308,
    withPotassium: [20, 40],
    bags: [250, 500, 1000],
    kinds: BOTH,
  },
  {
    name: 'Sodium chloride 0.9% + glucose 5%',
    ions: [154, 0, 154],
    glucose: 50,
    osmolarity: 585,
    withPotassium: [20, 40],
  },
  { name: 'Sodium chloride 0.9% + glucose 10%', ions: [154, 0, 154], glucose: 100, osmolarity: 863 },
  { name: 'Sodium chloride 0.45% + glucose 5%', ions: [77, 0, 77], glucose: 50, osmolarity: 432 },
  {
    name: 'Sodium chloride 0.45% + glucose 10%',
    ions: [77, 0, 77],
    glucose: 100,
    osmolarity: 710,
    bags: SMALL_BAGS,
    newbornOnly: true,
  },
  {
    name: 'Sodium chloride 0.18% + glucose 10%',
    ions: [30, 0, 30],
    glucose: 100,
    osmolarity: 616,
    bags: SMALL_BAGS,
    newbornOnly: true,
  },
  {
    name: 'Compound sodium lactate',
    ions: [131, 5, 111],
    others: { calcium: 2, lactate: 29 },
    osmolarity: 278,
    kinds: BOTH,
  },
  {
    name: 'Ringer’s lactate',
    ions: [130, 4, 109],
    others: { calcium: 1.4, lactate: 28 },
    osmolarity: 273,
    kinds: BOTH,
  },
  {
    name: 'Ringer’s lactate + glucose 5%',
    ions: [130, 4, 109],
    others: { calcium: 1.4, lactate: 28 },
    glucose: 50,
    osmolarity: 551,
  },
  {
    name: 'Balanced crystalloid 140',
    ions: [140, 5, 98],
    others: { magnesium: 1.5, acetate: 27, gluconate: 23 },
    osmolarity: 295,
    kinds: BOTH,
  },
  {
    name: 'Balanced crystalloid 140 + glucose 5%',
    ions: [140, 5, 98],
    others: { magnesium: 1.5, acetate: 27, gluconate: 23 },
    glucose: 50,
    osmolarity: 573,
  },
  { name: 'Glucose 5%', ions: [0, 0, 0], glucose: 50, osmolarity: 278 },
  { name: 'Glucose 10%', ions: [0, 0, 0], glucose: 100, osmolarity: 556 },
  // stocked, and for no kind this edition works out: hypertonic saline and half-strength Darrow's have kinds of their own
  {
    name: 'Sodium chloride 2.7%',
    ions: [462, 0, 462],
    osmolarity: 924,
    bags: SMALL_BAGS,
    kinds: [],
    isHighRisk: true,
  },
  {
    name: 'Sodium chloride 3%',
    ions: [513, 0, 513],
    osmolarity: 1027,
    bags: SMALL_BAGS,
    kinds: [],
    isHighRisk: true,
  },
  {
    name: 'Half-strength Darrow’s + glucose 5%',
    ions: [61, 17, 51],
    others: { lactate: 27 },
    glucose: 50,
    osmolarity: 434,
    kinds: [],
  },
];

/** One mmol of potassium chloride adds 2 mOsm. */
const OSMOLES_OF_KCL = 2;
/** Ready-mixed potassium above this makes a bag high risk as stocked; the rulebook may ask for more. */
const HIGH_RISK_ABOVE = 20;

const NO_OTHERS = { calcium: 0, magnesium: 0, lactate: 0, acetate: 0, gluconate: 0 };

/** Composition per litre of a row's fluid with so much ready-mixed potassium chloride. */
function composition(row: Row, added: number) {
  const [sodium, potassium, chloride] = row.ions;
  const others = { ...NO_OTHERS, ...row.others };
  return {
    addedPotassium: mmolPerLitre(added),
    sodium: mmolPerLitre(sodium),
    potassium: mmolPerLitre(potassium + added),
    chloride: mmolPerLitre(chloride + added),
    calcium: mmolPerLitre(others.calcium),
    magnesium: mmolPerLitre(others.magnesium),
    lactate: mmolPerLitre(others.lactate),
    acetate: mmolPerLitre(others.acetate),
    gluconate: mmolPerLitre(others.gluconate),
    glucoseGPerL: row.glucose ?? 0,
    osmolarity: milliosmolesPerLitre(row.osmolarity + OSMOLES_OF_KCL * added),
  };
}

const product = (row: Row, added: number): ShelfProduct => ({
  name: added === 0 ? row.name : `${row.name} + potassium chloride ${added} mmol/L`,
  base: row.name,
  ...composition(row, added),
  bagSizes: bagsOf(row, added),
  readyMixed: true,
  highRisk: row.isHighRisk ?? added > HIGH_RISK_ABOVE,
  permittedKinds: added === 0 ? (row.kinds ?? MAINTENANCE) : MAINTENANCE,
  permittedLines: ANY_LINE,
  newbornOnly: row.newbornOnly ?? false,
});

const bagsOf = (row: Row, added: number): Millilitres[] =>
  (added === 0 ? (row.bags ?? [500, 1000]) : [500, 1000]).map(millilitres);

/** What a hospital's shelf starts with; generic names, label values. */
export const DEFAULT_SHELF: readonly ShelfProduct[] = ROWS.flatMap((row) =>
  [0, ...(row.withPotassium ?? [])].map((added) => product(row, added)),
);
