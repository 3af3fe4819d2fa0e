/* eslint max-lines: ["error", 300] -- the contract of the calculation is read in one piece */
import type { Instant } from '../time';
import type {
  Hours,
  Kilograms,
  KilocaloriesPerKgPerDay,
  MgPerKgPerMinute,
  Millilitres,
  MillilitresPerHour,
  MillilitresPerKg,
  MilliosmolesPerLitre,
  Minutes,
  MmolPerLitre,
} from '../units';

/** Kinds of order that have a module in calc/kinds; a kind enters here together with its brim. */
export const KINDS = ['maintenance', 'bolus'] as const;
export type Kind = (typeof KINDS)[number];

export const FLAGS = [
  'raised-adh',
  'cardiac',
  'renal',
  'hepatic',
  'raised-icp',
  'severe-malnutrition',
  'low-albumin',
  'dka',
  'metabolic',
  'ketogenic-diet',
  'nil-by-mouth',
  'ceftriaxone',
] as const;
export type Flag = (typeof FLAGS)[number];

export const SEXES = ['female', 'male'] as const;
/** Absent means not recorded; the careful reading is then used and said. */
export type Sex = (typeof SEXES)[number];

export const WEIGHT_METHODS = [
  'scales',
  'baby-scales',
  'bed-scales',
  'stated',
  'estimated-age',
  'estimated-tape',
  'birth-weight',
] as const;
export type WeightMethod = (typeof WEIGHT_METHODS)[number];
export const MEASURED_METHODS: readonly WeightMethod[] = [
  'scales',
  'baby-scales',
  'bed-scales',
  'birth-weight',
];

export const LINE_CLASSES = ['peripheral', 'central', 'intraosseous'] as const;
export type LineClass = (typeof LINE_CLASSES)[number];

export const FRACTIONS = ['full', 'four-fifths', 'two-thirds', 'half'] as const;
export type Fraction = (typeof FRACTIONS)[number];

export const MAINTENANCE_METHODS = ['bands-daily', 'bands-hourly', 'who', 'newborn'] as const;
export type MaintenanceMethod = (typeof MAINTENANCE_METHODS)[number];

export const BOLUS_ROUTES = ['pump', 'syringe', 'pressure-bag', 'gravity'] as const;
export type BolusRoute = (typeof BOLUS_ROUTES)[number];

/** One stocked fluid as the calculation needs it: composition per litre of the ready bag, label osmolarity. */
export type FluidComposition = {
  id: string;
  name: string;
  /** The fluid without its ready-mixed potassium: two products of one base differ only in potassium. */
  base: string;
  addedPotassium: MmolPerLitre;
  sodium: MmolPerLitre;
  potassium: MmolPerLitre;
  chloride: MmolPerLitre;
  calcium: MmolPerLitre;
  magnesium: MmolPerLitre;
  lactate: MmolPerLitre;
  acetate: MmolPerLitre;
  gluconate: MmolPerLitre;
  glucoseGPerL: number;
  osmolarity: MilliosmolesPerLitre;
  bagSizes: Millilitres[];
  readyMixed: boolean;
  highRisk: boolean;
  /** Where the shelf limits the product; absent means it says nothing. */
  permittedKinds?: readonly Kind[];
  permittedLines?: readonly LineClass[];
  newbornOnly?: boolean;
};

export type ChildFacts = {
  /** Civil date YYYY-MM-DD in the hospital's zone. */
  bornOn: string;
  /** Instant of birth where it is known; newborn bands need it. */
  bornAt?: Instant;
  sex?: Sex;
  gestationWeeks?: number;
  gestationDays?: number;
  flags: readonly Flag[];
};

export type DosingWeight = { kg: Kilograms; method: WeightMethod; at: Instant };

/** Latest results within reach; absent means no result, never zero. */
export type ResultFacts = Partial<
  Record<'sodium' | 'potassium' | 'glucose', { value: number; at: Instant }>
> & { urinePassedAt?: Instant };

export type BolusGiven = { ml: Millilitres; at: Instant; here: boolean };
/** Another order that runs or is signed and not started. */
export type RunningFluid = { code: string; rate: MillilitresPerHour; fluid: FluidComposition };

export type IntakeFacts = {
  bolusesLast24h: readonly BolusGiven[];
  running: readonly RunningFluid[];
};

