import { SEXES } from '@shared/calc/types';
import { weightAtZ } from '@shared/growth/weight-for-age';
import { addCivilDays, DAY, instant, parseInstant } from '@shared/time';
import { kilograms } from '@shared/units';
import { assessWeight, type WeightAssessment } from '@shared/weights/assess';
import type { ChartWeight, WeighedChild } from '@shared/weights/chart-weight';
import { DEFAULT_WEIGHT_LIMITS } from '@shared/weights/limits';
import { readingsAgree, settleSecondReading } from '@shared/weights/second-reading';
import { describe, expect, it } from 'vitest';

const ZONE = 'Europe/London';
const NOW = parseInstant('2026-06-10T07:50:00Z')!;
const bornDaysAgo = (days: number) => addCivilDays('2026-06-10', -days);

const weighed = (kg: number, daysAgo: number, rest: Partial<ChartWeight> = {}): ChartWeight => ({
  kg: kilograms(kg),
  method: 'scales',
  at: instant(NOW - daysAgo * DAY),
  usable: true,
  ...rest,
});

const assess = (kg: number, child: WeighedChild, rest: Partial<WeightAssessment> = {}) =>
  assessWeight({ kg: kilograms(kg), method: 'scales', at: NOW, child, history: [], zone: ZONE, ...rest });
const codes = (...args: Parameters<typeof assess>) => assess(...args).findings.map(({ code }) => code);

const BOY_12_MONTHS: WeighedChild = { bornOn: bornDaysAgo(365), sex: 'male' };
const BOY_17_MONTHS: WeighedChild = { bornOn: '2025-01-08', sex: 'male' };
const BOY_12_YEARS: WeighedChild = { bornOn: '2014-05-20', sex: 'male' };

describe('cases that must be caught', () => {
  // AHRQ web M&M 293: pounds charted as kilograms at 17 months
  it.each(['male', 'female', undefined] as const)('25 for 11.3 kg at 17 months (%s)', (sex) => {
    const opinion = assess(25, { ...BOY_17_MONTHS, sex });
    expect(opinion.verdict).toBe('second-person');
    expect(opinion.findings).toEqual([
      expect.objectContaining({ code: 'far-outside', strength: 'brim' }),
      expect.objectContaining({
        code: 'looks-like-pounds',
        text: '25 looks like pounds: 25 lb is 11.3 kg. Measure again.',
        offer: { field: 'kg', value: '11.3', label: 'Use 11.3 kg' },
      }),
    ]);
  });

  // ours: inside ±3 for a heavy 12-year-old, so only the harder search from 6 years finds it
  it.each(['male', 'female', undefined] as const)('92.2 for 41.8 kg at 12 years (%s)', (sex) => {
    const opinion = assess(92.2, { ...BOY_12_YEARS, sex });
    expect(opinion.findings).toContainEqual(
      expect.objectContaining({
        code: 'looks-like-pounds',
        offer: expect.objectContaining({ value: '41.8' }),
      }),
    );
    expect(opinion.verdict).not.toBe('accept');
  });

  it.each([
    ['tenfold too much', 96, '9.6'],
    ['tenfold too little', 0.965, '9.65'],
  ])('a slipped point, %s', (_name, kg, value) => {
    const opinion = assess(kg, BOY_12_MONTHS);
    expect(opinion.verdict).toBe('second-person');
    expect(opinion.findings).toContainEqual(
      expect.objectContaining({ code: 'slipped-point', offer: expect.objectContaining({ value }) }),
    );
  });

  it('pounds for a newborn, with two decimals', () => {
    const newborn: WeighedChild = { bornOn: '2026-06-09', sex: 'female', gestationWeeks: 40 };
    expect(assess(7.5, newborn).findings).toContainEqual(
      expect.objectContaining({
        code: 'looks-like-pounds',
        offer: expect.objectContaining({ value: '3.4' }),
      }),
    );
  });
});

