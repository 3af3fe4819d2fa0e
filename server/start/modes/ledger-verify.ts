import { startChild } from '../children';
import { DATABASE } from '../databases';
import type { Databases } from '../databases';
import { root } from '../paths';
import { findRunningCluster, startCluster } from '../postgres';
import { addressOf, holdPurpose } from '../purpose-lock';
import type { Stops } from '../stops';
import { Told } from '../tell';

/** The demo's databases, running already or started for this. */
async function demoDatabases(stops: Stops): Promise<Databases> {
  const held = await holdPurpose('demo', stops);
  if (held.taken) return stops.track(startCluster('demo'), (started) => started.stop());
  await addressOf('demo');
  const running = await findRunningCluster('demo');
  if (!running) throw new Told('Brimline is running, but its database is not. Start it again.');
  return running;
}

async function databaseSettings(stops: Stops): Promise<NodeJS.ProcessEnv> {
  if (process.env.DATABASE_URL) return process.env;
  const databases = await demoDatabases(stops);
  return {
    ...process.env,
    DATABASE_URL: databases.appUrl(DATABASE),
    DATABASE_OWNER_URL: databases.ownerUrl(DATABASE),
  };
}

/** `npm run ledger:verify`: walks the ledger's chains; its exit code is the verdict. */
export async function ledgerVerify(stops: Stops, args: readonly string[]): Promise<number> {
  const env = await databaseSettings(stops);
  const child = startChild(process.execPath, ['--import', 'tsx', 'server/ledger/verify-cli.ts', ...args], {
    cwd: root,
    env,
  });
  stops.onStop(() => child.stop());
  return child.exited;
}
