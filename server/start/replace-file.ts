import { renameSync, writeFileSync } from 'node:fs';

/**
 * Writes a file whole or not at all. By another file taking its place, so that a file root has written
 * in a user's folder does not stay closed to the user.
 */
export function replaceFile(path: string, text: string): void {
  const fresh = `${path}.${process.pid}.new`;
  writeFileSync(fresh, text);
  renameSync(fresh, path);
}
