import { freshDemo } from '../demo-data';
import { startCluster } from '../postgres';
import { holdPurpose } from '../purpose-lock';
import type { Stops } from '../stops';
import { say, Told } from '../tell';

/** `npm run demo:fresh`: drops the demo hospital and makes it anew, relative to today. */
export async function fresh(stops: Stops): Promise<number> {
  const held = await holdPurpose('demo', stops);
  if (!held.taken)
    throw new Told(`Brimline is running (${held.holder.address ?? 'starting'}): stop it first.`);
  const cluster = await stops.track(startCluster('demo'), (started) => started.stop());
  await freshDemo(cluster, Date.now());
  say('The demo hospital is new. npm start opens it.');
  return 0;
}
