import { existsSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import { makeApp } from './app';
import { clockFor } from './clock';
import { openDatabase } from './db/client';
import { schemaIsCurrent } from './db/migrate';
import { assertSafeRole } from './db/roles';
import { parseEnv } from './env';
import type { Deps } from './http/deps';
import { makeLog } from './http/make-log';

type Stop = () => Promise<void>;

/** The built client lies beside the built server, and in the same place seen from the sources. */
function clientFolder(): string | undefined {
  const places = ['../web', '../dist/web'].map((path) => fileURLToPath(new URL(path, import.meta.url)));
  return places.find((place) => existsSync(`${place}/index.html`));
}

async function listen(deps: Deps): Promise<Stop> {
  const server = createServer(makeApp(deps, { client: clientFolder() }));
  await new Promise<void>((ready, failed) => {
    server.once('error', failed);
    server.listen(deps.env.PORT, deps.env.HOST, ready);
  });
  const { port } = server.address() as AddressInfo;
  deps.log.info({ host: deps.env.HOST, port }, 'listening');
  return () =>
    new Promise((closed) => {
      server.close(() => closed());
      server.closeIdleConnections();
      setTimeout(() => server.closeAllConnections(), 3000).unref();
    });
}

async function main(): Promise<void> {
  const env = parseEnv(process.env);
  const log = makeLog(env.LOG_LEVEL);
  const clock = clockFor(env);
  const db = openDatabase(env.DATABASE_URL, { clock });
  await assertSafeRole(db);
  if (!(await schemaIsCurrent(db))) {
    throw new Error('The database has an older schema than this program: run the migrations first.');
  }
  const deps: Deps = { db, clock, env, log };
  // stopped in turn: no new requests first, the pool last
  const stops: Stop[] = [await listen(deps), () => db.close()];

  let isStopping = false;
  const stop = async () => {
    if (isStopping) return;
    isStopping = true;
    for (const end of stops) await end();
    process.exit(0);
  };
  process.once('SIGTERM', () => void stop());
  process.once('SIGINT', () => void stop());
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
