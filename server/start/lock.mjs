/*
 * Lock files, and what they need to know about processes. Plain JavaScript with Node's own modules only:
 * start.mjs uses it before any package is installed.
 */
import { mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';

/** A lock file appears empty for an instant between its making and its first write. */
const HALF_WRITTEN_MS = 1000;

/** Start time of a live process, in clock ticks since boot; null when it is gone or a zombie. */
export function processStart(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    // the command name is in brackets and may hold spaces: count from behind it
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    return fields[0] === 'Z' || fields[0] === 'X' ? null : (fields[19] ?? null);
  } catch {
    return null;
  }
}

/** Whether the process that wrote these facts still lives; the start time tells it from a later user of its number. */
export function isAlive(facts) {
  const started = processStart(facts.pid);
  return started !== null && started === facts.startedAt;
}

/** The pid and start time of a process, as kept in lock files. */
export const processFacts = (pid) => ({ pid, startedAt: processStart(pid) });

/** What a lock file says, whoever wrote it; null when there is none or it cannot be read as one. */
export function readLock(path) {
  try {
    const found = JSON.parse(readFileSync(path, 'utf8'));
    return typeof found?.pid === 'number' ? found : null;
  } catch {
    return null;
  }
}

function place(path, facts) {
  try {
    writeFileSync(path, JSON.stringify(facts), { flag: 'wx' });
    return true;
  } catch (error) {
    if (error.code === 'EEXIST') return false;
    throw error;
  }
}

function readText(path) {
  try {
    return readFileSync(path, 'utf8');
  } catch {
    return null;
  }
}

/** Moves a dead holder's file away; puts it back when another process was quicker and it is a fresh one. */
function setAside(path, text) {
  const aside = `${path}.${process.pid}.stale`;
  try {
    renameSync(path, aside);
  } catch {
    return;
  }
  if (readFileSync(aside, 'utf8') === text) rmSync(aside, { force: true });
  else renameSync(aside, path);
}

function holdingLock(path, facts) {
  let current = facts;
  return {
    /** Adds facts for others to read, such as the address. */
    tell(more) {
      current = { ...current, ...more };
      writeFileSync(`${path}.${process.pid}.new`, JSON.stringify(current));
      renameSync(`${path}.${process.pid}.new`, path);
    },
    release() {
      const found = readLock(path);
      if (found?.pid === facts.pid && found.startedAt === facts.startedAt) rmSync(path, { force: true });
    },
  };
}

/**
 * Takes a lock file for this process, or tells who holds it. The file of a dead process is taken over,
 * and what it said is handed on as `left`.
 */
export async function takeLock(path) {
  const mine = processFacts(process.pid);
  mkdirSync(dirname(path), { recursive: true });
  let left = null;
  let unreadableSince = null;
  for (;;) {
    if (place(path, mine)) return { taken: true, lock: holdingLock(path, mine), left };
    const text = readText(path);
    const found = readLock(path);
    if (found && isAlive(found)) return { taken: false, holder: found };
    if (text === null) continue;
    if (!found) {
      unreadableSince ??= Date.now();
      if (Date.now() - unreadableSince < HALF_WRITTEN_MS) {
        await sleep(20);
        continue;
      }
    }
    left = found ?? left;
    setAside(path, text);
  }
}

/** Takes a lock file, waiting for its holder; `onWait` is called once. Throws after `timeoutMs`. */
export async function waitForLock(path, { timeoutMs, onWait }) {
  const until = Date.now() + timeoutMs;
  for (let told = false; ; told = true) {
    const attempt = await takeLock(path);
    if (attempt.taken) return attempt.lock;
    if (!told) onWait?.(attempt.holder);
    if (Date.now() > until) throw new Error(`Process ${attempt.holder.pid} holds ${path} for too long.`);
    await sleep(200);
  }
}
