import { z } from 'zod';
import { at, get, id, idParams, post } from './define';

export const paperRoutes = {
  /** Makes a print with its own random code; the PDF is then read under that code. */
  makePrint: post({
    path: '/api/versions/:id/prints',
    access: 'clinical',
    figures: 'by-coverage',
    params: idParams,
    body: z.object({}),
    response: z.object({ code: z.string(), href: z.string() }),
  }),
  /** Whether a paper is current. Without sign-in: current or not and the version, nothing else. */
  paper: get({
    path: '/api/papers/:code',
    access: 'public',
    figures: 'never',
    params: z.object({ code: z.string().regex(/^[A-Z2-7]{20}$/) }),
    response: z.object({
      known: z.boolean(),
      isCurrent: z.boolean(),
      words: z.string(),
      version: z.int().nullable(),
      printedAt: at.nullable(),
      /** Only to a signed-in person who may see the order. */
      order: z.object({ versionId: id, code: z.string() }).nullable(),
    }),
  }),
};
/** Served as a file, outside the JSON registry, under coverage like everything else. */
export const PRINT_PDF_PATH = '/api/prints/:code.pdf';
