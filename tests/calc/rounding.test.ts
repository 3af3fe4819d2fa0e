import {
  above,
  atLeast,
  atMost,
  below,
  formatNumber,
  highestRate,
  largestVolume,
  pumpStep,
  roundRateUnderBrim,
  roundVolumeUnder,
  snap,
  toDecimals,
  toStep,
  volumeStep,
} from '@shared/rounding';
import type { Steps } from '@shared/rounding';
import { hours, millilitres, millilitresPerHour } from '@shared/units';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

const STEPS: Steps = { low: 0.1, high: 1, from: 100, volume: 1, smallVolume: 0.1, smallBelow: 10 };
const rate = (n: number) => pumpStep(millilitresPerHour(n), STEPS);

describe('the pump step', () => {
  it.each([
    [52.083333, 52.1, '1250 mL in 24 h'],
    [165.83333, 166, 'printed 165, which is truncated'],
    [79.166667, 79.2, 'printed 79'],
    [104.16667, 104, '2500 mL in 24 h'],
    [43.75, 43.8, 'half goes away from zero'],
    [0.05, 0.1, 'half goes away from zero'],
    [1.005, 1, ''],
    [99.94, 99.9, 'below 100 the step is 0.1'],
    [99.95, 100, ''],
    [100, 100, ''],
    [100.5, 101, 'from 100 the step is 1'],
    [0, 0, ''],
  ])('%s mL/h → %s %s', (exact, expected) => expect(rate(exact)).toBe(expected));

  it('takes 0.5 and 5 as steps too', () => {
    expect(toStep(52.3, 0.5)).toBe(52.5);
    expect(toStep(52.24, 0.5)).toBe(52);
    expect(toStep(122.5, 5)).toBe(125);
  });
});

describe('rounding against exact rationals', () => {
  /** Half away from zero of n ÷ d at 1/10, in whole numbers alone. */
  const tenths = (n: bigint, d: bigint): number => Number((20n * n + d) / (2n * d)) / 10;

  it('gets every rate of whole mL ÷ 24 and ÷ 72 right', () => {
    let halves = 0;
    for (let ml = 0; ml < 7200; ml += 1) {
      for (const by of [24, 72]) {
        if (ml / by >= 99.9) continue;
        expect(rate(ml / by)).toBe(tenths(BigInt(ml), BigInt(by)));
        if ((ml * 20) % by === 0 && ((ml * 20) / by) % 2 === 1) halves += 1;
      }
    }
    expect(halves).toBeGreaterThan(100);
  });

  it('gets weights of three decimals times a dose right', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 300, max: 15_000 }),
        fc.integer({ min: 50, max: 150 }),
        (grams, perKg) => {
          expect(rate((grams / 1000) * (perKg / 24))).toBe(tenths(BigInt(grams * perKg), 24_000n));
        },
      ),
      { numRuns: 20_000 },
    );
  });

  it('snaps what plain rounding gets wrong', () => {
    expect(Math.round(1.005 * 100) / 100).toBe(1);
    expect(toDecimals(1.005, 2)).toBe(1.01);
    expect(toDecimals(-1.005, 2)).toBe(-1.01);
    expect(toDecimals(-2.5, 0)).toBe(-3);
    expect(snap(0.1 + 0.2)).toBe(0.3);
    expect(snap(16.4 - 10)).toBe(6.4);
    expect(snap(1 / 3)).toBe(0.333333333333);
  });

  it('snaps short decimals and long ones alike', () => {
    fc.assert(
      fc.property(fc.double({ min: -1e5, max: 1e5, noNaN: true }), (value) => {
        expect(snap(value) === Number(value.toPrecision(12))).toBe(true);
      }),
      { numRuns: 5000 },
    );
  });
});

describe('comparing', () => {
  it('calls the same what differs by noise only', () => {
    expect(atMost(0.1 + 0.2, 0.3)).toBe(true);
    expect(atLeast(0.3, 0.1 + 0.2)).toBe(true);
    expect(above(0.1 + 0.2, 0.3)).toBe(false);
    expect(below(0.3, 0.1 + 0.2)).toBe(false);
    expect(above(0.300001, 0.3)).toBe(true);
    expect(above(2500.0001, 2500)).toBe(true);
    expect(below(2499.9999, 2500)).toBe(true);
  });
});

describe('rounding under a brim', () => {
  const under = (ml: number, brim: number) =>
    roundRateUnderBrim(millilitresPerHour(ml / 24), hours(24), millilitres(brim), STEPS);

  it('goes one step down only where the rounding alone would pass it', () => {
    expect(under(2500, 2500)).toBe(104);
    expect(under(2390, 2390)).toBe(99.5);
    expect(under(2399.99, 2399.99)).toBe(99.9);
    expect(under(1000, 1000)).toBe(41.6);
    expect(under(1000, 1001)).toBe(41.7);
    // already past the brim: nothing is hidden by rounding
    expect(under(1010, 1000)).toBe(42.1);
  });

  it('finds the highest rate and the largest volume under a line', () => {
    expect(highestRate(104.17, STEPS)).toBe(104);
    expect(highestRate(99.99, STEPS)).toBe(99.9);
    expect(highestRate(83.3333, STEPS)).toBe(83.3);
    expect(highestRate(0, STEPS)).toBe(0);
    expect(largestVolume(67.2, STEPS)).toBe(67);
    expect(largestVolume(66.6, STEPS)).toBe(66);
    expect(largestVolume(9.96, STEPS)).toBe(9.9);
    expect(largestVolume(500, STEPS)).toBe(500);
  });

  it('takes volumes at 1 mL, below 10 mL at 0.1', () => {
    expect(volumeStep(millilitres(1250.4), STEPS)).toBe(1250);
    expect(volumeStep(millilitres(9.94), STEPS)).toBe(9.9);
    expect(volumeStep(millilitres(10.4), STEPS)).toBe(10);
    expect(roundVolumeUnder(millilitres(33.6), 33.6, STEPS)).toBe(33);
    expect(roundVolumeUnder(millilitres(33.6), 50, STEPS)).toBe(34);
  });

  it('never passes the line it was under', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 3000, noNaN: true }),
        fc.double({ min: 1, max: 1.5, noNaN: true }),
        (ml, more) => {
          expect(atMost(under(ml, ml * more) * 24, ml * more)).toBe(true);
        },
      ),
      { numRuns: 5000 },
    );
  });
});

describe('print', () => {
  it.each([
    [44, 1, '44'],
    [52.1, 1, '52.1'],
    [52.083333, 2, '52.08'],
    [1000, 1, '1000'],
    [0.04, 1, '0'],
    [-0.04, 1, '0'],
    [-1.25, 1, '-1.3'],
    [1.05, 3, '1.05'],
    [10.003, 3, '10.003'],
    [0.999, 1, '1'],
  ])('%s to %s decimals is "%s"', (value, decimals, text) =>
    expect(formatNumber(value, decimals)).toBe(text),
  );
});
