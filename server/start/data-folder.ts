import { createHash } from 'node:crypto';
import { chownSync, mkdirSync, readFileSync, renameSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { run } from './children';
import { isRoot } from './debian';
import { root, stateFolder } from './paths';
import type { Purpose } from './paths';
import { Told } from './tell';

/** Whom PostgreSQL's programs run as: nothing set means as ourselves. */
export type Account = { uid?: number; gid?: number };

export type DataFolder = { path: string; account: Account; major: number | null };

async function idOf(flag: '-u' | '-g'): Promise<number> {
  const found = await run('id', [flag, 'postgres']);
  if (found.code !== 0)
    throw new Told('There is no account "postgres" to run PostgreSQL as; root may not run it.');
  return Number(found.stdout.trim());
}

function ownerOf(path: string): Required<Account> | null {
  try {
    const { uid, gid } = statSync(path);
    return { uid, gid };
  } catch {
    return null;
  }
}

/** Whether the account can walk to a folder: checkouts below /root or a mktemp folder are closed to it. */
async function canWalkTo(folder: string, account: Account): Promise<boolean> {
  return (await run('/usr/bin/test', ['-x', folder], { ...account, cwd: '/' })).code === 0;
}

/** A folder in /var/tmp for this checkout; it survives a reboot. Another user's folder of that name is refused. */
function fallbackFolder(purpose: Purpose): string {
  const checkout = createHash('sha256').update(root).digest('hex').slice(0, 12);
  const base = `/var/tmp/brimline-${checkout}`;
  mkdirSync(base, { recursive: true, mode: 0o755 });
  if (ownerOf(base)?.uid !== process.getuid?.()) throw new Told(`${base} belongs to someone else.`);
  const folder = join(base, purpose);
  mkdirSync(folder, { recursive: true, mode: 0o755 });
  return folder;
}

function madeBy(data: string): number | null {
  try {
    return Number(readFileSync(join(data, 'PG_VERSION'), 'utf8').trim());
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
    throw new Told(
      `${data} cannot be read by this user. Start as the user who made it, or remove the folder.`,
    );
  }
}

/** Where the cluster of a purpose is or will be, and whom its programs run as. */
export async function findDataFolder(purpose: Purpose): Promise<DataFolder> {
  const state = stateFolder(purpose);
  const usual = join(state, 'pg');
  if (!isRoot()) return { path: usual, account: {}, major: madeBy(usual) };
  const owner = ownerOf(usual);
  // made by a plain user before: it goes on as theirs
  if (owner) return { path: usual, account: owner, major: madeBy(usual) };
  const account = { uid: await idOf('-u'), gid: await idOf('-g') };
  const path = (await canWalkTo(state, account)) ? usual : join(fallbackFolder(purpose), 'pg');
  return { path, account, major: madeBy(path) };
}

/** An empty folder beside the place of a cluster, owned by the account; named into place when complete. */
export function makeEmptyFolder(data: DataFolder): { path: string; putInPlace(): void } {
  const path = `${data.path}.new`;
  rmSync(path, { recursive: true, force: true });
  mkdirSync(path, { mode: 0o700 });
  if (data.account.uid !== undefined && data.account.gid !== undefined) {
    chownSync(path, data.account.uid, data.account.gid);
  }
  return {
    path,
    putInPlace() {
      // an empty or half-made folder without PG_VERSION
      rmSync(data.path, { recursive: true, force: true });
      renameSync(path, data.path);
    },
  };
}
