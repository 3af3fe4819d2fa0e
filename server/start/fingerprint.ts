import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

function filesBelow(path: string): string[] {
  if (!existsSync(path)) return [];
  if (!statSync(path).isDirectory()) return [path];
  return readdirSync(path, { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile())
    .map((entry) => join(entry.parentPath, entry.name))
    .sort();
}

/** SHA-256 over names and contents of files and folders below a folder; times do not count. */
export function fingerprint(folder: string, sources: readonly string[]): string {
  const hash = createHash('sha256');
  for (const source of sources) {
    for (const file of filesBelow(join(folder, source))) {
      hash.update(file.slice(folder.length)).update('\0').update(readFileSync(file)).update('\0');
    }
  }
  return hash.digest('hex');
}

/** Whether what was made from `print` is still there: its stamp says so and its product exists. */
export function isFresh(stamp: string, print: string, product: string): boolean {
  return existsSync(product) && existsSync(stamp) && readFileSync(stamp, 'utf8') === print;
}

export function writeStamp(stamp: string, print: string): void {
  mkdirSync(dirname(stamp), { recursive: true });
  writeFileSync(stamp, print);
}
