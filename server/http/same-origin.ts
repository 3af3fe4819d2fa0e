import type { RequestHandler } from 'express';
import { depsOf } from './deps';
import { sendProblem } from './problem';

const READS = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Acts are taken from this program's own pages only: Origin, and Sec-Fetch-Site where the browser sends it. */
export const sameOrigin: RequestHandler = (request, response, next) => {
  if (READS.has(request.method)) return next();
  const { origin } = new URL(depsOf(request).env.PUBLIC_URL);
  const site = request.get('sec-fetch-site') ?? 'same-origin';
  if (request.get('origin') === origin && site === 'same-origin') return next();
  sendProblem(response, 'wrong-origin', { detail: `Open Brimline at ${origin} and try again.` });
};
