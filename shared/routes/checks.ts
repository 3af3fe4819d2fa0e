import { z } from 'zod';
import { KINDS } from '../calc/types';
import { checkFormSchema, comparisonSchema } from '../checks/form';
import { orderContentSchema } from '../orders/content';
import { URGENCIES } from '../orders/form';
import { VERSION_STATES } from '../orders/states';
import { childHeadSchema, weightSchema } from './children';
import { at, decimalText, done, get, id, idParams, password, post, put, reason, rev } from './define';
import { productSchema, verdictSchema } from './orders';

/** A covered order: its own type, never the order with fields blanked. No author, weight, fluid, duration, route or line. */
export const coveredOrderSchema = z.object({
  versionId: id,
  code: z.string(),
  version: z.int(),
  kind: z.enum(KINDS),
  urgency: z.enum(URGENCIES),
  reason: z.string(),
  askedStart: at.nullable(),
  signedAt: at,
  dueAt: at.nullable(),
  isHighRisk: z.boolean(),
});

export const checkQueueRowSchema = coveredOrderSchema.extend({
  child: childHeadSchema.pick({
    id: true,
    number: true,
    surname: true,
    given: true,
    ageText: true,
    bed: true,
  }),
  wardName: z.string(),
  askedOfYou: z.boolean(),
  /** A check before the start, or the countersignature of what was given in an emergency. */
  act: z.enum(['check', 'countersign']),
  waitedMinutes: z.int(),
  isLate: z.boolean(),
  yourState: z.enum(['none', 'open', 'agreed', 'choices-differ', 'differed', 'ended']),
  /** Why this person cannot take it; null when they can. */
  barred: z.string().nullable(),
});

/** Everything a checker may read before lock-in, and their own unsent figures. */
export const checkPageSchema = z.object({
  order: coveredOrderSchema,
  child: childHeadSchema,
  state: z.enum(VERSION_STATES),
  /** Chart weights as measured: the source a checker reads, in chart order, none of them chosen. */
  weights: z.array(weightSchema),
  results: z.array(z.object({ analyte: z.string(), value: decimalText, unit: z.string(), at })),
  bolusesLast24h: z.array(z.object({ ml: decimalText, at, here: z.boolean(), words: z.string() })),
  running: z.array(z.object({ code: z.string(), rateMlPerH: decimalText, fluid: z.string() })),
  plan: z.string().nullable(),
  products: z.array(productSchema),
  rulebook: z.object({ number: z.int(), content: z.unknown() }),
  isShortForm: z.boolean(),
  hasSeenFigures: z.boolean(),
  draft: z.object({ rev: z.int(), form: checkFormSchema, savedAt: at.nullable() }),
  acts: z.array(verdictSchema),
  zone: z.string(),
  now: at,
  /** Present once this person has locked in, never before. */
  uncovered: z
    .object({
      lockedInAt: at,
      yours: checkFormSchema,
      content: orderContentSchema,
      contentSha256: z.string(),
      author: z.object({ name: z.string(), title: z.string() }),
      checkerName: z.string(),
      comparison: comparisonSchema,
      signBy: at.nullable(),
    })
    .nullable(),
});
export type CheckPage = z.infer<typeof checkPageSchema>;

export const checkRoutes = {
  checkQueue: get({
    path: '/api/checks',
    access: 'clinical',
    figures: 'never',
    response: z.object({ rows: z.array(checkQueueRowSchema), now: at }),
  }),
  checkPage: get({
    path: '/api/checks/:id',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    response: checkPageSchema,
  }),
  saveCheck: put({
    path: '/api/checks/:id/draft',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ rev, form: checkFormSchema }),
    response: z.object({ rev: z.int(), savedAt: at }),
  }),
  lockIn: post({
    path: '/api/checks/:id/lock-in',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({ form: checkFormSchema }),
    response: checkPageSchema,
  }),
  signCheck: post({
    path: '/api/checks/:id/sign',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({ contentSha256: z.string(), acceptReason: reason.nullable(), password }),
    response: z.object({ state: z.enum(VERSION_STATES) }),
  }),
  cannotVerify: post({
    path: '/api/checks/:id/return',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({
      what: z.enum(['weight', 'fluid', 'additives', 'fraction', 'rate-or-time', 'child', 'something-else']),
      reason,
    }),
    response: done,
  }),
  passOn: post({
    path: '/api/checks/:id/pass-on',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ toId: id.nullable(), seenFigures: z.boolean(), reason }),
    response: done,
  }),
  slip: post({
    path: '/api/checks/:id/slip',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ reason }),
    response: done,
  }),
  /** Check beside me: suspends the author's session and signs the checker in for this one check only. */
  openBeside: post({
    path: '/api/checks/:id/beside',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ email: z.string().trim().max(200), password }),
    response: z.object({ until: at, checkerName: z.string() }),
  }),
  besidePage: get({
    path: '/api/beside/check',
    access: 'public',
    figures: 'by-coverage',
    /** Who checks here and until when: this page knows no session of its own to ask. */
    response: checkPageSchema.extend({
      visit: z.object({ checkerName: z.string(), until: at }).optional(),
    }),
  }),
  besideSave: put({
    path: '/api/beside/draft',
    access: 'public',
    figures: 'never',
    body: z.object({ rev, form: checkFormSchema }),
    response: z.object({ rev: z.int(), savedAt: at }),
  }),
  besideLockIn: post({
    path: '/api/beside/lock-in',
    access: 'public',
    figures: 'by-coverage',
    body: z.object({ form: checkFormSchema }),
    response: checkPageSchema,
  }),
  besideSign: post({
    path: '/api/beside/sign',
    access: 'public',
    figures: 'by-coverage',
    body: z.object({ contentSha256: z.string(), acceptReason: reason.nullable(), password }),
    response: z.object({ state: z.enum(VERSION_STATES) }),
  }),
  /** Ends the visit; leaving without lock-in marks the checker as having seen figures. */
  closeBeside: post({
    path: '/api/beside/close',
    access: 'public',
    figures: 'never',
    body: z.object({}),
    response: done,
  }),
  /** Countersign what was given in an emergency, or say what differs. */
  countersignGiven: post({
    path: '/api/versions/:id/countersign',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({
      agree: z.boolean(),
      form: checkFormSchema,
      reason: z.string().trim().max(2000),
      password,
    }),
    response: z.object({ state: z.enum(VERSION_STATES), comparison: comparisonSchema }),
  }),
};
