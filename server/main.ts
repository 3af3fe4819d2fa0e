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
import { mailboxRouter } from './mail/mailbox';
import { startSmtpFake, type SmtpFake } from './mail/smtp-fake';
import { startMailWorker } from './mail/worker';
import { startSweep } from './sweep/sweep';

type Stop = () => Promise<void>;

/** The built client lies beside the built server, and in the same place seen from the sources. */
function clientFolder(): string | undefined {
  const places = ['../web', '../dist/web'].map((path) => fileURLToPath(new URL(path, import.meta.url)));
  return places.find((place) => existsSync(`${place}/index.html`));
}

async function listen(deps: Deps, fake: SmtpFake | undefined): Promise<Stop> {
  const mailbox = fake && mailboxRouter(fake);
  const server = createServer(makeApp(deps, { client: clientFolder(), mailbox }));
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

/** What goes on without requests: the sweep of what falls due, and mail. */
async function startWork(deps: Deps, fake: SmtpFake | undefined): Promise<Stop[]> {
  const sweep = startSweep(deps);
  const smtpUrl = fake?.smtpUrl ?? deps.env.SMTP_URL;
  if (smtpUrl === undefined) {
    deps.log.warn('SMTP_URL is not set: mail waits in the outbox');
    return [sweep];
  }
  const worker = await startMailWorker({ ...deps, smtpUrl });
  return fake === undefined ? [sweep, worker] : [sweep, worker, fake.stop];
}

async function main(): Promise<void> {
  const env = parseEnv(process.env);
  const log = makeLog(env.LOG_LEVEL);
  const clock = clockFor(env);
  const db = openDatabase(env.DATABASE_URL, { clock });
  if (!(await schemaIsCurrent(db))) {
    throw new Error('The database has an older schema than this program: run the migrations first.');
  }
  await assertSafeRole(db);
  const deps: Deps = { db, clock, env, log };
  const fake = env.BRIMLINE_MAILBOX === undefined ? undefined : await startSmtpFake();
  // stopped in turn: no new requests first, the pool last
  const stops: Stop[] = [await listen(deps, fake), ...(await startWork(deps, fake)), () => db.close()];

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
