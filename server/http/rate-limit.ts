import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { secretIn } from '../auth/auth-of';
import { hashOfSecret } from '../auth/session-adapter';
import { depsOf } from './deps';
import { sendProblem } from './problem';

/** Requests a minute, counted in this process alone; lockout of an account is the database's matter. */
export type Rates = { all: number; signIn: number };
export const RATES: Rates = { all: 1200, signIn: 60 };

const byAddress = (request: Request): string => ipKeyGenerator(request.ip ?? '');

const bySession = (request: Request): string => {
  const secret = secretIn(depsOf(request), 'session', request.headers.cookie ?? '');
  return secret === undefined ? byAddress(request) : hashOfSecret(secret);
};

/** People of one hospital may share an address; a made-up session for every request does not count apart for ever. */
const SESSIONS_AN_ADDRESS = 10;

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

/** By session where one is sent, else by address; and by address in all. */
export const limitAll = (rates: Rates): RequestHandler[] => [
  limiter(rates.all * SESSIONS_AN_ADDRESS, byAddress),
  limiter(rates.all, bySession),
];

/** By address: whoever signs in has no session yet. */
export const limitSignIn = (rates: Rates): RequestHandler => limiter(rates.signIn, byAddress);
