import { emptyOrderForm, type OrderForm } from '@shared/orders/form';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { rulebookContent } from '@shared/rulebook/document';
import type { Draft, DraftContext, Product } from '@shared/routes/orders';

/** An invented ward, child and shelf; every identifier is made up. */
const uuid = (n: number): string => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;

export const IDS = {
  version: uuid(1),
  order: uuid(2),
  child: uuid(3),
  ward: uuid(4),
  weight: uuid(5),
  older: uuid(6),
};
export const NOW = '2026-06-10T09:42:00.000Z';

type Mix = Partial<
  Record<'sodium' | 'potassium' | 'chloride' | 'lactate' | 'glucoseGPerL' | 'osmolarity', string>
>;

const product = (
  n: number,
  base: string,
  addedPotassium: number,
  mix: Mix,
  kinds: Product['kinds'],
): Product => ({
  id: uuid(n),
  name: addedPotassium === 0 ? base : `${base} + potassium chloride ${addedPotassium} mmol/L`,
  base,
  addedPotassium: String(addedPotassium),
  sodium: '0',
  potassium: '0',
  chloride: '0',
  calcium: '0',
  magnesium: '0',
  lactate: '0',
  acetate: '0',
  gluconate: '0',
  glucoseGPerL: '0',
  osmolarity: '300',
  readyMixed: addedPotassium > 0,
  highRisk: addedPotassium >= 40,
  bagSizesMl: ['500'],
  kinds,
  newbornOnly: false,
  rev: 1,
  ...mix,
});

const SALINE_GLUCOSE = 'Sodium chloride 0.9% + glucose 5%';
const salineGlucose = (n: number, potassium: number) =>
  product(
    n,
    SALINE_GLUCOSE,
    potassium,
    {
      sodium: '154',
      potassium: String(potassium),
      chloride: String(154 + potassium),
      glucoseGPerL: '50',
      osmolarity: String(585 + 2 * potassium),
    },
    ['maintenance'],
  );

export const PRODUCTS = {
  plain: salineGlucose(20, 0),
  potassium20: salineGlucose(21, 20),
  potassium40: salineGlucose(22, 40),
  saline: product(23, 'Sodium chloride 0.9%', 0, { sodium: '154', chloride: '154', osmolarity: '308' }, [
    'maintenance',
    'bolus',
  ]),
  balanced: product(
    24,
    'Balanced crystalloid',
    0,
    { sodium: '140', potassium: '5', chloride: '98', lactate: '29', osmolarity: '295' },
    ['maintenance', 'bolus'],
  ),
};

export const makeContext = (change: Partial<DraftContext> = {}): DraftContext => ({
  child: {
    id: IDS.child,
    number: 'SM 418 207',
    surname: 'Hartnoll',
    given: 'Edie',
    bornOn: '2022-03-14',
    bornAt: null,
    ageText: '4 y',
    sex: 'female',
    gestationWeeks: null,
    gestationDays: null,
    allergies: 'Ibuprofen: wheeze',
    flags: ['raised-adh'],
    ward: { id: IDS.ward, name: 'Heron' },
    bed: '2',
    rev: 1,
  },
  weights: [
    {
      id: IDS.weight,
      kg: '16.400',
      method: 'scales',
      at: '2026-06-10T06:50:00.000Z',
      recordedBy: 'Ruth Ansah',
      confirmedBy: null,
      z: '0.10',
      usable: true,
      stale: '',
    },
    {
      id: IDS.older,
      kg: '15.900',
      method: 'stated',
      at: '2026-06-01T06:50:00.000Z',
      recordedBy: 'Ruth Ansah',
      confirmedBy: null,
      z: '-0.10',
      usable: true,
      stale: 'stated, not measured, 9 days old',
    },
  ],
  lastMeasuredAt: '2026-06-10T06:50:00.000Z',
  products: Object.values(PRODUCTS),
  results: [
    { analyte: 'potassium', value: '3.9', unit: 'mmol/L', at: '2026-06-10T05:40:00.000Z' },
    { analyte: 'sodium', value: '140', unit: 'mmol/L', at: '2026-06-10T05:40:00.000Z' },
  ],
  urinePassedAt: '2026-06-10T08:40:00.000Z',
  bolusesLast24h: [],
  running: [],
  plan: null,
  rulebook: { number: 1, sha256: 'a'.repeat(64), content: rulebookContent(DEFAULT_RULEBOOK) },
  zone: 'Europe/London',
  now: NOW,
  ...change,
});

export const maintenanceForm = (change: Partial<OrderForm> = {}): OrderForm => ({
  ...emptyOrderForm('maintenance'),
  reason: 'Pneumonia: too breathless to drink enough',
  weightId: IDS.weight,
  method: 'bands-daily',
  fraction: 'four-fifths',
  feedsMl: '0',
  feedsNote: 'Sips only, not counted',
  drugsMl: '70',
  drugsNote: 'Cefotaxime 3 × 20 mL, flushes 10 mL',
  productId: PRODUCTS.potassium20.id,
  line: 'peripheral',
  plannedStart: '2026-06-10T12:00',
  hours: '24',
  reviewBy: '2026-06-10T18:00',
  bloodsBy: '2026-06-10T20:00',
  urgency: 'routine',
  ...change,
});

export const bolusForm = (change: Partial<OrderForm> = {}): OrderForm => ({
  ...emptyOrderForm('bolus'),
  reason: 'Vomiting; cool hands, slow capillary refill',
  weightId: IDS.weight,
  doseBy: 'weight',
  mlPerKg: '10',
  overMinutes: '10',
  route: 'syringe',
  productId: PRODUCTS.saline.id,
  line: 'peripheral',
  plannedStart: '2026-06-10T10:45',
  urgency: 'urgent',
  ...change,
});

export const makeDraft = (form: OrderForm, change: Partial<Draft> = {}): Draft => ({
  orderId: IDS.order,
  versionId: IDS.version,
  code: 'BL-260610-014',
  version: 1,
  rev: 3,
  form,
  savedAt: '2026-06-10T09:41:00.000Z',
  context: makeContext(),
  exceptions: [],
  cameBack: null,
  follows: null,
  ...change,
});

/** A heavier boy without flags, for a bolus over the brim. */
export const heavyContext = (): DraftContext => {
  const context = makeContext();
  return {
    ...context,
    child: {
      ...context.child,
      surname: 'Brackenbury',
      given: 'Otis',
      bornOn: '2011-11-02',
      ageText: '14 y',
      sex: 'male',
      flags: [],
      allergies: 'None known',
      number: 'SM 402 935',
    },
    weights: [{ ...context.weights[0]!, kg: '62.000', method: 'bed-scales' }],
  };
};
