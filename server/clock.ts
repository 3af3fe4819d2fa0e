import { instant, type Instant } from '@shared/time';
import { readFileSync } from 'node:fs';

/** Where "now" comes from: domain code never asks the machine. */
export type Clock = { now(): Instant };

export const systemClock: Clock = { now: () => instant(Date.now()) };

/** A clock that stands still until it is told to move; for tests. */
export function fixedClock(start: number): Clock & { set(ms: number): void; advance(ms: number): void } {
  let ms = start;
  return {
    now: () => instant(ms),
    set: (to) => void (ms = to),
    advance: (by) => void (ms += by),
  };
}

const REREAD_MS = 50;

/**
 * A clock another process can move: the file holds epoch milliseconds ("1781078400000") or an offset to the
 * machine's clock ("+3600000", "-60000"). A missing or unreadable file keeps the last reading.
 */
export function fileClock(path: string): Clock {
  let text = '+0';
  let readAt = -Infinity;
  return {
    now() {
      const machine = Date.now();
      if (Math.abs(machine - readAt) >= REREAD_MS) {
        readAt = machine;
        text = readSetting(path) ?? text;
      }
      return instant(/^[+-]/.test(text) ? machine + Number(text) : Number(text));
    },
  };
}

function readSetting(path: string): string | undefined {
  try {
    const text = readFileSync(path, 'utf8').trim();
    return /^[+-]?\d{1,15}$/.test(text) ? text : undefined;
  } catch {
    return undefined;
  }
}

/** The machine's clock, or in tests the one in BRIMLINE_CLOCK_FILE. */
export const clockFor = (env: { NODE_ENV: string; BRIMLINE_CLOCK_FILE?: string | undefined }): Clock =>
  env.NODE_ENV === 'test' && env.BRIMLINE_CLOCK_FILE ? fileClock(env.BRIMLINE_CLOCK_FILE) : systemClock;
