import { mkdirSync } from 'node:fs';
import { resolve } from 'node:path';

/** The folder of package.json. */
export const root = resolve(import.meta.dirname, '../..');

/** What a private cluster and its state are for; tests carry their process number. */
export type Purpose = 'demo' | 'bench' | 'shots' | `test-${number}`;

/** Where everything of one purpose is kept between starts: `.state/<purpose>`. */
export function stateFolder(purpose: Purpose): string {
  const folder = resolve(root, '.state', purpose);
  // 755: PostgreSQL's own account has to walk through
  mkdirSync(folder, { recursive: true, mode: 0o755 });
  return folder;
}

/** Whether what was made for this purpose may be thrown away, so need not survive a power cut. */
export const isDisposable = (purpose: Purpose): boolean => purpose !== 'demo' && purpose !== 'bench';
