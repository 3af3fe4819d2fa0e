import { randomBytes } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { Told } from './tell';

/** Passwords of the three roles that sign in to a private cluster. */
export type Secrets = { superuser: string; owner: string; server: string };

const KEYS = ['superuser', 'owner', 'server'] as const;

const password = () => randomBytes(24).toString('base64url');

function parse(path: string, text: string): Secrets {
  const found = JSON.parse(text) as Record<string, unknown>;
  if (KEYS.every((key) => typeof found[key] === 'string')) return found as Secrets;
  throw new Told(`${path} does not hold the passwords of this cluster.`);
}

/** The passwords kept in `secrets.json` of a state folder; new ones when the cluster is new. */
export function keepSecrets(folder: string, isNew: boolean): Secrets {
  const path = join(folder, 'secrets.json');
  try {
    return parse(path, readFileSync(path, 'utf8'));
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ENOENT') throw error;
  }
  if (!isNew)
    throw new Told(
      `${path} is gone, so nobody can open the database beside it. Remove ${folder} and start again.`,
    );
  const secrets = { superuser: password(), owner: password(), server: password() };
  writeFileSync(path, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600, flag: 'wx' });
  return secrets;
}
