import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { isAlive, processStart, readLock, takeLock } from './lock.mjs';
import { root, stateFolder } from './paths';
import type { Purpose } from './paths';
import { removeCluster, startCluster } from './postgres';
import type { Cluster } from './postgres';

export type TestCluster = { cluster: Cluster; folder: string; destroy: () => Promise<void> };

/** State of a test process that is gone: its folder's name tells the number, its lock the start time. */
function isAbandoned(name: string): name is Purpose {
  const pid = /^test-(\d+)$/.exec(name)?.[1];
  if (pid === undefined) return false;
  const owner = readLock(join(root, '.state', name, 'lock'));
  return owner ? !isAlive(owner) : processStart(Number(pid)) === null;
}

function stateFolders(): string[] {
  try {
    return readdirSync(join(root, '.state'));
  } catch {
    return [];
  }
}

/** Stops and removes clusters and state that killed test runs left behind. */
export async function removeAbandoned(): Promise<void> {
  for (const purpose of stateFolders().filter(isAbandoned)) {
    const attempt = await takeLock(join(stateFolder(purpose), 'lock'));
    if (attempt.taken) await removeCluster(purpose);
  }
}

/** The state folder of this test process, marked as in use. */
export async function ownTestFolder(): Promise<string> {
  const folder = stateFolder(`test-${process.pid}`);
  await takeLock(join(folder, 'lock'));
  return folder;
}

/** A cluster for this process's tests alone, on its own port; `destroy` removes it without a trace. */
export async function startTestCluster(): Promise<TestCluster> {
  const folder = await ownTestFolder();
  const cluster = await startCluster(`test-${process.pid}`);
  return { cluster, folder, destroy: () => cluster.destroy() };
}
