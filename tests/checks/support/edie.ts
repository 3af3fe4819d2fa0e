import type { FluidComposition } from '@shared/calc/types';
import type { CheckContext } from '@shared/checks/own';
import { emptyCheckForm, type CheckForm } from '@shared/checks/form';
import type { OrderContent } from '@shared/orders/content';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { parseInstant, type Instant } from '@shared/time';
import { milliosmolesPerLitre, millilitres, mmolPerLitre } from '@shared/units';

/** Invented child of the design pictures: 4 years, 16.4 kg. 1000 + 6.4 × 50 = 1320 mL, 55 mL/h; 80 % 1056 mL, 44 mL/h. */
export const at = (text: string): Instant => parseInstant(text)!;
export const PLANNED = at('2026-06-10T11:00:00.000Z');

type Salts = {
  sodium: number;
  chloride: number;
  glucose?: number;
  addedPotassium?: number;
  osmolarity: number;
};
const fluid = (id: string, base: string, salts: Salts): FluidComposition => ({
  id,
  name: salts.addedPotassium ? `${base} + potassium chloride ${salts.addedPotassium} mmol/L` : base,
  base,
  addedPotassium: mmolPerLitre(salts.addedPotassium ?? 0),
  sodium: mmolPerLitre(salts.sodium),
  potassium: mmolPerLitre(salts.addedPotassium ?? 0),
  chloride: mmolPerLitre(salts.chloride),
  calcium: mmolPerLitre(0),
  magnesium: mmolPerLitre(0),
  lactate: mmolPerLitre(0),
  acetate: mmolPerLitre(0),
  gluconate: mmolPerLitre(0),
  glucoseGPerL: salts.glucose ?? 0,
  osmolarity: milliosmolesPerLitre(salts.osmolarity),
  bagSizes: [millilitres(500), millilitres(1000)],
  readyMixed: true,
  highRisk: false,
});

export const SALINE_GLUCOSE = 'Sodium chloride 0.9% + glucose 5%';
/** Compositions: clinical shelf, label values. */
export const PRODUCTS: FluidComposition[] = [
  fluid('sg0', SALINE_GLUCOSE, { sodium: 154, chloride: 154, glucose: 50, osmolarity: 585 }),
  fluid('sg20', SALINE_GLUCOSE, {
    sodium: 154,
    chloride: 174,
    glucose: 50,
    addedPotassium: 20,
    osmolarity: 625,
  }),
  fluid('sg40', SALINE_GLUCOSE, {
    sodium: 154,
    chloride: 194,
    glucose: 50,
    addedPotassium: 40,
    osmolarity: 665,
  }),
  fluid('s0', 'Sodium chloride 0.9%', { sodium: 154, chloride: 154, osmolarity: 308 }),
  fluid('b0', 'Balanced crystalloid 140 + glucose 5%', {
    sodium: 140,
    chloride: 98,
    glucose: 50,
    osmolarity: 573,
  }),
  fluid('h0', 'Sodium chloride 0.45% + glucose 5%', {
    sodium: 77,
    chloride: 77,
    glucose: 50,
    osmolarity: 432,
  }),
];

const textFluid = (product: FluidComposition): OrderContent['fluid'] => ({
  id: product.id,
  name: product.name,
  base: product.base,
  addedPotassium: String(product.addedPotassium),
  sodium: String(product.sodium),
  potassium: String(product.potassium),
  chloride: String(product.chloride),
  calcium: '0',
  magnesium: '0',
  lactate: '0',
  acetate: '0',
  gluconate: '0',
  glucoseGPerL: String(product.glucoseGPerL),
  osmolarity: String(product.osmolarity),
  readyMixed: true,
  highRisk: false,
});
export const fluidText = (id: string): OrderContent['fluid'] => textFluid(PRODUCTS.find((p) => p.id === id)!);

