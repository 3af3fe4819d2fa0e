import express, { Router, type Express, type RequestHandler } from 'express';
import { bindAccounts } from './accounts/routes';
import { bindBedside } from './bedside/routes';
import { bindChecks } from './checks/routes';
import { bindChildren } from './children/routes';
import { bindCspReports } from './http/csp-reports';
import type { Deps } from './http/deps';
import { logRequests } from './http/log-requests';
import { noSuchRoute, problemHandler } from './http/problem';
import { limitAll, limitSignIn, RATES, type Rates } from './http/rate-limit';
import { sameOrigin } from './http/same-origin';
import { neverStored, securityHeaders } from './http/security-headers';
import { storableText } from './http/storable-text';
import { serveClient } from './http/static-files';
import { bindExceptions } from './exceptions/routes';
import { bindOrders } from './orders/routes';
import { bindPrints } from './prints/routes';
import { bindRulebook } from './rulebook/routes';
import { bindShelf } from './shelf/routes';
import { bindWards } from './wards/routes';
import { bindWeights } from './weights/routes';

/** Each noun puts its routes on the router. */
const NOUNS: readonly ((router: Router) => void)[] = [
  bindAccounts,
  bindWards,
  bindChildren,
  bindWeights,
  bindShelf,
  bindRulebook,
  bindOrders,
  bindExceptions,
  bindChecks,
  bindBedside,
  bindPrints,
];

export type AppOptions = {
  rates?: Rates;
  /** The built client's folder; absent in tests of the API. */
  client?: string;
  /** Pages of the program's own mail fake; only where it runs one. */
  mailbox?: RequestHandler;
};

/** The application on its dependencies: no port is opened, no worker started. */
export function makeApp(deps: Deps, options: AppOptions = {}): Express {
  const rates = options.rates ?? RATES;
  const app = express();
  app.locals.deps = deps;
  app.disable('x-powered-by');
  app.disable('etag');
  app.set('trust proxy', 'loopback');
  app.use(logRequests, securityHeaders(deps.env.PUBLIC_URL));
  app.use('/api', neverStored, ...limitAll(rates));
  const router = Router();
  bindCspReports(router);
  router.use('/api', sameOrigin, express.json({ limit: '256kb', strict: true, reviver: storableText }));
  // wherever another person's password may be tried
  router.post(['/api/sign-in', '/api/checks/:id/beside', '/api/versions/:id/start'], limitSignIn(rates));
  for (const bindNoun of NOUNS) bindNoun(router);
  router.use('/api', noSuchRoute);
  app.use(router);
  if (options.mailbox !== undefined) app.use('/mailbox', options.mailbox);
  if (options.client !== undefined) serveClient(app, options.client);
  app.use(problemHandler);
  return app;
}
