import { announceDemo } from '../announce';
import { ensureBuilt } from '../build';
import { migrateDatabase, prepareDemo } from '../demo-data';
import type { Lock } from '../lock.mjs';
import { stateFolder } from '../paths';
import { choosePort } from '../ports';
import { startCluster } from '../postgres';
import { addressOf, holdPurpose } from '../purpose-lock';
import { BUNDLED, serve } from '../serve';
import { privateSettings, realSettings } from '../settings';
import type { Stops } from '../stops';
import { say, Told } from '../tell';

/** Asked for first; another free port is taken, and remembered, when it is in use. */
const PREFERRED_PORT = 4480;

async function tellRunning(): Promise<number> {
  const address = await addressOf('demo');
  if (address === null) throw new Told('Another start of Brimline ended before it was ready. Start again.');
  say(`Brimline is already running: ${address}`);
  return 0;
}

/** Runs the bundled server until it ends or the program is stopped. */
async function runServer(
  stops: Stops,
  lock: Lock,
  env: NodeJS.ProcessEnv,
  ready: () => unknown,
): Promise<number> {
  const child = await stops.track(serve(BUNDLED, env), (started) => started.stop());
  lock.tell({ address: env.PUBLIC_URL ?? `http://127.0.0.1:${env.PORT ?? ''}`, children: [child.facts] });
  await ready();
  const code = await child.exited;
  throw new Told(`The server ended by itself (code ${code}); its own words are above.`);
}

async function runOnPrivateServices(stops: Stops, lock: Lock): Promise<number> {
  const now = Date.now();
  const prepare = async () => {
    const cluster = await stops.track(startCluster('demo'), (started) => started.stop());
    await prepareDemo(cluster, now);
    return cluster;
  };
  const [cluster] = await Promise.all([prepare(), ensureBuilt()]);
  const port = await choosePort(stateFolder('demo'), 'http', PREFERRED_PORT);
  const env = privateSettings(cluster, { nodeEnv: 'production', port });
  return runServer(stops, lock, env, () => announceDemo(`http://127.0.0.1:${port}`, now));
}

/** With DATABASE_URL set: no cluster, no demo hospital, no mailbox; only migrate and serve. */
async function runOnRealServices(stops: Stops, lock: Lock, databaseUrl: string): Promise<number> {
  if (!process.env.SMTP_URL)
    throw new Told('DATABASE_URL is set, so SMTP_URL has to name the mail server too.');
  await migrateDatabase(process.env.DATABASE_OWNER_URL ?? databaseUrl);
  await ensureBuilt();
  const port = process.env.PORT ? Number(process.env.PORT) : PREFERRED_PORT;
  const env = realSettings(process.env, port);
  return runServer(stops, lock, env, () => say(`Brimline   ${env.PUBLIC_URL ?? `http://127.0.0.1:${port}`}`));
}

/** `npm start`: everything needed for a running Brimline, and Brimline. */
export async function demo(stops: Stops): Promise<number> {
  const { DATABASE_URL, SMTP_URL } = process.env;
  if (SMTP_URL && !DATABASE_URL) {
    throw new Told(
      'SMTP_URL is set without DATABASE_URL: the demo hospital’s people are invented and get no real mail.',
    );
  }
  const held = await holdPurpose('demo', stops);
  if (!held.taken) return tellRunning();
  return DATABASE_URL
    ? runOnRealServices(stops, held.lock, DATABASE_URL)
    : runOnPrivateServices(stops, held.lock);
}
