import { ensureBuilt } from '../build';
import { startChild } from '../children';
import { DATABASE } from '../databases';
import { remakeDatabase } from '../demo-data';
import { root, stateFolder } from '../paths';
import { choosePort } from '../ports';
import { startCluster } from '../postgres';
import { holdPurpose } from '../purpose-lock';
import { privateSettings } from '../settings';
import type { Stops } from '../stops';
import { Told } from '../tell';

/** `npm run bench`: subjects against their baselines, on a cluster and an empty database of their own. */
export async function bench(stops: Stops, args: readonly string[]): Promise<number> {
  const held = await holdPurpose('bench', stops);
  if (!held.taken) throw new Told(`Process ${held.holder.pid} is measuring already.`);
  const cluster = await stops.track(startCluster('bench'), (started) => started.stop());
  await remakeDatabase(cluster);
  await ensureBuilt();
  const port = await choosePort(stateFolder('bench'), 'http');
  const env = {
    ...privateSettings(cluster, { nodeEnv: 'production', port }),
    BRIMLINE_SUPER_URL: cluster.superUrl,
  };
  const child = startChild(process.execPath, ['--import', 'tsx', 'tests/bench/run.ts', ...args], {
    cwd: root,
    env,
  });
  stops.onStop(() => child.stop());
  const code = await child.exited;
  // a million orders are not kept
  await cluster.dropDatabase(DATABASE);
  return code;
}
