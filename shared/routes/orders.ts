import { z } from 'zod';
import { BOLUS_ROUTES, KINDS } from '../calc/types';
import { comparisonSchema } from '../checks/form';
import { contentFluidSchema, orderContentSchema } from '../orders/content';
import { orderFormSchema, URGENCIES } from '../orders/form';
import { VERSION_STATES } from '../orders/states';
import { ACTS, SIGNATURE_MEANINGS } from '../orders/transitions';
import { childHeadSchema, weightSchema } from './children';
import {
  at,
  decimalText,
  done,
  get,
  id,
  idParams,
  localDateTime,
  password,
  post,
  put,
  reason,
  typed,
  words,
} from './define';

/** A shelf row as the form and the check list it; composition as decimals in text, per litre. */
export const productSchema = contentFluidSchema.extend({
  bagSizesMl: z.array(decimalText),
  kinds: z.array(z.enum(KINDS)),
  newbornOnly: z.boolean(),
  rev: z.int(),
});
export type Product = z.infer<typeof productSchema>;

/** Facts of the chart that the work-out reads; the same object on both sides. */
export const draftContextSchema = z.object({
  child: childHeadSchema,
  weights: z.array(weightSchema),
  lastMeasuredAt: at.nullable(),
  products: z.array(productSchema),
  results: z.array(z.object({ analyte: z.string(), value: decimalText, unit: z.string(), at })),
  urinePassedAt: at.nullable(),
  bolusesLast24h: z.array(z.object({ ml: decimalText, at, here: z.boolean(), words: z.string() })),
  running: z.array(
    z.object({
      code: z.string(),
      rateMlPerH: decimalText,
      fluid: contentFluidSchema,
      state: z.enum(VERSION_STATES),
    }),
  ),
  plan: z
    .object({
      kind: z.enum(['fraction', 'allowance']),
      fraction: z.string().nullable(),
      mlPer24h: decimalText.nullable(),
      words: z.string(),
    })
    .nullable(),
  rulebook: z.object({ number: z.int(), sha256: z.string(), content: z.unknown() }),
  zone: z.string(),
  now: at,
});
export type DraftContext = z.infer<typeof draftContextSchema>;

export const exceptionSchema = z.object({
  id,
  limitCode: z.string(),
  title: z.string(),
  state: z.enum(['asked', 'granted', 'refused', 'void']),
  by: z.string().nullable(),
  how: z.enum(['here', 'telephone']).nullable(),
  reason: z.string(),
  countersignDueAt: at.nullable(),
  countersignedAt: at.nullable(),
});

export const draftSchema = z.object({
  orderId: id,
  versionId: id,
  code: z.string(),
  version: z.int(),
  rev: z.int(),
  form: orderFormSchema,
  savedAt: at,
  context: draftContextSchema,
  exceptions: z.array(exceptionSchema),
  /** Why the last version came back, for a revision; the author has seen it before. */
  cameBack: z.object({ words: z.string(), comparison: comparisonSchema.nullable() }).nullable(),
  follows: z.object({ code: z.string(), text: z.string() }).nullable(),
});
export type Draft = z.infer<typeof draftSchema>;

export const signatureSchema = z.object({
  meaning: z.enum(SIGNATURE_MEANINGS),
  name: z.string(),
  role: z.string(),
  registrationNumber: z.string(),
  at,
  how: z.string(),
  note: z.string(),
  isVoid: z.boolean(),
});
export type Signature = z.infer<typeof signatureSchema>;

export const verdictSchema = z.object({ act: z.enum(ACTS), allowed: z.boolean(), words: z.string() });

export const timelineRowSchema = z.object({
  seq: z.int(),
  at,
  /** Withheld while the version is covered to the reader. */
  who: z.string().nullable(),
  words: z.string(),
  outcome: z.enum(['done', 'refused']),
});

export const infusionSchema = z.object({
  id,
  startedAt: at,
  startedBy: z.string(),
  endedAt: at.nullable(),
  endedBy: z.string().nullable(),
  endReason: z.string(),
  bag: z.string(),
  line: z.string(),
  pump: z.string(),
  volumeInfusedMl: decimalText.nullable(),
});