export type MaintenanceOrder = {
  kind: 'maintenance';
  method: MaintenanceMethod;
  fraction: Fraction;
  /** WHO method only. */
  temperatureC?: number;
  /** Newborn method only; absent proposes the lower end of the band. */
  newbornMlPerKgPerDay?: number;
  /** Stated by the prescriber, 0 only when typed as 0. */
  feeds: Millilitres;
  drugs: Millilitres;
  /** A rate typed instead of the worked-out one. */
  typedRate?: MillilitresPerHour;
  hours: Hours;
  fluid: FluidComposition;
  fractionReason?: string;
};

export type BolusOrder = {
  kind: 'bolus';
  dose: { by: 'weight'; mlPerKg: MillilitresPerKg } | { by: 'volume'; volume: Millilitres };
  over: Minutes;
  route: BolusRoute;
  fluid: FluidComposition;
  /** The intensive-care or consultant's advice asked for above 60 mL/kg. */
  advisedBy?: string;
};

export type OrderInputs = MaintenanceOrder | BolusOrder;

export type WorkOutRequest = {
  at: Instant;
  zone: string;
  child: ChildFacts;
  weight: DosingWeight;
  /** The last measured weight; freshness rules look at it. */
  lastMeasuredAt?: Instant;
  line: LineClass;
  results: ResultFacts;
  intake: IntakeFacts;
  /** A consultant's plan on the chart. */
  plan?: { kind: 'fraction'; fraction: Fraction } | { kind: 'allowance'; mlPer24h: Millilitres };
  order: OrderInputs;
};

export type StepMark = 'sum' | 'answer' | 'stop';
/** One line of the workings, already in words; results keep full precision beside their printed form. */
export type Step = {
  label: string;
  working: string;
  value: number;
  result: string;
  unit: string;
  source: string;
  mark?: StepMark;
};

export type Strength = 'information' | 'caution' | 'senior' | 'brim';

/** A limit that applied. `met` false means the order breaks it. */
export type LimitFinding = {
  code: string;
  strength: Strength;
  title: string;
  text: string;
  value?: number;
  limit?: number;
  unit?: string;
  met: boolean;
  /** The author must give a reason before signing. */
  reasonOwed?: boolean;
  /** The form field whose filling settles what is owed. */
  owes?: 'fractionReason' | 'advisedBy';
  /** Senior matter of an emergency kind: agreed afterwards, a countersignature due in 1 h; it never delays. */
  deferred?: true;
  /** A legal value to offer as a button, in the field it belongs to. */
  offer?: { field: string; value: string; label: string };
  source: string;
};

/** A further ceiling drawn as a small gauge. */
export type OtherBrim = { code: string; label: string; value: number; limit: number; text: string };

export type Band = { label: string; ml: number; fullMl: number };
export type GaugeFigures = {
  orderMl: number;
  brimMl: number;
  brimNote: 'in 24 h' | 'in one bolus';
  bands: Band[];
  ghosts: { label: string; ml: number }[];
};

export type Given = { code: string; label: string; value: number; text: string; unit: string };

export type MaintenanceFigures = {
  kind: 'maintenance';
  /** 24 h volume of the method before fraction and intake, after the ceiling. */
  fullMl: Millilitres;
  /** After fraction and other intake, unrounded. */
  dayMl: Millilitres;
  perHourExact: MillilitresPerHour;
  /** What goes on the pump: the typed rate, or the worked-out one at the pump step. */
  rate: MillilitresPerHour;
  /** The worked-out rate at the pump step, typed or not. */
  workedOutRate: MillilitresPerHour;
  hours: Hours;
  /** rate × hours, at the volume step. */
  volume: Millilitres;
};

export type BolusFigures = {
  kind: 'bolus';
  volume: Millilitres;
  workedOutVolume: Millilitres;
  mlPerKg: MillilitresPerKg;
  over: Minutes;
  /** mL/h for a pump; absent by hand. */
  rate?: MillilitresPerHour;
  percentOfCirculating: number;
  totalMlPerKg24h: MillilitresPerKg;
};

export type Figures = MaintenanceFigures | BolusFigures;

export type WorkOut =
  | {
      ok: true;
      figures: Figures;
      steps: Step[];
      gives: Given[];
      limits: LimitFinding[];
      otherBrims: OtherBrim[];
      gauge: GaugeFigures;
      readBack: string;
      calc: string;
      rulebook: number;
    }
  | {
      ok: false;
      code: string;
      field?: string;
      detail: string;
      offer?: { field: string; value: string; label: string };
    };

/** Units that only the `gives` use, re-exported so that a caller needs one import. */
export type { KilocaloriesPerKgPerDay, MgPerKgPerMinute };
