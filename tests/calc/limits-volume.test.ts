import type { Fraction, RunningFluid } from '@shared/calc/types';
import { hours, kilograms, millilitres, millilitresPerHour } from '@shared/units';
import { describe, expect, it } from 'vitest';
import {
  ago,
  finding,
  fluid,
  maintenance,
  newborn,
  NOW,
  request,
  strengthOf,
  USUAL,
  worked,
} from './make-request';

const typed = (rate: number, extra = {}) => maintenance({ typedRate: millilitresPerHour(rate), ...extra });
const running = (rate: number): RunningFluid => ({
  code: 'BL-1',
  rate: millilitresPerHour(rate),
  fluid: fluid(USUAL),
});

describe('the 24 h ceiling (NICE NG29 1.4)', () => {
  const boy = { bornOn: '2012-01-01', sex: 'male' as const };
  it.each([
    [104, 0, 'met'],
    [104.1, 0, 'met'],
    [105, 0, 'brim'],
    [104, 4, 'met'],
    [104, 4.1, 'brim'],
    [99.5, 110, 'met'],
    [99.6, 110, 'brim'],
  ])('a typed %s mL/h with %s mL of drugs: %s', (rate, drugs, expected) => {
    const order = typed(rate, { drugs: millilitres(drugs) });
    expect(strengthOf(request({ kg: 75, child: boy, order }), 'maintenance-ceiling')).toBe(expected);
  });

  it('binds girls and children of sex not recorded at 2000 mL', () => {
    const at = (sex: 'female' | undefined, rate: number) =>
      strengthOf(
        request({ kg: 60, child: { bornOn: '2012-01-01', sex }, order: typed(rate) }),
        'maintenance-ceiling',
      );
    expect([at('female', 83.3), at('female', 83.4), at(undefined, 83.3), at(undefined, 83.4)]).toEqual([
      'met',
      'brim',
      'met',
      'brim',
    ]);
  });

  it('offers the rate that keeps it, and leaves the typed one alone', () => {
    const asked = request({ kg: 75, child: boy, order: typed(110) });
    expect(worked(asked).figures).toMatchObject({ rate: 110, workedOutRate: 104, volume: 2640 });
    expect(finding(asked, 'maintenance-ceiling')?.offer).toEqual({
      field: 'typedRate',
      value: '104',
      label: 'Set to 104 mL/h',
    });
  });

  it('holds a worked-out figure by a line in the workings, with no finding', () => {
    const out = worked(request({ kg: 58.3, child: { bornOn: '2012-01-01' } }));
    expect(out.steps.filter((step) => step.mark === 'stop')).toMatchObject([
      { working: 'at most 2000', result: '2000' },
    ]);
    expect(out.gauge.bands.at(-1)).toEqual({ label: 'rest, 38.3 kg', ml: 500, fullMl: 766 });
    expect(strengthOf(request({ kg: 58.3, child: { bornOn: '2012-01-01' } }), 'maintenance-ceiling')).toBe(
      'met',
    );
  });
});

describe('a typed rate above the method (ours)', () => {
  // 16.4 kg: 1320 mL, exactly 55 mL/h
  it.each([
    [55, 'none'],
    [55.1, 'none'],
    [55.2, 'senior'],
    [82.5, 'senior'],
    [82.6, 'brim'],
    [20, 'none'],
  ])('%s mL/h for 55 due: %s', (rate, expected) => {
    expect(strengthOf(request({ order: typed(rate) }), 'above-method')).toBe(expected);
  });

  it('measures against what fraction and intake leave', () => {
    const order = typed(55, { fraction: 'half' });
    expect(finding(request({ order }), 'above-method')).toMatchObject({
      strength: 'brim',
      offer: { value: '27.5' },
    });
  });

  it.each([
    [9.9, 1, 'none'],
    [9.9, 1.1, 'brim'],
    [10, 3, 'none'],
    [10, 3.1, 'brim'],
  ])('%s kg: %s mL/h keeps a vein open: %s (common practice)', (kg, rate, expected) => {
    const order = typed(rate, { feeds: millilitres(1000) });
    expect(strengthOf(request({ kg, order }), 'above-method')).toBe(expected);
  });

  it('is not asked of newborns, who go by their band', () => {
    const order = typed(14.7, { method: 'newborn' });
    const asked = request({ kg: 3.5, child: newborn(60), order });
    expect(strengthOf(asked, 'above-method')).toBe('none');
    expect(strengthOf(asked, 'newborn-band')).toBe('senior');
    expect(
      strengthOf(
        request({ kg: 3.5, child: newborn(60), order: typed(14.6, { method: 'newborn' }) }),
        'newborn-band',
      ),
    ).toBe('none');
  });
});

