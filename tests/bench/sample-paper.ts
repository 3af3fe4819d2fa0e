import type { OrderContent } from '@shared/orders/content';
import { instant } from '@shared/time';
import type { OrderPaper } from '../../server/documents/order-paper';

const NOON = instant(Date.UTC(2026, 5, 10, 11));
const at = '2026-06-10T11:00:00.000Z';

const gives = [
  ['Volume', '3.18', 'mL/kg/h'],
  ['Of full maintenance', '94.7', '%'],
  ['Glucose', '2.65', 'mg/kg/min'],
  ['Sodium', '11.7', 'mmol/kg/day'],
  ['Potassium', '1.5', 'mmol/kg/day'],
  ['Energy', '15.2', 'kcal/kg/day'],
] as const;

const steps = [
  ['first 10 kg', '10 × 100', '1000', 'mL', 'Holliday & Segar 1957', null],
  ['next 6.4 kg', '6.4 × 50', '320', 'mL', 'Holliday & Segar 1957', null],
  ['in full, 24 h', '1000 + 320', '1320', 'mL', '', 'sum'],
  ['drug volumes', '1320 − 70', '1250', 'mL', 'stated', null],
  ['per hour', '1250 ÷ 24', '52.08', 'mL/h', '', null],
  ['on the pump', 'nearest 0.1', '52.1', 'mL/h', 'pump step', 'answer'],
] as const;

/** An invented child's maintenance order, as its stored content would be. */
export const sampleContent = (change: Partial<OrderContent> = {}): OrderContent => ({
  schema: 1,
  code: 'BL-260610-014',
  version: 2,
  kind: 'maintenance',
  child: {
    id: 'c',
    number: 'SM 418 207',
    surname: 'Hartnoll',
    given: 'Edie',
    bornOn: '2022-03-14',
    bornAt: null,
    sex: 'female',
    gestation: null,
    flags: ['raised-adh'],
    allergies: 'Ibuprofen: wheeze',
    ageText: '4 y',
  },
  weight: { id: 'w', kg: '16.400', method: 'scales', at },
  reason: 'Pneumonia: too breathless to drink enough',
  urgency: 'routine',
  line: 'peripheral',
  inputs: {
    kind: 'maintenance',
    method: 'bands-daily',
    fraction: 'full',
    fractionReason: 'Sodium 140, urine 1.6 mL/kg/h.',
    temperatureC: null,
    newbornMlPerKgPerDay: null,
    feedsMl: '0',
    feedsNote: '',
    drugsMl: '70',
    drugsNote: '',
    typedRate: null,
    hours: '24',
  },
  fluid: {
    id: 'f',
    name: 'Sodium chloride 0.9% + glucose 5% + potassium chloride 20 mmol/L',
    base: 'Sodium chloride 0.9% + glucose 5%',
    addedPotassium: '20',
    sodium: '154',
    potassium: '20',
    chloride: '174',
    calcium: '0',
    magnesium: '0',
    lactate: '0',
    acetate: '0',
    gluconate: '0',
    glucoseGPerL: '50',
    osmolarity: '625',
    readyMixed: true,
    highRisk: false,
  },
  figures: {
    rateMlPerH: '52.1',
    volumeMl: '1250',
    hours: '24',
    overMinutes: null,
    mlPerKg: null,
    perHourExact: '52.08',
    fullMl: '1320',
  },
  steps: steps.map(([label, working, result, unit, source, mark]) => ({
    label,
    working,
    result,
    unit,
    source,
    mark,
  })),
  gives: gives.map(([label, text, unit]) => ({ code: label, label, text, unit })),
  limits: [
    {
      code: 'adh-fraction',
      strength: 'caution',
      title: 'Raised ADH risk in full',
      text: 'Water is usually held back.',
      met: false,
      source: 'NICE NG29 1.4',
      reason: 'Sodium 140, urine 1.6 mL/kg/h.',
    },
  ],
  otherBrims: [
    { code: 'potassium', label: 'Potassium', value: '0.06', limit: '0.2', text: '0.06 of 0.2 mmol/kg/h' },
  ],
  gauge: {
    orderMl: '1250',
    brimMl: '2000',
    brimNote: 'in 24 h',
    bands: [
      { label: 'first 10 kg', ml: '1000', fullMl: '1000' },
      { label: 'next 6.4 kg', ml: '320', fullMl: '320' },
    ],
    ghosts: [{ label: '70 mL as drugs', ml: '70' }],
  },
  readBack:
    'Give sodium chloride 0.9% + glucose 5% + potassium chloride 20 millimoles per litre into a peripheral vein at 52.1 millilitres per hour (fifty-two point one), 1250 millilitres over 24 hours.',
  calc: '1',
  rulebook: { number: 1, sha256: 'ab'.repeat(32) },
  isHighRisk: false,
  plannedStart: at,
  startBy: '2026-06-10T17:00:00.000Z',
  lapsesAt: '2026-06-11T11:00:00.000Z',
  reviewBy: '2026-06-10T23:00:00.000Z',
  bloodsBy: '2026-06-11T11:00:00.000Z',
  ...change,
});

export const samplePaper = (change: Partial<OrderPaper> = {}): OrderPaper => ({
  content: sampleContent(),
  hospitalName: 'Saltmarsh Children’s Hospital',
  zone: 'Europe/London',
  wardName: 'Heron',
  bed: '2',
  watermark: null,
  signatures: [
    {
      who: 'Dr Noor Castellane',
      role: 'Registrar',
      registrationNumber: 'DEMO-1001',
      at: NOON,
      what: 'drew up the order',
      isVoid: false,
    },
    {
      who: 'Ruth Ansah',
      role: 'Senior nurse',
      registrationNumber: 'DEMO-1002',
      at: NOON,
      what: 'independent check, worked it out unseen',
      isVoid: false,
    },
  ],
  nameCorrectedSince: null,
  print: {
    code: 'ABCDE234567FGHIJKLMN',
    url: 'https://brimline.example/p/ABCDE234567FGHIJKLMN',
    at: NOON,
    by: 'Dr Noor Castellane',
    ledgerSeq: 412,
    ledgerHash: '9f'.repeat(32),
  },
  ...change,
});
