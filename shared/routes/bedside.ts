import { z } from 'zod';
import { orderContentSchema } from '../orders/content';
import { VERSION_STATES } from '../orders/states';
import { childHeadSchema } from './children';
import { at, decimalText, done, get, id, idParams, post, typed, words } from './define';
import { productSchema, signatureSchema, verdictSchema } from './orders';

export const BEDSIDE_STEPS = ['child', 'bag', 'pump', 'line'] as const;
export type BedsideStep = (typeof BEDSIDE_STEPS)[number];

/** What the nurse reads at the bedside, as typed or picked. Nothing is prefilled from the order. */
export const bedsideEntriesSchema = z.object({
  child: z.object({ number: typed, bornOn: typed, saidBy: words }),
  bag: z.object({
    productId: z.string(),
    sizeMl: typed,
    batch: z.string().max(60),
    expiry: typed,
    bagNumber: z.string().max(40),
  }),
  pump: z.object({
    device: z.string().max(60),
    channel: z.string().max(20),
    rate: typed,
    volume: typed,
    minutes: typed,
  }),
  line: z.object({
    lineClass: z.string(),
    site: z.string().max(80),
    traced: z.boolean(),
    clampOpen: z.boolean(),
    siteLooksWell: z.boolean(),
  }),
});
export type BedsideEntries = z.infer<typeof bedsideEntriesSchema>;

export const stepVerdictSchema = z.object({
  step: z.enum(BEDSIDE_STEPS),
  agrees: z.boolean(),
  /** What differs and what to do, one sentence a finding; empty when it agrees. */
  findings: z.array(z.object({ field: z.string(), code: z.string(), text: z.string() })),
});
export type StepVerdict = z.infer<typeof stepVerdictSchema>;

export const bedsidePageSchema = z.object({
  versionId: id,
  code: z.string(),
  version: z.int(),
  state: z.enum(VERSION_STATES),
  child: childHeadSchema,
  content: orderContentSchema,
  signatures: z.array(signatureSchema),
  /** The most that may be set as volume to be infused, and why: least of left, bag and hours of flow. */
  volumeToInfuse: z.object({ mostMl: decimalText, words: z.string() }),
  products: z.array(productSchema),
  witnessNeeded: z.boolean(),
  startBy: at,
  lapsesAt: at,
  /** Maintenance that is connected to this child now: it is replaced by name, or stopped first. */
  connected: z.array(
    z.object({
      versionId: id,
      code: z.string(),
      version: z.int(),
      state: z.enum(VERSION_STATES),
      fluid: z.string(),
      rateMlPerH: decimalText,
    }),
  ),
  acts: z.array(verdictSchema),
  now: at,
  zone: z.string(),
});
export type BedsidePage = z.infer<typeof bedsidePageSchema>;

export const bedsideRoutes = {
  bedside: get({
    path: '/api/versions/:id/bedside',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    response: bedsidePageSchema,
  }),
  /** One comparison; a refusal is kept as a near miss. */
  compareStep: post({
    path: '/api/versions/:id/bedside/compare',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({ step: z.enum(BEDSIDE_STEPS), entries: bedsideEntriesSchema }),
    response: stepVerdictSchema,
  }),
  recordStart: post({
    path: '/api/versions/:id/start',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({
      entries: bedsideEntriesSchema,
      witness: z.object({ email: z.string().max(200), password: z.string().max(200) }).nullable(),
      replacesVersionId: id.nullable(),
    }),
    response: z.object({ infusionId: id, startedAt: at }),
  }),
  /** Never refused to a clinical role of the hospital; a second call gives the first answer. */
  stop: post({
    path: '/api/versions/:id/stop',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ reason: z.string().trim().max(500), volumeInfusedMl: typed.nullable() }),
    response: z.object({ stoppedAt: at, stoppedBy: z.string(), reasonOwed: z.boolean() }),
  }),
  /** The reason of a stop may follow it. */
  stopReason: post({
    path: '/api/versions/:id/stop-reason',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ reason: z.string().trim().min(3).max(500), volumeInfusedMl: typed.nullable() }),
    response: done,
  }),
  hold: post({
    path: '/api/versions/:id/hold',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ reason: z.string().trim().max(500) }),
    response: z.object({ until: at }),
  }),
  resume: post({
    path: '/api/versions/:id/resume',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({ pump: bedsideEntriesSchema.shape.pump }),
    response: done,
  }),
  sendAway: post({
    path: '/api/versions/:id/send-away',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ where: z.string().trim().min(2).max(200) }),
    response: done,
  }),
  finish: post({
    path: '/api/versions/:id/finish',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ volumeInfusedMl: typed }),
    response: done,
  }),
};
