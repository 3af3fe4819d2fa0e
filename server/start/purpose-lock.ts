import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { endLeftOvers } from './children';
import { readLock, isAlive, takeLock } from './lock.mjs';
import type { Holder, Lock } from './lock.mjs';
import { stateFolder } from './paths';
import type { Purpose } from './paths';
import type { Stops } from './stops';
import { Told } from './tell';

const STARTING_MS = 120_000;

const lockPath = (purpose: Purpose) => join(stateFolder(purpose), 'lock');

/**
 * Takes the lock of a purpose until the program stops, ending servers a killed start program left running.
 * Gives the holder instead when another process has it.
 */
export async function holdPurpose(
  purpose: Purpose,
  stops: Stops,
): Promise<{ taken: true; lock: Lock } | { taken: false; holder: Holder }> {
  const attempt = await takeLock(lockPath(purpose)).catch((error: NodeJS.ErrnoException) => {
    if (error.code !== 'EACCES') throw error;
    throw new Told(
      `${stateFolder(purpose)} belongs to another user. Start as that user, or remove the folder.`,
    );
  });
  if (!attempt.taken) return attempt;
  stops.onStop(() => attempt.lock.release());
  await endLeftOvers(attempt.left?.children ?? []);
  return { taken: true, lock: attempt.lock };
}

/** Waits until the holder of a purpose tells its address; null when it ends without one. */
export async function addressOf(purpose: Purpose): Promise<string | null> {
  const until = Date.now() + STARTING_MS;
  for (;;) {
    const holder = readLock(lockPath(purpose));
    if (!holder || !isAlive(holder)) return null;
    if (holder.address !== undefined) return holder.address;
    if (Date.now() > until) return null;
    await sleep(100);
  }
}
