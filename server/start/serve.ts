import { setTimeout as sleep } from 'node:timers/promises';
import { startChild } from './children';
import type { Child } from './children';
import { root } from './paths';
import { Told } from './tell';

const READY_MS = 60_000;

/** Node's arguments for the server: the bundle, or the sources watched by tsx. */
export const BUNDLED: readonly string[] = ['--enable-source-maps', 'dist/server/main.js'];
export const WATCHED: readonly string[] = [
  'node_modules/tsx/dist/cli.mjs',
  'watch',
  '--clear-screen=false',
  'server/main.ts',
];

async function answers(url: string): Promise<boolean> {
  try {
    return (await fetch(url, { signal: AbortSignal.timeout(2000) })).status === 200;
  } catch {
    return false;
  }
}

/** Waits until a child answers 200 at a URL. Throws Told when it ends or stays silent for a minute. */
export async function untilReady(child: Child, url: string, what: string): Promise<void> {
  const until = Date.now() + READY_MS;
  while (!(await answers(url))) {
    if (child.hasExited()) throw new Told(`${what} ended before it was ready; its own words are above.`);
    if (Date.now() > until) throw new Told(`${what} does not answer at ${url}.`);
    await sleep(40);
  }
}

/** Starts the server program in its own process group and waits until it is healthy. */
export async function serve(args: readonly string[], env: NodeJS.ProcessEnv): Promise<Child> {
  const child = startChild(process.execPath, args, { cwd: root, env });
  try {
    await untilReady(child, `http://127.0.0.1:${env.PORT ?? ''}/api/health`, 'The server');
  } catch (error) {
    await child.stop();
    throw error;
  }
  return child;
}
