import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { createHash } from 'node:crypto';
import { sendProblem } from './problem';

/** Requests a minute, counted in this process alone; lockout of an account is the database's matter. */
export type Rates = { all: number; signIn: number };
export const RATES: Rates = { all: 1200, signIn: 60 };

const byAddress = (request: Request): string => ipKeyGenerator(request.ip ?? '');

const bySession = (request: Request): string => {
  const { cookie } = request.headers;
  return cookie === undefined ? byAddress(request) : createHash('sha256').update(cookie).digest('base64');
};

const limiter = (limit: number, keyGenerator: (request: Request) => string): RequestHandler =>
  rateLimit({
    windowMs: 60_000,
    limit,
    keyGenerator,
    standardHeaders: false,
    legacyHeaders: false,
    handler: (_request, response) => {
      response.set('Retry-After', '60');
      sendProblem(response, 'too-many-requests', { detail: 'Wait a minute, then try again.' });
    },
  });

/** By session where there is one, else by address. */
export const limitAll = (rates: Rates): RequestHandler => limiter(rates.all, bySession);

/** By address: whoever signs in has no session yet. */
export const limitSignIn = (rates: Rates): RequestHandler => limiter(rates.signIn, byAddress);
