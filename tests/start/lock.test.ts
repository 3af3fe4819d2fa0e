import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import {
  isAlive,
  processFacts,
  processStart,
  readLock,
  takeLock,
  waitForLock,
} from '../../server/start/lock.mjs';

const NOBODY = 2 ** 22; // above the kernel's default limit of process numbers

let folder: string;
let path: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'brimline-lock-'));
  path = join(folder, 'lock');
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

const write = (facts: object) => writeFileSync(path, JSON.stringify(facts));

async function take() {
  const attempt = await takeLock(path);
  if (!attempt.taken) throw new Error('held');
  return attempt;
}

describe('process facts', () => {
  it('knows itself and no dead process', () => {
    expect(processStart(process.pid)).toMatch(/^\d+$/);
    expect(processStart(NOBODY)).toBeNull();
    expect(isAlive(processFacts(process.pid))).toBe(true);
    expect(isAlive({ pid: NOBODY, startedAt: null })).toBe(false);
  });

  it('takes a later process with the same number for another one', () => {
    expect(isAlive({ pid: process.pid, startedAt: '1' })).toBe(false);
  });
});

describe('takeLock', () => {
  it('is refused while the holder lives, and names it', async () => {
    write({ ...processFacts(process.ppid), address: 'http://127.0.0.1:4480' });
    const attempt = await takeLock(path);
    expect(attempt).toMatchObject({
      taken: false,
      holder: { pid: process.ppid, address: 'http://127.0.0.1:4480' },
    });
  });

  it.each([
    ['a dead process', { pid: NOBODY, startedAt: '77' }],
    ['a number used again since', { pid: process.ppid, startedAt: '1' }],
  ])('takes over from %s and hands on what it said', async (_what, dead) => {
    const children = [{ pid: NOBODY, startedAt: '78' }];
    write({ ...dead, children });
    const { left } = await take();
    expect(left).toMatchObject({ pid: dead.pid, children });
    expect(readLock(path)?.pid).toBe(process.pid);
  });

  it('takes over a file that never became a lock', async () => {
    writeFileSync(path, '{"pid":');
    expect((await take()).left).toBeNull();
  });

  it('has one winner among many takers of a stale file', async () => {
    write({ pid: NOBODY, startedAt: '77' });
    const attempts = await Promise.all(Array.from({ length: 20 }, () => takeLock(path)));
    expect(attempts.filter((attempt) => attempt.taken)).toHaveLength(1);
  });

  it('tells more to others and leaves nothing when released', async () => {
    const { lock } = await take();
    lock.tell({ address: 'http://127.0.0.1:4480' });
    expect(readLock(path)).toEqual({ ...processFacts(process.pid), address: 'http://127.0.0.1:4480' });
    lock.release();
    expect(readLock(path)).toBeNull();
  });

  it('does not release what another process has taken since', async () => {
    const { lock } = await take();
    write(processFacts(process.ppid));
    lock.release();
    expect(readLock(path)?.pid).toBe(process.ppid);
  });
});

describe('waitForLock', () => {
  it('waits for the holder to end, telling once', async () => {
    const { lock } = await take();
    const told: number[] = [];
    setTimeout(() => lock.release(), 300);
    const waited = await waitForLock(path, { timeoutMs: 5000, onWait: (holder) => told.push(holder.pid) });
    expect(told).toEqual([process.pid]);
    expect(JSON.parse(readFileSync(path, 'utf8'))).toMatchObject({ pid: process.pid });
    waited.release();
  });

  it('gives up in words', async () => {
    write(processFacts(process.ppid));
    await expect(waitForLock(path, { timeoutMs: 0 })).rejects.toThrow(`Process ${process.ppid} holds`);
  });
});