describe('raised ADH (NICE NG29 1.4)', () => {
  const at = (fraction: Fraction, extra = {}) =>
    request({ child: { flags: ['raised-adh'] }, order: maintenance({ fraction, ...extra }) });
  it.each([
    ['full', 'caution'],
    ['four-fifths', 'met'],
    ['two-thirds', 'met'],
    ['half', 'met'],
  ] as const)('%s: %s', (fraction, expected) =>
    expect(strengthOf(at(fraction), 'adh-fraction')).toBe(expected),
  );

  it('owes a reason until one is given', () => {
    expect(finding(at('full'), 'adh-fraction')).toMatchObject({ reasonOwed: true, owes: 'fractionReason' });
    expect(
      finding(at('full', { fractionReason: 'Sodium 140, seen' }), 'adh-fraction')?.reasonOwed,
    ).toBeUndefined();
  });

  it('looks at what a typed rate gives', () => {
    expect(strengthOf(at('half', { typedRate: millilitresPerHour(20) }), 'adh-fraction')).toBe('caution');
    expect(strengthOf(at('full', { typedRate: millilitresPerHour(40) }), 'adh-fraction')).toBe('met');
  });
});

describe('a plan or a disease that restricts', () => {
  it.each(['cardiac', 'renal', 'hepatic'] as const)(
    '%s: full maintenance owes a reason (common practice)',
    (flag) => {
      const at = (fraction: Fraction) =>
        request({ child: { flags: [flag] }, order: maintenance({ fraction }) });
      expect(finding(at('full'), 'full-with-restriction')).toMatchObject({
        strength: 'caution',
        reasonOwed: true,
      });
      expect(strengthOf(at('four-fifths'), 'full-with-restriction')).toBe('none');
    },
  );

  it('is held to the fraction of the plan', () => {
    const plan = { kind: 'fraction' as const, fraction: 'half' as const };
    expect(strengthOf(request({ plan, order: maintenance({ fraction: 'half' }) }), 'plan-fraction')).toBe(
      'met',
    );
    expect(
      strengthOf(request({ plan, order: maintenance({ fraction: 'two-thirds' }) }), 'plan-fraction'),
    ).toBe('senior');
  });

  it.each([
    [1320, 'met'],
    [1318, 'met'],
    [1317, 'senior'],
    [1323, 'caution'],
  ])('is held to an allowance of %s mL: %s (within a pump step)', (ml, expected) => {
    const plan = { kind: 'allowance' as const, mlPer24h: millilitres(ml) };
    expect(strengthOf(request({ plan }), 'plan-allowance')).toBe(expected);
  });
});

describe('all fluids together (ours)', () => {
  it.each([
    [0, 0, 'met'],
    [27.5, 0, 'met'],
    [27.6, 0, 'senior'],
    [0, 660, 'met'],
    [0, 661, 'senior'],
  ])('beside 55 mL/h another %s mL/h and %s mL of boluses: %s', (rate, ml, expected) => {
    const bolusesLast24h = ml > 0 ? [{ ml: millilitres(ml), at: ago(2), here: false }] : [];
    const intake = { bolusesLast24h, running: rate > 0 ? [running(rate)] : [] };
    expect(strengthOf(request({ intake }), 'all-fluids')).toBe(expected);
  });
});

describe('how long an order lives', () => {
  it.each([
    ['scales', 3, 24, 'none'],
    ['estimated-age', 3, 12, 'none'],
    ['estimated-age', 3, 12.5, 'brim'],
    ['stated', 3, 24, 'brim'],
    ['scales', 168, 24, 'none'],
    ['scales', 169, 24, 'brim'],
  ] as const)('%s weight of %s h for %s h: %s', (method, h, asked, expected) => {
    const at = ago(h);
    const order = maintenance({ hours: hours(asked) });
    const change = { weight: { kg: kilograms(16.4), method, at }, lastMeasuredAt: at, order };
    expect(strengthOf(request(change), 'order-life')).toBe(expected);
  });

  it('is 24 h at most and offers it', () => {
    expect(finding(request({ order: maintenance({ hours: hours(25) }) }), 'order-life')).toMatchObject({
      strength: 'brim',
      offer: { field: 'hours', value: '24' },
    });
  });
});

describe('the age of the weight (common practice)', () => {
  it.each([
    [7 * 24, 'none', 'caution is none: 7 days exactly'],
    [7 * 24 + 0.1, 'senior', 'older than 7 days'],
  ])('weighed %s h ago: %s (%s)', (h, expected) => {
    expect(strengthOf(request({ lastMeasuredAt: ago(h) }), 'weight-old')).toBe(expected);
  });

  it.each([
    [48, 'none'],
    [48.1, 'senior'],
  ])('a newborn weighed %s h ago: %s', (h, expected) => {
    const asked = request({
      kg: 3.5,
      child: newborn(80),
      lastMeasuredAt: ago(h),
      order: maintenance({ method: 'newborn' }),
    });
    expect(strengthOf(asked, 'weight-old')).toBe(expected);
  });

  it('is old when nobody ever measured one, and an estimate is a caution', () => {
    const weight = { kg: kilograms(16), method: 'estimated-age' as const, at: NOW };
    const asked = request({ weight, lastMeasuredAt: undefined });
    expect(strengthOf(asked, 'weight-old')).toBe('senior');
    expect(strengthOf(asked, 'weight-estimated')).toBe('caution');
  });
});
