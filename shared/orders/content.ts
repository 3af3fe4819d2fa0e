import { z } from 'zod';
import {
  BOLUS_ROUTES,
  FLAGS,
  FRACTIONS,
  KINDS,
  LINE_CLASSES,
  MAINTENANCE_METHODS,
  SEXES,
  WEIGHT_METHODS,
} from '../calc/types';
import { URGENCIES } from './form';

/** Shape number of stored content. Old content is read by its own schema for ever. */
export const CONTENT_SCHEMA = 1;

const decimal = z.string().regex(/^-?\d+(\.\d+)?$/);
const at = z.string();

export const contentFluidSchema = z.object({
  id: z.string(),
  name: z.string(),
  base: z.string(),
  addedPotassium: decimal,
  sodium: decimal,
  potassium: decimal,
  chloride: decimal,
  calcium: decimal,
  magnesium: decimal,
  lactate: decimal,
  acetate: decimal,
  gluconate: decimal,
  glucoseGPerL: decimal,
  osmolarity: decimal,
  readyMixed: z.boolean(),
  highRisk: z.boolean(),
});

const maintenanceInputs = z.object({
  kind: z.literal('maintenance'),
  method: z.enum(MAINTENANCE_METHODS),
  fraction: z.enum(FRACTIONS),
  fractionReason: z.string().nullable(),
  temperatureC: decimal.nullable(),
  newbornMlPerKgPerDay: decimal.nullable(),
  feedsMl: decimal,
  feedsNote: z.string(),
  drugsMl: decimal,
  drugsNote: z.string(),
  typedRate: decimal.nullable(),
  hours: decimal,
});

const bolusInputs = z.object({
  kind: z.literal('bolus'),
  doseBy: z.enum(['weight', 'volume']),
  mlPerKg: decimal.nullable(),
  volumeMl: decimal.nullable(),
  overMinutes: decimal,
  route: z.enum(BOLUS_ROUTES),
  advisedBy: z.string().nullable(),
});

export const contentFiguresSchema = z.object({
  /** mL/h on the pump; null for a bolus by hand or gravity. */
  rateMlPerH: decimal.nullable(),
  volumeMl: decimal,
  /** Maintenance only. */
  hours: decimal.nullable(),
  /** Bolus only. */
  overMinutes: decimal.nullable(),
  mlPerKg: decimal.nullable(),
  perHourExact: decimal.nullable(),
  fullMl: decimal.nullable(),
});

export const contentStepSchema = z.object({
  label: z.string(),
  working: z.string(),
  result: z.string(),
  unit: z.string(),
  source: z.string(),
  mark: z.enum(['sum', 'answer', 'stop']).nullable(),
});

export const contentLimitSchema = z.object({
  code: z.string(),
  strength: z.enum(['information', 'caution', 'senior', 'brim']),
  title: z.string(),
  text: z.string(),
  met: z.boolean(),
  source: z.string(),
  /** The author's reason where one was owed. */
  reason: z.string().nullable(),
});

/** What is signed. Not ward or bed (they move), not cannula site, pump, bag or batch (bedside data). */
export const orderContentSchema = z.object({
  schema: z.literal(CONTENT_SCHEMA),
  code: z.string(),
  version: z.int(),
  kind: z.enum(KINDS),
  child: z.object({
    id: z.string(),
    number: z.string(),
    surname: z.string(),
    given: z.string(),
    bornOn: z.string(),
    bornAt: at.nullable(),
    sex: z.enum(SEXES).nullable(),
    gestation: z.string().nullable(),
    flags: z.array(z.enum(FLAGS)),
    allergies: z.string(),
    ageText: z.string(),
  }),
  weight: z.object({ id: z.string(), kg: decimal, method: z.enum(WEIGHT_METHODS), at }),
  reason: z.string(),
  urgency: z.enum(URGENCIES),
  line: z.enum(LINE_CLASSES),
  inputs: z.discriminatedUnion('kind', [maintenanceInputs, bolusInputs]),
  fluid: contentFluidSchema,
  figures: contentFiguresSchema,
  steps: z.array(contentStepSchema),
  gives: z.array(z.object({ code: z.string(), label: z.string(), text: z.string(), unit: z.string() })),
  limits: z.array(contentLimitSchema),
  otherBrims: z.array(
    z.object({ code: z.string(), label: z.string(), value: decimal, limit: decimal, text: z.string() }),
  ),
  gauge: z.object({
    orderMl: decimal,
    brimMl: decimal,
    brimNote: z.enum(['in 24 h', 'in one bolus']),
    bands: z.array(z.object({ label: z.string(), ml: decimal, fullMl: decimal })),
    ghosts: z.array(z.object({ label: z.string(), ml: decimal })),
  }),
  readBack: z.string(),
  calc: z.string(),
  rulebook: z.object({ number: z.int(), sha256: z.string() }),
  isHighRisk: z.boolean(),
  plannedStart: at,
  startBy: at,
  lapsesAt: at,
  reviewBy: at.nullable(),
  bloodsBy: at.nullable(),
});
export type OrderContent = z.infer<typeof orderContentSchema>;
