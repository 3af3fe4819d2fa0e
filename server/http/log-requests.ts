import type { RequestHandler } from 'express';
import { randomUUID } from 'node:crypto';
import { performance } from 'node:perf_hooks';
import { depsOf } from './deps';

/**
 * Gives each request an id and writes one line when it is answered. The line names the route's pattern,
 * never the address itself, its headers or its body.
 */
export const logRequests: RequestHandler = (request, response, next) => {
  const requestId = randomUUID();
  response.locals.requestId = requestId;
  response.set('X-Request-Id', requestId);
  const began = performance.now();
  response.on('finish', () => {
    const route = (request.route as { path?: unknown } | undefined)?.path;
    depsOf(request).log.info(
      {
        requestId,
        method: request.method,
        route: typeof route === 'string' ? route : null,
        status: response.statusCode,
        ms: Math.round(performance.now() - began),
      },
      'answered',
    );
  });
  next();
};