const common = {
  schema: 1,
  code: 'BL-260610-031',
  version: 1,
  child: {
    id: 'c1',
    number: 'SM 418 207',
    surname: 'Hartnoll',
    given: 'Edie',
    bornOn: '2022-03-14',
    bornAt: null,
    sex: 'female',
    gestation: null,
    flags: [],
    allergies: 'Ibuprofen: wheeze',
    ageText: '4 y',
  },
  weight: { id: 'w1', kg: '16.400', method: 'scales', at: '2026-06-10T06:40:00.000Z' },
  reason: 'Too breathless to drink enough',
  urgency: 'routine',
  line: 'peripheral',
  steps: [],
  gives: [],
  limits: [],
  otherBrims: [],
  gauge: { orderMl: '1056.0', brimMl: '2000.0', brimNote: 'in 24 h', bands: [], ghosts: [] },
  readBack: '',
  calc: '1',
  rulebook: { number: 1, sha256: '' },
  isHighRisk: false,
  plannedStart: '2026-06-10T11:00:00.000Z',
  startBy: '2026-06-10T17:00:00.000Z',
  lapsesAt: '2026-06-11T11:00:00.000Z',
  reviewBy: null,
  bloodsBy: null,
} as const;

type Maintenance = Extract<OrderContent['inputs'], { kind: 'maintenance' }>;

/** Maintenance at 80 %: 44 mL/h, 1056 mL in 24 h. */
export const maintenance = (
  inputs: Partial<Maintenance> = {},
  figures: Partial<OrderContent['figures']> = {},
  rest: Partial<OrderContent> = {},
): OrderContent =>
  ({
    ...common,
    kind: 'maintenance',
    inputs: {
      kind: 'maintenance',
      method: 'bands-daily',
      fraction: 'four-fifths',
      fractionReason: null,
      temperatureC: null,
      newbornMlPerKgPerDay: null,
      feedsMl: '0.0',
      feedsNote: '',
      drugsMl: '0.0',
      drugsNote: '',
      typedRate: null,
      hours: '24',
      ...inputs,
    },
    fluid: fluidText('sg20'),
    figures: {
      rateMlPerH: '44.0',
      volumeMl: '1056.0',
      hours: '24',
      overMinutes: null,
      mlPerKg: null,
      perHourExact: '44.0000',
      fullMl: '1320.0',
      ...figures,
    },
    ...rest,
  }) as OrderContent;

/** Bolus 10 mL/kg of 16.4 kg: 164 mL over 10 min by syringe. */
export const bolus = (
  inputs: Partial<Extract<OrderContent['inputs'], { kind: 'bolus' }>> = {},
  figures: Partial<OrderContent['figures']> = {},
  rest: Partial<OrderContent> = {},
): OrderContent =>
  ({
    ...common,
    kind: 'bolus',
    urgency: 'emergency',
    inputs: {
      kind: 'bolus',
      doseBy: 'weight',
      mlPerKg: '10.0',
      volumeMl: null,
      overMinutes: '10',
      route: 'syringe',
      advisedBy: null,
      ...inputs,
    },
    fluid: fluidText('s0'),
    figures: {
      rateMlPerH: null,
      volumeMl: '164.0',
      hours: null,
      overMinutes: '10',
      mlPerKg: '10.00',
      perHourExact: null,
      fullMl: null,
      ...figures,
    },
    ...rest,
  }) as OrderContent;

export const context = (rest: Partial<CheckContext> = {}): CheckContext => ({
  at: PLANNED,
  zone: 'Europe/London',
  child: { bornOn: '2022-03-14', sex: 'female', flags: [] },
  lastMeasuredAt: at('2026-06-10T06:40:00.000Z'),
  results: {},
  intake: { bolusesLast24h: [], running: [] },
  rulebook: DEFAULT_RULEBOOK,
  products: PRODUCTS,
  ...rest,
});

const CHILD = { initials: 'EH', sex: 'female', age: '4', ageUnit: 'years' };

export const maintenanceForm = (rest: Partial<CheckForm> = {}): CheckForm => ({
  ...emptyCheckForm(),
  ...CHILD,
  weightKg: '16.4',
  weightSource: 'read-from-scales',
  feedsMl: '0',
  drugsMl: '0',
  method: 'bands-daily',
  fraction: 'four-fifths',
  base: SALINE_GLUCOSE,
  addedPotassium: '20',
  rate: '44',
  volumeMl: '1056',
  hours: '24',
  workedOutBy: 'hand',
  ...rest,
});

export const bolusForm = (rest: Partial<CheckForm> = {}): CheckForm => ({
  ...emptyCheckForm(),
  ...CHILD,
  weightKg: '16.4',
  base: 'Sodium chloride 0.9%',
  volumeMl: '164',
  overMinutes: '10',
  ...rest,
});
