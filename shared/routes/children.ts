import { z } from 'zod';
import { FLAGS, FRACTIONS, KINDS, SEXES, WEIGHT_METHODS } from '../calc/types';
import { VERSION_STATES } from '../orders/states';
import {
  at,
  civilDate,
  decimalText,
  done,
  get,
  id,
  idParams,
  localDateTime,
  post,
  put,
  reason,
  typed,
  words,
} from './define';

/** Head of every page with a child. On a check page the weight is withheld by leaving it out. */
export const childHeadSchema = z.object({
  id,
  number: z.string(),
  surname: z.string(),
  given: z.string(),
  bornOn: civilDate,
  bornAt: at.nullable(),
  ageText: z.string(),
  sex: z.enum(SEXES).nullable(),
  gestationWeeks: z.int().nullable(),
  gestationDays: z.int().nullable(),
  allergies: z.string(),
  flags: z.array(z.enum(FLAGS)),
  ward: z.object({ id, name: z.string() }).nullable(),
  bed: z.string().nullable(),
  rev: z.int(),
});
export type ChildHead = z.infer<typeof childHeadSchema>;

export const weightSchema = z.object({
  id,
  kg: decimalText,
  method: z.enum(WEIGHT_METHODS),
  at,
  recordedBy: z.string(),
  confirmedBy: z.string().nullable(),
  z: decimalText.nullable(),
  /** False while a second measurement is still owed: no order may use it. */
  usable: z.boolean(),
  /** Days-old and method words for the screen, e.g. "9 days old"; empty when fresh. */
  stale: z.string(),
});
export type WeightRow = z.infer<typeof weightSchema>;

/** One line of orders as anyone may see it; `open` is null while the version is covered to the viewer. */
export const orderLineSchema = z.object({
  orderId: id,
  versionId: id,
  code: z.string(),
  version: z.int(),
  kind: z.enum(KINDS),
  state: z.enum(VERSION_STATES),
  stateSince: at,
  isOverdue: z.boolean(),
  /** The reader drew it up: an own draft is never covered, only not worked out yet. */
  isYours: z.boolean(),
  open: z
    .object({
      title: z.string(),
      fluid: z.string(),
      rateMlPerH: decimalText.nullable(),
      volumeMl: decimalText,
      gauge: z
        .object({ orderMl: decimalText, brimMl: decimalText, notches: z.array(decimalText) })
        .nullable(),
      author: z.string(),
      overBrimText: z.string().nullable(),
    })
    .nullable(),
  nextDue: z.object({ text: z.string(), at: at.nullable(), isLate: z.boolean(), note: z.string() }),
});
export type OrderLine = z.infer<typeof orderLineSchema>;

export const wardRowSchema = z.object({
  child: childHeadSchema.pick({
    id: true,
    number: true,
    surname: true,
    given: true,
    ageText: true,
    flags: true,
    bed: true,
  }),
  weight: weightSchema.pick({ kg: true, method: true, at: true, usable: true, stale: true }).nullable(),
  orders: z.array(orderLineSchema),
});
export type WardRow = z.infer<typeof wardRowSchema>;

const childBody = z.object({
  number: z.string().trim().min(1, 'Give the hospital number.').max(40),
  surname: z.string().trim().min(1, 'Give the surname.').max(120),
  given: z.string().trim().min(1, 'Give the first name.').max(120),
  bornOn: civilDate,
  bornAt: localDateTime.nullable(),
  sex: z.enum(SEXES).nullable(),
  gestationWeeks: z.int().min(20).max(45).nullable(),
  gestationDays: z.int().min(0).max(6).nullable(),
  allergies: z.string().trim().min(1, 'Say what is known, or “none known”.').max(500),
  flags: z.array(z.enum(FLAGS)),
  bed: z.string().trim().max(20),
});
export const registerChildBody = childBody.extend({ wardId: id });
export const editChildBody = childBody.omit({ bed: true }).extend({ rev: z.int() });

export const recordWeightBody = z.object({
  kg: typed,
  method: z.enum(WEIGHT_METHODS),
  at: localDateTime,
  /** The person has been shown a look-alike or an implausible value and measured again. */
  secondReadingKg: typed.nullable(),
});

export const chartSchema = z.object({
  child: childHeadSchema,
  weights: z.array(weightSchema),
  dosingWeightId: id.nullable(),
  results: z.array(z.object({ analyte: z.string(), value: decimalText, unit: z.string(), at })),
  intakes: z.array(
    z.object({ id, what: z.string(), ml: decimalText, at, where: z.string(), recordedBy: z.string() }),
  ),
  plan: z
    .object({
      kind: z.enum(['fraction', 'allowance']),
      fraction: z.enum(FRACTIONS).nullable(),
      mlPer24h: decimalText.nullable(),
      reason: z.string(),
      by: z.string(),
      at,
    })
    .nullable(),
  orders: z.array(orderLineSchema),
  now: at,
});
export type Chart = z.infer<typeof chartSchema>;

export const childRoutes = {
  ward: get({
    path: '/api/wards/:id',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    response: z.object({
      ward: z.object({ id, name: z.string() }),
      now: at,
      rows: z.array(wardRowSchema),
      /** Counts and names for the head of the page; covered orders are named by child and kind only. */
      forYou: z.array(
        z.object({
          code: z.enum([
            'checks',
            'exceptions',
            'returned',
            'lapsing',
            'overdue',
            'over-brim',
            'countersign',
          ]),
          count: z.int(),
          words: z.string(),
          detail: z.string(),
          href: z.string(),
        }),
      ),
    }),
  }),
  searchChildren: post({
    path: '/api/children/search',
    access: 'clinical',
    figures: 'never',
    body: z.object({ text: z.string().trim().max(100) }),
    response: z.object({ children: z.array(childHeadSchema), more: z.boolean() }),
  }),
  registerChild: post({
    path: '/api/children',
    access: 'clinical',
    figures: 'never',
    body: registerChildBody,
    response: z.object({ childId: id }),
  }),
  chart: get({
    path: '/api/children/:id',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    response: chartSchema,
  }),
  editChild: put({
    path: '/api/children/:id',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: editChildBody,
    response: z.object({ rev: z.int() }),
  }),
  transferChild: post({
    path: '/api/children/:id/transfer',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ wardId: id, bed: z.string().trim().max(20) }),
    response: done,
  }),
  dischargeChild: post({
    path: '/api/children/:id/discharge',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({}),
    response: done,
  }),
  recordWeight: post({
    path: '/api/children/:id/weights',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: recordWeightBody,
    response: z.object({
      weightId: id,
      usable: z.boolean(),
      needs: z.enum(['nothing', 'second-measurement', 'second-person']),
      words: z.string(),
    }),
  }),
  /** A second measurement of a weight that was held back; by another person where the verdict asked for one. */
  confirmWeight: post({
    path: '/api/weights/:id/confirm',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ kg: typed, method: z.enum(WEIGHT_METHODS), at: localDateTime }),
    response: z.object({ usable: z.boolean(), words: z.string() }),
  }),
  recordIntake: post({
    path: '/api/children/:id/intakes',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ what: z.literal('bolus'), ml: typed, at: localDateTime, where: words }),
    response: z.object({ intakeId: id }),
  }),
  setFluidPlan: put({
    path: '/api/children/:id/fluid-plan',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({
      kind: z.enum(['fraction', 'allowance', 'none']),
      fraction: z.enum(FRACTIONS).nullable(),
      mlPer24h: typed.nullable(),
      reason,
    }),
    response: done,
  }),
};
