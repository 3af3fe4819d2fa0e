import { ageAt } from '@shared/children/age';
import { DAY, HOUR, instant, MINUTE, parseInstant } from '@shared/time';
import { kilograms } from '@shared/units';
import { kgText, type ChartWeight, type WeighedChild } from '@shared/weights/chart-weight';
import { dosingWeight, lastMeasuredAt, staleText, weightFreshness } from '@shared/weights/dosing';
import { estimateWeight } from '@shared/weights/estimate';
import { readWeightForm, type WeightForm } from '@shared/weights/schema';
import { describe, expect, it } from 'vitest';

const ZONE = 'Europe/London';
const NOW = parseInstant('2026-06-10T12:00:00Z')!;
const ago = (ms: number) => instant(NOW - ms);
const weight = (kg: number, method: ChartWeight['method'], age: number, usable = true): ChartWeight => ({
  kg: kilograms(kg),
  method,
  at: ago(age),
  usable,
});

const CHILD: WeighedChild = { bornOn: '2022-03-14' };
const NEWBORN: WeighedChild = { bornOn: '2026-06-05', bornAt: parseInstant('2026-06-05T06:00:00Z')! };
const choose = (weights: ChartWeight[], child = CHILD) => dosingWeight(weights, child, NOW, ZONE);

describe('dosingWeight', () => {
  it.each<[string, ChartWeight[], WeighedChild, number | undefined, string | undefined]>([
    ['none on the chart', [], CHILD, undefined, undefined],
    [
      'the latest measured',
      [weight(16.4, 'scales', HOUR), weight(16, 'bed-scales', DAY)],
      CHILD,
      16.4,
      'measured',
    ],
    [
      'measured before a later guess',
      [weight(16.4, 'scales', DAY), weight(17, 'stated', HOUR)],
      CHILD,
      16.4,
      'measured',
    ],
    [
      'not one still to be confirmed',
      [weight(25, 'scales', HOUR, false), weight(16, 'scales', DAY)],
      CHILD,
      16,
      'measured',
    ],
    ['not one from later', [weight(16.4, 'scales', -HOUR), weight(16, 'scales', DAY)], CHILD, 16, 'measured'],
    ['an estimate where nothing was measured', [weight(16, 'estimated-age', HOUR)], CHILD, 16, 'estimated'],
    ['a stated one', [weight(16, 'estimated-tape', DAY), weight(17, 'stated', HOUR)], CHILD, 17, 'stated'],
    // RCH: the birth weight holds until the newborn has regained it
    [
      'newborn below birth weight',
      [weight(3.5, 'birth-weight', 5 * DAY), weight(3.2, 'baby-scales', HOUR)],
      NEWBORN,
      3.5,
      'birth-weight',
    ],
    [
      'newborn above it',
      [weight(3.5, 'birth-weight', 5 * DAY), weight(3.51, 'baby-scales', HOUR)],
      NEWBORN,
      3.51,
      'measured',
    ],
    ['newborn not weighed since', [weight(3.5, 'birth-weight', 5 * DAY)], NEWBORN, 3.5, 'birth-weight'],
    [
      'older child below birth weight',
      [weight(3.5, 'birth-weight', 40 * DAY), weight(3.2, 'baby-scales', HOUR)],
      CHILD,
      3.2,
      'measured',
    ],
    [
      'older child, stated against birth weight',
      [weight(3.5, 'birth-weight', 90 * DAY), weight(6, 'stated', HOUR)],
      CHILD,
      6,
      'stated',
    ],
  ])('%s', (_name, weights, child, kg, basis) => {
    const choice = choose(weights, child);
    expect(choice?.weight.kg).toBe(kg);
    expect(choice?.basis).toBe(basis);
    expect(choice?.isEstimate).toBe(
      basis === undefined ? undefined : basis === 'estimated' || basis === 'stated',
    );
  });

  it('gives back the row itself', () => {
    const row = { ...weight(16.4, 'scales', HOUR), id: 'w1' };
    expect(dosingWeight([row], CHILD, NOW, ZONE)?.weight.id).toBe('w1');
  });
});