describe('the lines at 3 and 5', () => {
  const at = (z: number) => assess(weightAtZ(z, 'male', 365)!, BOY_12_MONTHS);
  it.each([
    [2.99, 'accept'],
    [-2.99, 'accept'],
    [3.01, 'second-measurement'],
    [-3.01, 'second-measurement'],
    [4.99, 'second-measurement'],
    [5.01, 'second-person'],
    [-5.01, 'second-person'],
  ])('z %d: %s', (z, verdict) => {
    const opinion = at(z);
    expect(opinion.verdict).toBe(verdict);
    expect(opinion.z).toBeCloseTo(z, 6);
  });

  // the restricted form decides: plain LMS has 16 kg at 4.71 and 5 kg at −5.89
  it('reads the restricted z', () => {
    expect(assess(16.1, BOY_12_MONTHS).verdict).toBe('second-person');
    expect(assess(5, BOY_12_MONTHS).findings[0]!.text).toBe(
      '5 kg is far too light for this age (z −5.4): no order until another person has measured again.',
    );
  });

  it('counts the worse of both where sex is not recorded', () => {
    const heavyGirl = weightAtZ(3.1, 'female', 365)!;
    expect(assess(heavyGirl, { ...BOY_12_MONTHS, sex: 'male' }).verdict).toBe('accept');
    expect(assess(heavyGirl, { ...BOY_12_MONTHS, sex: undefined }).verdict).toBe('second-measurement');
  });

  it('follows the limits it is given', () => {
    const strict = { ...DEFAULT_WEIGHT_LIMITS, zCaution: 2 };
    const kg = kilograms(weightAtZ(2.5, 'male', 365)!);
    const entry = { kg, method: 'scales', at: NOW, child: BOY_12_MONTHS, history: [], zone: ZONE } as const;
    expect(assessWeight(entry).verdict).toBe('accept');
    expect(assessWeight(entry, strict).verdict).toBe('second-measurement');
  });
});

describe('look-alikes from 6 years', () => {
  const heavy = 92.2;
  it.each([
    ['a measured weight that agrees', weighed(90, 20), false],
    ['one that agrees at exactly 10 %', weighed(102.4, 20), false],
    ['one that does not agree', weighed(41.8, 20), true],
    ['one older than 30 days', weighed(90, 31), true],
    ['a stated weight', weighed(90, 20, { method: 'stated' }), true],
    ['one not yet confirmed', weighed(90, 20, { usable: false }), true],
  ])('%s: asked %s', (_name, last, isAsked) => {
    expect(codes(heavy, BOY_12_YEARS, { history: [last] }).includes('looks-like-pounds')).toBe(isAsked);
  });

  it('asks a 5-year-old only beyond 3, a 6-year-old beyond 2', () => {
    const kgAt = (days: number) => weightAtZ(2.5, 'male', days)!;
    expect(codes(kgAt(2100), { bornOn: bornDaysAgo(2100), sex: 'male' })).toEqual([]);
    // at 12 years the half of a heavy weight is an ordinary one
    expect(codes(kgAt(4400), { bornOn: bornDaysAgo(4400), sex: 'male' })).toEqual(['looks-like-pounds']);
  });
});

describe('change in a week', () => {
  it.each([
    ['10 % up', 11, weighed(10, 2), []],
    ['more than 10 % up', 11.001, weighed(10, 2), ['changed-much']],
    ['more than 10 % down', 8.99, weighed(10, 7), ['changed-much']],
    ['8 days ago', 8.9, weighed(10, 8), []],
    ['against an estimate', 8.9, weighed(10, 2, { method: 'estimated-age' }), []],
    ['against one never confirmed', 8.9, weighed(10, 2, { usable: false }), []],
    ['a later one does not count', 8.9, weighed(10, -1), []],
  ])('%s', (_name, kg, last, expected) => {
    expect(codes(kg, BOY_12_MONTHS, { history: [last] })).toEqual(expected);
  });

  it('takes the last of several and says the difference', () => {
    const opinion = assess(11.5, BOY_12_MONTHS, { history: [weighed(10, 1), weighed(11.4, 3)] });
    expect(opinion.verdict).toBe('second-measurement');
    expect(opinion.findings[0]!.text).toBe('1.5 kg (15 %) more than 10 kg on 9 Jun 08:50: measure again.');
  });
});

