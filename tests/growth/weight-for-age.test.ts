import { calculateZScore } from '@pedi-growth/core';
import type { Sex } from '@shared/calc/types';
import { lmsAt, weightAtZ, weightForAge, zScore, zScores } from '@shared/growth/weight-for-age';
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';

const SEXES: readonly Sex[] = ['female', 'male'];
const MONTH = 30.4375;
/** The outside reference gives two decimals; half of the last one, and the 0.001 that thinning may cost. */
const WITHIN = 0.005 + 0.001;

describe('published points', () => {
  // WHO 2006 weight-for-age, 12 months, as carried by two independent packages
  it('has the WHO medians of 12 months', () => {
    const year = 12 * MONTH;
    expect(lmsAt('male', year)!.m).toBeCloseTo(9.6479, 3);
    expect(lmsAt('female', year)!.m).toBeCloseTo(8.9481, 3);
    expect(weightForAge(9.6479, 'male', year)).toBeCloseTo(0, 3);
    expect(weightForAge(8.9481, 'female', year)).toBeCloseTo(0, 3);
  });

  // WHO 2006 birth medians
  it('has the WHO medians of birth', () => {
    expect(weightAtZ(0, 'male', 0)).toBe(3.3464);
    expect(weightAtZ(0, 'female', 0)).toBe(3.2322);
  });

  // the restricted form, by the outside reference; the plain formula gives −5.89 and 4.71
  it.each([
    [5, -5.36],
    [16, 4.96],
  ])('boy of 12 months, %d kg: z %d', (kg, z) => {
    expect(weightForAge(kg, 'male', 365)).toBeCloseTo(z, 2);
  });
});

describe('the outside reference to 10 years', () => {
  const SPREAD = [-6, -5, -3.5, -3, -2.5, -1, 0, 1, 2, 2.9, 3.1, 4.9, 5.5];

  it.each(SEXES)('agrees for every day of the first five years, then every fifth: %s', async (sex) => {
    let compared = 0;
    for (let day = 0; day <= 3652; day += day < 1857 ? 1 : 5) {
      for (const z of day % 3 === 0 ? SPREAD : [-5, 0, 3]) {
        const kg = weightAtZ(z, sex, day)!;
        const outside = await calculateZScore({
          indicator: 'weight-for-age',
          sex,
          ageInDays: day,
          measurement: kg,
        });
        // between the two WHO tables the reference has a hole of one day
        if (outside === null) continue;
        expect(Math.abs(weightForAge(kg, sex, day)! - outside.zScore), `day ${day}, z ${z}`).toBeLessThan(
          WITHIN,
        );
        compared += 1;
      }
    }
    expect(compared).toBeGreaterThan(10_000);
  });
});

describe('the CDC columns from 120.5 months', () => {
  // the percentile columns printed beside L, M and S in the published file
  const PERCENTILES: [string, number][] = [
    ['P3', -1.880794],
    ['P5', -1.644854],
    ['P10', -1.281552],
    ['P25', -0.67449],
    ['P50', 0],
    ['P75', 0.67449],
    ['P90', 1.281552],
    ['P95', 1.644854],
    ['P97', 1.880794],
  ];
  let rows: Record<string, number>[];

  beforeAll(() => {
    const root = dirname(createRequire(import.meta.url).resolve('jsgrowup/package.json'));
    const lines = readFileSync(join(root, 'tables/source/cdc/wtage.csv'), 'utf8')
      .split(/\r\n|\r|\n/)
      .filter((line) => line !== '');
    const names = lines[0]!.split(',');
    rows = lines
      .slice(1)
      .map((line) => Object.fromEntries(line.split(',').map((v, i) => [names[i], Number(v)])));
    rows = rows.filter((row) => row.Agemos! > 120);
  });

  it('agrees in every row', () => {
    expect(rows).toHaveLength(2 * 121);
    for (const row of rows) {
      const sex = row.Sex === 1 ? 'male' : 'female';
      const days = row.Agemos! * MONTH;
      for (const [column, z] of PERCENTILES) {
        const kg = row[column]!;
        expect(Math.abs(weightForAge(kg, sex, days)! - z), `${sex} ${row.Agemos} ${column}`).toBeLessThan(
          0.001,
        );
        expect(Math.abs(weightAtZ(z, sex, days)! / kg - 1)).toBeLessThan(0.001);
      }
    }
  });
});

describe('the whole range', () => {
  const ages = Array.from({ length: 7320 / 10 }, (_, i) => i * 10);

  it.each(SEXES)('is finite, rises with weight and is undone by weightAtZ: %s', (sex) => {
    for (const day of ages) {
      let before = 0;
      for (let z = -6; z <= 8; z += 0.5) {
        const kg = weightAtZ(z, sex, day)!;
        expect(kg, `day ${day}, z ${z}`).toBeGreaterThan(before);
        expect(weightForAge(kg, sex, day)).toBeCloseTo(z, 6);
        before = kg;
      }
    }
  });

  it.each(SEXES)('makes no jump of the median where two references meet: %s', (sex) => {
    for (const seam of [1856.5, 120.25 * MONTH]) {
      const before = weightAtZ(0, sex, seam - 15)!;
      const after = weightAtZ(0, sex, seam + 15)!;
      // a month's growth is about 1 %; the CDC girls of 10 years are 3 % heavier than WHO's
      expect(Math.abs(after / before - 1)).toBeLessThan(0.05);
    }
  });

  it('ends with the tables', () => {
    expect(weightForAge(60, 'male', 240.5 * MONTH)).toBeTypeOf('number');
    expect(weightForAge(60, 'male', 241 * MONTH)).toBeUndefined();
    expect(weightForAge(3, 'male', -1)).toBeUndefined();
    expect(weightForAge(3, 'male', NaN)).toBeUndefined();
    expect(zScores(3, undefined, -1)).toEqual([]);
  });
});

describe('sex not recorded', () => {
  it('counts the score further out', () => {
    // 12 months: 7 kg is further out for a boy, 13 kg for a girl
    expect(weightForAge(7, undefined, 365)).toBe(weightForAge(7, 'male', 365));
    expect(weightForAge(13, undefined, 365)).toBe(weightForAge(13, 'female', 365));
    expect(zScores(7, undefined, 365)).toHaveLength(2);
  });
});

describe('zScore', () => {
  it('uses the logarithm where the power is 0', () => {
    expect(zScore(Math.E, { l: 0, m: 1, s: 0.5 })).toBeCloseTo(2, 12);
  });
});
