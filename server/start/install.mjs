/* Keeps node_modules in step with package-lock.json. Plain JavaScript with Node's own modules only. */
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { waitForLock } from './lock.mjs';

const INSTALL_MINUTES = 15;

function read(path) {
  try {
    return readFileSync(path, 'utf8');
  } catch {
    return null;
  }
}

/**
 * Whether npm's own record of what it installed (node_modules/.package-lock.json) holds exactly the
 * packages of package-lock.json; optional packages of other platforms may be absent.
 */
export function installedMatches(wanted, installed) {
  const here = { ...installed.packages };
  for (const [path, entry] of Object.entries(wanted.packages)) {
    if (path === '') continue;
    const found = here[path];
    delete here[path];
    if (!found && (entry.optional || entry.peer)) continue;
    if (!found || found.version !== entry.version || found.integrity !== entry.integrity) return false;
  }
  return Object.keys(here).length === 0;
}

const stampPath = (root) => join(root, 'node_modules', '.brimline-lock-hash');

const lockHash = (root) =>
  createHash('sha256')
    .update(readFileSync(join(root, 'package-lock.json')))
    .digest('hex');

function recordMatches(root) {
  const record = read(join(root, 'node_modules', '.package-lock.json'));
  if (record === null) return false;
  try {
    return installedMatches(
      JSON.parse(readFileSync(join(root, 'package-lock.json'), 'utf8')),
      JSON.parse(record),
    );
  } catch {
    return false;
  }
}

/** Whether nothing has to be installed; an installation made by hand that matches gets its stamp here. */
function isCurrent(root) {
  const hash = lockHash(root);
  if (read(stampPath(root)) === hash) return true;
  if (!recordMatches(root)) return false;
  try {
    writeFileSync(stampPath(root), hash);
  } catch {
    // another user's folder: the comparison is repeated at the next start
  }
  return true;
}

function npmCi(root) {
  const npm = process.env.npm_execpath;
  const [command, first] = npm ? [process.execPath, [npm]] : ['npm', []];
  const args = [...first, 'ci', '--include=dev', '--no-fund', '--no-audit', '--loglevel=error'];
  return new Promise((resolve, reject) => {
    // standard output of a test run belongs to the tests
    const child = spawn(command, args, { cwd: root, stdio: ['ignore', process.stderr, 'inherit'] });
    child.on('error', reject);
    child.on('exit', (code, signal) =>
      code === 0 ? resolve() : reject(new Error(`npm ci ended with ${signal ?? code}.`)),
    );
  });
}

/** Runs `npm ci` if package-lock.json has changed since the last installation; one process at a time. */
export async function ensureInstalled(root) {
  if (process.env.BRIMLINE_NO_INSTALL === '1' || isCurrent(root)) return;
  const lock = await waitForLock(join(root, '.state', 'install.lock'), {
    timeoutMs: INSTALL_MINUTES * 60_000,
    onWait: (holder) => console.error(`Packages are being installed by process ${holder.pid}; waiting.`),
  });
  try {
    if (isCurrent(root)) return;
    console.error('Installing packages (about a minute the first time) …');
    await npmCi(root);
    writeFileSync(stampPath(root), lockHash(root));
  } finally {
    lock.release();
  }
}
