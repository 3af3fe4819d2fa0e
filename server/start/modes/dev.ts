import { join } from 'node:path';
import { announceDemo } from '../announce';
import { startChild } from '../children';
import { prepareDemo } from '../demo-data';
import { root, stateFolder } from '../paths';
import { choosePort } from '../ports';
import { startCluster } from '../postgres';
import { holdPurpose } from '../purpose-lock';
import { serve, untilReady, WATCHED } from '../serve';
import { privateSettings } from '../settings';
import type { Stops } from '../stops';
import { Told } from '../tell';

const PREFERRED_PORT = 4481;

async function startVite(api: string, port: number) {
  const vite = startChild(
    process.execPath,
    [
      join(root, 'node_modules/vite/bin/vite.js'),
      '--port',
      String(port),
      '--clearScreen',
      'false',
      '--logLevel',
      'warn',
    ],
    { cwd: root, env: { ...process.env, NODE_ENV: 'development', BRIMLINE_API: api } },
  );
  await untilReady(vite, `http://127.0.0.1:${port}/`, 'Vite');
  return vite;
}

/** `npm run dev`: the demo on the sources, server and client restarted or replaced as files change. */
export async function dev(stops: Stops): Promise<number> {
  const held = await holdPurpose('demo', stops);
  if (!held.taken)
    throw new Told(`Brimline is running (${held.holder.address ?? 'starting'}): stop it first.`);
  const now = Date.now();
  const cluster = await stops.track(startCluster('demo'), (started) => started.stop());
  await prepareDemo(cluster, now);

  const folder = stateFolder('demo');
  const port = await choosePort(folder, 'api');
  const webPort = await choosePort(folder, 'vite', PREFERRED_PORT);
  const address = `http://127.0.0.1:${webPort}`;
  const env = privateSettings(cluster, { nodeEnv: 'development', port, publicUrl: address });
  const server = await stops.track(serve(WATCHED, env), (started) => started.stop());
  const vite = await stops.track(startVite(`http://127.0.0.1:${port}`, webPort), (started) => started.stop());
  held.lock.tell({ address, children: [server.facts, vite.facts] });
  await announceDemo(address, now);
  await Promise.race([server.exited, vite.exited]);
  throw new Told('The server or Vite ended by itself; its own words are above.');
}
