import { z } from 'zod';
import { orderContentSchema } from '../orders/content';
import { childHeadSchema } from './children';
import { at, done, get, id, idParams, password, post, reason } from './define';
import { exceptionSchema } from './orders';

export const exceptionRoutes = {
  askException: post({
    path: '/api/versions/:id/exceptions',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({ rev: z.int(), seniorId: id.nullable(), reason }),
    response: done,
  }),
  /** By telephone: the author records it; named senior, read back to a named second person, countersigned within 12 h. */
  telephoneException: post({
    path: '/api/versions/:id/exceptions/telephone',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({
      rev: z.int(),
      seniorId: id,
      heardById: id,
      readBack: z.literal(true, 'Read it back to the second person first.'),
      reason,
      password,
    }),
    response: done,
  }),
  /** Exceptions that wait for the reader, and telephone ones to countersign. */
  exceptionsForMe: get({
    path: '/api/exceptions',
    access: 'clinical',
    figures: 'by-coverage',
    response: z.object({
      asked: z.array(
        z.object({
          versionId: id,
          code: z.string(),
          child: z.string(),
          ward: z.string(),
          limits: z.array(z.string()),
          askedAt: at,
        }),
      ),
      toCountersign: z.array(
        z.object({
          exceptionId: id,
          versionId: id,
          code: z.string(),
          child: z.string(),
          title: z.string(),
          dueAt: at,
        }),
      ),
    }),
  }),
  /** What a senior decides on: opening it is written down, and bars this person from the check. */
  exceptionMatter: post({
    path: '/api/versions/:id/exceptions/open',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({}),
    response: z.object({
      child: childHeadSchema,
      content: orderContentSchema,
      contentSha256: z.string(),
      author: z.string(),
      reason: z.string(),
      limits: z.array(exceptionSchema),
    }),
  }),
  decideException: post({
    path: '/api/versions/:id/exceptions/decide',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({ agree: z.boolean(), contentSha256: z.string(), reason, password }),
    response: done,
  }),
  countersignException: post({
    path: '/api/exceptions/:id/countersign',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({ password }),
    response: done,
  }),
};
