import { existsSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { run } from './children';
import type { DataFolder } from './data-folder';

/** How long the servers of a killed postmaster may take to notice and end. */
const ORPHANS_MS = 20_000;

export type PidFile = { pid: number; port: number };

/** Reads `postmaster.pid`: process number on the first line, port on the fourth. */
export function parsePidFile(text: string): PidFile | null {
  const lines = text.split('\n');
  const pid = Number(lines[0]);
  const port = Number(lines[3]);
  return Number.isInteger(pid) && pid > 0 && Number.isInteger(port) ? { pid, port } : null;
}

function readPidFile(data: string): PidFile | null {
  try {
    return parsePidFile(readFileSync(join(data, 'postmaster.pid'), 'utf8'));
  } catch {
    return null;
  }
}

/** Processes working in the data folder: a postmaster and its servers do, a zombie or a stranger does not. */
async function processesIn(data: DataFolder): Promise<Set<number>> {
  const pattern = data.path.replace(/[\\*?[\]]/g, '\\$&');
  const args = [
    '/proc',
    '-mindepth',
    '2',
    '-maxdepth',
    '2',
    '-name',
    'cwd',
    '-lname',
    pattern,
    '-printf',
    '%h\n',
  ];
  // other users' processes refuse to be read, so find ends with 1
  const found = await run('find', args, { ...data.account, cwd: '/' });
  return new Set(
    found.stdout
      .split('\n')
      .filter((line) => line !== '')
      .map((line) => Number(line.slice('/proc/'.length))),
  );
}

/**
 * The postmaster that runs on this folder, if one does. Clears what a killed one left behind:
 * waits for its orphaned servers, then removes a pid file whose number is a zombie or a stranger by now,
 * as PostgreSQL itself would refuse to start for both.
 */
export async function findPostmaster(data: DataFolder): Promise<PidFile | null> {
  const file = readPidFile(data.path);
  if (!file) return null;
  const until = Date.now() + ORPHANS_MS;
  for (;;) {
    const living = await processesIn(data);
    if (living.has(file.pid)) return file;
    if (living.size === 0 || Date.now() > until) break;
    await sleep(100);
  }
  if (existsSync(`/proc/${file.pid}`)) rmSync(join(data.path, 'postmaster.pid'), { force: true });
  return null;
}