describe('freshness', () => {
  // clinical lines: > 24 h due, > 7 days senior, newborn > 48 h senior
  it.each([
    [24 * HOUR, false, 'ok', ''],
    [24 * HOUR + 1, false, 'due', '24 h old'],
    [31 * HOUR, false, 'due', '31 h old'],
    [7 * DAY, false, 'due', '7 days old'],
    [9 * DAY, false, 'senior', '9 days old'],
    [48 * HOUR, true, 'due', '2 days old'],
    [48 * HOUR + MINUTE, true, 'senior', '2 days old'],
  ])('%d ms, newborn %s: %s', (age, isNewborn, expected, words) => {
    expect(weightFreshness(ago(age), NOW, isNewborn)).toBe(expected);
    expect(staleText(weight(10, 'scales', age), NOW, isNewborn)).toBe(words);
  });

  it('knows a child never measured', () => {
    expect(weightFreshness(undefined, NOW, false)).toBe('never');
    expect(
      lastMeasuredAt([weight(16, 'stated', HOUR), weight(16, 'scales', DAY, false)], NOW),
    ).toBeUndefined();
    expect(lastMeasuredAt([weight(16, 'stated', HOUR), weight(16, 'scales', DAY)], NOW)).toBe(ago(DAY));
  });

  it('says how a guess came about, and its age', () => {
    expect(staleText(weight(16, 'estimated-age', HOUR), NOW, false)).toBe('estimated from age');
    expect(staleText(weight(16, 'stated', 3 * DAY), NOW, false)).toBe('stated, not measured, 3 days old');
  });
});

describe('estimateWeight', () => {
  // age formulas: 0.5 m + 4, 2 y + 8, 3 y + 7
  it.each([
    ['2026-06-10', 4],
    ['2025-12-10', 7],
    ['2025-06-11', 9.5],
    ['2025-06-10', 10],
    ['2021-06-10', 18],
    ['2020-06-11', 18],
    ['2020-06-10', 25],
    ['2013-06-11', 43],
  ])('born %s: %d kg', (bornOn, kg) => {
    expect(estimateWeight(ageAt({ bornOn }, NOW, ZONE))?.kg).toBe(kg);
  });

  it('says how', () => {
    expect(estimateWeight(ageAt({ bornOn: '2022-03-14' }, NOW, ZONE))?.working).toBe('2 × 4 years + 8');
  });

  it.each(['2013-06-10', '2026-06-11'])('has none for one born %s', (bornOn) => {
    expect(estimateWeight(ageAt({ bornOn }, NOW, ZONE))).toBeUndefined();
  });
});

describe('readWeightForm', () => {
  const form: WeightForm = { kg: '16.400', method: 'scales', at: '2026-06-10T12:50' };
  const read = (change: Partial<WeightForm>, child = CHILD) =>
    readWeightForm({ ...form, ...change }, child, NOW, ZONE);

  it('gives kilograms and the moment', () => {
    expect(read({})).toEqual({
      ok: true,
      kg: 16.4,
      method: 'scales',
      at: parseInstant('2026-06-10T11:50:00Z'),
    });
    expect(read({ at: '2026-06-10T13:00' }).ok).toBe(true);
  });

  it.each<[Partial<WeightForm>, string, string]>([
    [{ kg: '0' }, 'kg', 'too-small'],
    [{ kg: '0.299' }, 'kg', 'too-small'],
    [{ kg: '200.1' }, 'kg', 'too-large'],
    [{ kg: '1000' }, 'kg', 'too-large'],
    [{ kg: '16,4' }, 'kg', 'comma'],
    [{ kg: '16.4 kg' }, 'kg', 'trailing-text'],
    [{ kg: '16.4001' }, 'kg', 'too-many-decimals'],
    [{ kg: '' }, 'kg', 'empty'],
    [{ at: '2026-06-10T13:01' }, 'at', 'in-future'],
    [{ at: '2022-03-13T12:00' }, 'at', 'before-birth'],
    [{ at: '2026-03-29T01:30' }, 'at', 'does-not-exist'],
    [{ at: '2025-10-26T01:30' }, 'at', 'twice'],
    [{ at: '' }, 'at', 'malformed'],
  ])('refuses %o', (change, field, code) => {
    expect(read(change)).toMatchObject({ ok: false, field, code });
  });

  it('holds the moment of birth against the weighing', () => {
    expect(read({ kg: '3.5', at: '2026-06-05T06:59' }, NEWBORN)).toMatchObject({ code: 'before-birth' });
    expect(read({ kg: '3.5', at: '2026-06-05T07:10', method: 'birth-weight' }, NEWBORN).ok).toBe(true);
    expect(read({ kg: '3.5', at: '2026-06-06T07:01', method: 'birth-weight' }, NEWBORN)).toMatchObject({
      code: 'not-at-birth',
    });
  });
});

describe('kgText', () => {
  it('prints no trailing zero', () => {
    expect([16.4, 44, 3.125].map(kgText)).toEqual(['16.4 kg', '44 kg', '3.125 kg']);
  });
});