/** An order page. `open` is null while the version is covered to the viewer. */
export const orderViewSchema = z.object({
  orderId: id,
  versionId: id,
  code: z.string(),
  version: z.int(),
  kind: z.enum(KINDS),
  state: z.enum(VERSION_STATES),
  stateSince: at,
  isOverdue: z.boolean(),
  isEmergency: z.boolean(),
  child: childHeadSchema,
  /** Reason and asked start: what a checker may see too. */
  reason: z.string(),
  askedStart: at.nullable(),
  urgency: z.enum(URGENCIES),
  checkDueAt: at.nullable(),
  waitingWords: z.string(),
  open: z
    .object({
      content: orderContentSchema,
      contentSha256: z.string(),
      author: z.object({ name: z.string(), title: z.string() }),
      signatures: z.array(signatureSchema),
      exceptions: z.array(exceptionSchema),
      comparison: comparisonSchema.nullable(),
      checkerName: z.string().nullable(),
      nameCorrectedSince: z.string().nullable(),
      infusions: z.array(infusionSchema),
    })
    .nullable(),
  timeline: z.array(timelineRowSchema),
  otherVersions: z.array(z.object({ versionId: id, version: z.int(), state: z.enum(VERSION_STATES) })),
  you: z.object({ isAuthor: z.boolean() }),
  acts: z.array(verdictSchema),
});
export type OrderView = z.infer<typeof orderViewSchema>;

export const orderRoutes = {
  startDraft: post({
    path: '/api/children/:id/orders',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({ kind: z.enum(KINDS), followsOrderId: id.nullable() }),
    response: z.object({ orderId: id, versionId: id, code: z.string() }),
  }),
  draft: get({
    path: '/api/drafts/:id',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    response: draftSchema,
  }),
  saveDraft: put({
    path: '/api/drafts/:id',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({ rev: z.int(), form: orderFormSchema }),
    response: z.object({ rev: z.int(), savedAt: at, exceptionsVoided: z.boolean() }),
  }),
  discardDraft: post({
    path: '/api/versions/:id/discard',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({}),
    response: done,
  }),
  sign: post({
    path: '/api/versions/:id/sign',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({
      rev: z.int(),
      /** What the author saw; any difference from the server's own work-out signs nothing. */
      seen: z.object({ rateMlPerH: decimalText.nullable(), volumeMl: decimalText, rulebook: z.int() }),
      password,
    }),
    response: z.object({ state: z.enum(VERSION_STATES), checkDueAt: at }),
  }),
  order: get({
    path: '/api/versions/:id',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    response: orderViewSchema,
  }),
  withdraw: post({
    path: '/api/versions/:id/withdraw',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    body: z.object({ reason }),
    response: done,
  }),
  revise: post({
    path: '/api/versions/:id/revise',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({}),
    response: z.object({ versionId: id }),
  }),
  settle: post({
    path: '/api/versions/:id/settle',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({ reason, password }),
    response: done,
  }),
  /** What settling needs to read: opening it is written down. */
  disputeMatter: post({
    path: '/api/versions/:id/dispute/open',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({}),
    response: orderViewSchema,
  }),
  shelf: get({
    path: '/api/shelf',
    access: 'clinical',
    figures: 'never',
    response: z.object({ products: z.array(productSchema) }),
  }),
  rulebook: get({
    path: '/api/rulebook',
    access: 'clinical',
    figures: 'never',
    response: z.object({ number: z.int(), sha256: z.string(), inForceFrom: at, content: z.unknown() }),
  }),
  /** Given in an emergency, written down afterwards, counted at once. */
  recordGiven: post({
    path: '/api/children/:id/given',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({
      kind: z.literal('bolus'),
      weightId: id.nullable(),
      productId: id,
      volumeMl: typed,
      overMinutes: typed,
      route: z.enum(BOLUS_ROUTES),
      givenAt: localDateTime,
      onWordOfId: id,
      readBack: z.literal(true, 'Read it back first.'),
      reason,
      password,
    }),
    response: z.object({ versionId: id, code: z.string(), words }),
  }),
};
