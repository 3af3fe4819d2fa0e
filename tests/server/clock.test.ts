import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, describe, expect, it } from 'vitest';
import { clockFor, fileClock, fixedClock, systemClock } from '../../server/clock';

const folder = mkdtempSync(join(tmpdir(), 'brimline-clock-'));
afterAll(() => rmSync(folder, { recursive: true }));
const file = join(folder, 'clock');

describe('the clock of the tests', () => {
  it('stands where the file says, and moves when it is rewritten', async () => {
    writeFileSync(file, '1781078400000\n');
    const clock = fileClock(file);
    expect(clock.now()).toBe(1781078400000);
    writeFileSync(file, '1781082000000');
    await sleep(60);
    expect(clock.now()).toBe(1781082000000);
  });

  it('runs with an offset, and on the machine’s time without a file', () => {
    writeFileSync(file, '+3600000');
    expect(Math.abs(fileClock(file).now() - (Date.now() + 3_600_000))).toBeLessThan(1000);
    writeFileSync(file, '-60000');
    expect(Math.abs(fileClock(file).now() - (Date.now() - 60_000))).toBeLessThan(1000);
    expect(Math.abs(fileClock(join(folder, 'none')).now() - Date.now())).toBeLessThan(1000);
  });

  it('keeps its last reading when the file is being written', async () => {
    writeFileSync(file, '1781078400000');
    const clock = fileClock(file);
    clock.now();
    writeFileSync(file, '');
    await sleep(60);
    expect(clock.now()).toBe(1781078400000);
  });

  it('is used in tests only', () => {
    expect(clockFor({ NODE_ENV: 'production', BRIMLINE_CLOCK_FILE: file })).toBe(systemClock);
    expect(clockFor({ NODE_ENV: 'test' })).toBe(systemClock);
    expect(clockFor({ NODE_ENV: 'test', BRIMLINE_CLOCK_FILE: file })).not.toBe(systemClock);
  });

  it('stands still until told', () => {
    const clock = fixedClock(5);
    clock.advance(10);
    expect(clock.now()).toBe(15);
    clock.set(3);
    expect(clock.now()).toBe(3);
  });
});