describe('children born early', () => {
  const born = (daysAgo: number): WeighedChild => ({
    bornOn: bornDaysAgo(daysAgo),
    sex: 'male',
    gestationWeeks: 34,
    gestationDays: 0,
  });

  it('has no reference before 40+0 weeks, and says so', () => {
    const opinion = assess(2.2, born(41));
    expect(opinion).toMatchObject({
      verdict: 'accept',
      findings: [{ code: 'no-reference', strength: 'information' }],
    });
    expect(opinion.z).toBeUndefined();
  });

  it('counts from the 40+0 day afterwards, to the second birthday', () => {
    expect(assess(weightAtZ(0, 'male', 58)!, born(100)).z).toBeCloseTo(0, 6);
    expect(assess(weightAtZ(0, 'male', 800)!, born(800)).z).toBeCloseTo(0, 6);
  });
});

describe('ordinary children raise no alarm', () => {
  // 3rd to 97th centile, every fifth day to 4 weeks, then monthly to 18 years
  const ages = [
    0,
    5,
    10,
    15,
    20,
    25,
    ...Array.from({ length: 215 }, (_, i) => Math.round((i + 1) * 30.4375)),
  ];
  const centiles = [-1.8808, -1.2816, 0, 1.2816, 1.8808];

  it.each(SEXES)('%s', (sex) => {
    for (const days of ages) {
      for (const z of centiles) {
        const child = { bornOn: bornDaysAgo(days), sex, gestationWeeks: 39 };
        const kg = weightAtZ(z, sex, days)!;
        expect(assess(kg, child), `${days} days, z ${z}`).toMatchObject({ verdict: 'accept', findings: [] });
      }
    }
  });

  // the same children with the unit or the point wrong
  it.each<[string, (kg: number) => number]>([
    ['pounds', (kg) => kg * 2.2046],
    ['ten times', (kg) => kg * 10],
    ['a tenth', (kg) => kg / 10],
  ])('and every one of them entered as %s is held back', (_name, wrong) => {
    for (const sex of SEXES) {
      for (const days of ages) {
        for (const z of [-1.2816, 0, 1.2816, 1.8808]) {
          const child = { bornOn: bornDaysAgo(days), sex, gestationWeeks: 39 };
          const opinion = assess(wrong(weightAtZ(z, sex, days)!), child);
          expect(opinion.verdict, `${sex}, ${days} days, z ${z}, read as z ${opinion.z}`).not.toBe('accept');
        }
      }
    }
  });
});

describe('a second reading', () => {
  it.each([
    [10, 10.1, true],
    [10, 10.11, false],
    [3.4, 3.42, true],
    [3.4, 3.421, false],
    [25, 11.3, false],
  ])('%d and %d agree: %s', (first, second, agree) => {
    expect(readingsAgree(first, second)).toBe(agree);
  });

  it('settles a weight only by the person asked for', () => {
    const reading = { first: 5, second: 5.02, byAnotherPerson: false };
    expect(settleSecondReading({ ...reading, verdict: 'second-measurement' })).toMatchObject({
      usable: true,
    });
    expect(settleSecondReading({ ...reading, verdict: 'second-person' })).toMatchObject({
      usable: false,
      code: 'another-person-needed',
    });
    expect(settleSecondReading({ ...reading, verdict: 'second-person', byAnotherPerson: true }).usable).toBe(
      true,
    );
    expect(
      settleSecondReading({ first: 25, second: 11.3, verdict: 'second-person', byAnotherPerson: true }),
    ).toMatchObject({ usable: false, code: 'readings-differ' });
  });
});
