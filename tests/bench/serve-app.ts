import { randomUUID } from 'node:crypto';
import { createServer, type RequestListener } from 'node:http';
import type { AddressInfo } from 'node:net';
import { makeApp } from '../../server/app';
import { cookieName } from '../../server/auth/auth-of';
import { hashOfSecret, insertValues } from '../../server/auth/session-adapter';
import { INSERT_SESSION } from '../../server/auth/session-sql';
import { systemClock } from '../../server/clock';
import { openDatabase } from '../../server/db/client';
import { parseEnv } from '../../server/env';
import type { Deps } from '../../server/http/deps';
import { makeLog } from '../../server/http/make-log';
import type { BenchDatabase } from './databases';

export type Served = { origin: string; close(): Promise<void> };

/** Listens on a free port of this machine only. */
export async function serve(listener: RequestListener): Promise<Served> {
  const server = createServer(listener);
  await new Promise<void>((ready) => server.listen(0, '127.0.0.1', ready));
  const { port } = server.address() as AddressInfo;
  const close = () =>
    new Promise<void>((closed) => {
      server.close(() => closed());
      server.closeAllConnections();
    });
  return { origin: `http://127.0.0.1:${port}`, close };
}

/** Addresses in cookies and Origin headers; nothing is ever asked there. */
export const PUBLIC_URL = 'http://127.0.0.1:3100';

/** What the program runs on in production, by one database. */
export function depsFor({ appUrl }: BenchDatabase): Deps {
  const env = parseEnv({ NODE_ENV: 'production', DATABASE_URL: appUrl, PUBLIC_URL, LOG_LEVEL: 'warn' });
  const db = openDatabase(appUrl, { clock: systemClock, applicationName: 'bench' });
  return { db, clock: db.clock, env, log: makeLog(env.LOG_LEVEL) };
}

/** The application as production makes it, without its limit of requests a minute. */
export const appOn = (deps: Deps) => makeApp(deps, { rates: { all: 1e9, signIn: 1e9 } });

/** The Cookie header of someone with a session row put in directly: what a sign-in would have left behind. */
export async function sessionOf(deps: Deps, email: string): Promise<string> {
  const [login] = await deps.db.sql<{ id: string }[]>`select id from auth.logins where email = ${email}`;
  const secret = randomUUID().replaceAll('-', '');
  const made = insertValues(deps, hashOfSecret(secret), login!.id, { kind: 'own', agent: 'bench' });
  await deps.db.sql.unsafe(INSERT_SESSION, made);
  return `${cookieName(deps, 'session')}=${secret}`;
}
