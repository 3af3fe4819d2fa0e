import type { Flag } from '@shared/calc/types';
import { instant, HOUR } from '@shared/time';
import { millilitres, millilitresPerKg, minutes } from '@shared/units';
import { describe, expect, it } from 'vitest';
import {
  ago,
  bolus,
  finding,
  fluid,
  newborn,
  NOW,
  refusal,
  request,
  strengthOf,
  worked,
} from './make-request';
import { readTable } from './table';

const byWeight = (mlPerKg: number) => ({ by: 'weight' as const, mlPerKg: millilitresPerKg(mlPerKg) });
const byVolume = (ml: number) => ({ by: 'volume' as const, volume: millilitres(ml) });
const given = (ml: number, h = 2, here = false) => ({ ml: millilitres(ml), at: ago(h), here });

describe('bolus, checked values', () => {
  it.each(readTable('bolus'))('$kg kg × $dose mL/kg is $volume_ml mL ($source)', (row) => {
    const flags = row.flags ? [row.flags as Flag] : [];
    const order = bolus({ dose: byWeight(Number(row.dose)) });
    const { figures } = worked(request({ kg: Number(row.kg), child: { bornOn: row.born, flags }, order }));
    expect(figures.volume).toBe(Number(row.volume_ml));
  });
});

describe('one dose', () => {
  it.each([
    [20, 10, 'none', 'met', '10 mL/kg is usual, NICE NG29 1.3'],
    [20, 10.05, 'caution', 'met', 'above 10 mL/kg'],
    [20, 20, 'caution', 'met', 'the brim may be met'],
    [20, 20.05, 'caution', 'brim', 'above 20 mL/kg'],
    [50, 10, 'none', 'met', '500 mL may be met, common practice'],
    [50.1, 10, 'none', 'brim', '501 mL'],
  ])('%s kg at %s mL/kg: large %s, volume %s (%s)', (kg, dose, large, volume) => {
    const asked = request({ kg, order: bolus({ dose: byWeight(dose) }) });
    expect(strengthOf(asked, 'bolus-large')).toBe(large);
    expect(strengthOf(asked, 'bolus-volume')).toBe(volume);
  });

  it('offers the brim and never changes what was typed', () => {
    const asked = request({ kg: 62, child: { bornOn: '2011-11-02' }, order: bolus() });
    expect(worked(asked).figures).toMatchObject({ volume: 620, mlPerKg: 10 });
    expect(finding(asked, 'bolus-volume')).toMatchObject({
      value: 620,
      limit: 500,
      offer: { field: 'volumeMl', value: '500', label: 'Set to 500 mL (8.1 mL/kg)' },
    });
    expect(worked(asked).gauge).toMatchObject({ orderMl: 620, brimMl: 500, brimNote: 'in one bolus' });
  });

  it('goes to 20 mL/kg in a newborn without a caution', () => {
    const at = (dose: number) =>
      request({ kg: 3.5, child: newborn(60), order: bolus({ dose: byWeight(dose) }) });
    expect(strengthOf(at(20), 'bolus-large')).toBe('none');
    expect(strengthOf(at(20), 'bolus-volume')).toBe('met');
    expect(strengthOf(at(20.4), 'bolus-volume')).toBe('brim');
  });

  it.each(['cardiac', 'renal', 'low-albumin'] as const)('is a caution above 5 mL/kg with %s', (flag) => {
    const at = (dose: number) =>
      request({ kg: 20, child: { flags: [flag] }, order: bolus({ dose: byWeight(dose) }) });
    expect(strengthOf(at(5), 'bolus-careful')).toBe('met');
    expect(strengthOf(at(5.05), 'bolus-careful')).toBe('caution');
  });

  it('tells the share of circulating volume by age (textbook ranges)', () => {
    const share = (kg: number, bornOn: string) => {
      const { figures } = worked(request({ kg, child: { bornOn, bornAt: undefined }, order: bolus() }));
      return figures.kind === 'bolus' ? figures.percentOfCirculating : NaN;
    };
    expect(share(5, '2026-01-10')).toBeCloseTo((50 / 375) * 100, 9); // 5 kg infant: 375 mL
    expect(share(10, '2025-06-11')).toBeCloseTo((10 / 75) * 100, 9); // the day before the first birthday
    expect(share(10, '2025-06-10')).toBeCloseTo((10 / 72) * 100, 9);
    expect(share(40, '2014-06-11')).toBeCloseTo((10 / 72) * 100, 9);
    expect(share(40, '2014-06-10')).toBeCloseTo((10 / 68) * 100, 9);
    const { figures } = worked(request({ kg: 3.5, child: newborn(60), order: bolus() }));
    expect(figures).toMatchObject({ percentOfCirculating: (10 / 85) * 100 });
  });
});

describe('all boluses of 24 h', () => {
  const after = (ml: number, extra = {}) =>
    request({ kg: 20, intake: { bolusesLast24h: [given(ml)], running: [] }, order: bolus(extra) });

  it.each([
    [599, 'met', 'none', '39.95 mL/kg'],
    [600, 'senior', 'none', 'reached at 40 mL/kg, NICE NG29'],
    [1000, 'senior', 'none', '60 mL/kg is not above 60'],
    [1001, 'senior', 'senior', 'above 60 mL/kg a named advice as well'],
  ])('%s mL before: total %s, advice %s (%s)', (ml, total, advice) => {
    expect(strengthOf(after(ml), 'bolus-total')).toBe(total);
    expect(strengthOf(after(ml), 'bolus-advice')).toBe(advice);
  });

  it('owes the name of who advised, and holds once it is there', () => {
    expect(finding(after(1200), 'bolus-advice')).toMatchObject({
      owes: 'advisedBy',
      deferred: true,
      met: false,
    });
    expect(strengthOf(after(1200, { advisedBy: 'Dr Amadi-Price' }), 'bolus-advice')).toBe('met');
  });

  it('has no brim of its own', () => {
    expect(worked(after(3000)).limits.filter((limit) => limit.strength === 'brim' && !limit.met)).toEqual([]);
  });

  it('counts what was given elsewhere and forgets after 24 h', () => {
    const at = (h: number) =>
      request({ kg: 20, intake: { bolusesLast24h: [given(600, h)], running: [] }, order: bolus() });
    expect(strengthOf(at(23.99), 'bolus-total')).toBe('senior');
    expect(strengthOf(at(24), 'bolus-total')).toBe('met');
  });
});

describe('the fluid of a bolus', () => {
  it.each([
    ['Sodium chloride 0.9% + glucose 5%', 'bolus-glucose'],
    ['Sodium chloride 0.9% + potassium chloride 20 mmol/L', 'bolus-potassium'],
    ['Sodium chloride 0.45% + glucose 5%', 'bolus-hypotonic'],
    ['Sodium chloride 2.7%', 'hypertonic'],
  ])('%s is a brim: %s (NICE NG29 1.3)', (name, code) => {
    expect(strengthOf(request({ order: bolus({ fluid: fluid(name) }) }), code)).toBe('brim');
  });

  it.each([
    'Sodium chloride 0.9%',
    'Compound sodium lactate',
    'Ringer’s lactate',
    'Balanced crystalloid 140',
  ])('%s may be given, whatever potassium it carries by itself', (name) => {
    const brims = worked(request({ order: bolus({ fluid: fluid(name) }) })).limits.filter(
      (limit) => limit.strength === 'brim' && !limit.met,
    );
    expect(brims).toEqual([]);
  });
});

describe('how it is given', () => {
  it('is a caution over more than 10 min and no bolus over more than an hour', () => {
    const over = (min: number) => strengthOf(request({ order: bolus({ over: minutes(min) }) }), 'bolus-slow');
    expect([10, 10.1, 60, 60.1].map(over)).toEqual(['none', 'caution', 'caution', 'brim']);
  });

  it('names the rate no pump reaches: 500 mL in 10 min is 3000 mL/h', () => {
    const asked = request({ kg: 50, order: bolus({ route: 'pump', dose: byVolume(500) }) });
    expect(worked(asked).figures).toMatchObject({ rate: 3000 });
    expect(finding(asked, 'bolus-pump')?.text).toContain('3000 mL/h');
    expect(strengthOf(request({ kg: 16.65, order: bolus({ route: 'pump' }) }), 'bolus-pump')).toBe('none');
    expect(worked(request({ kg: 50, order: bolus({ dose: byVolume(500) }) })).figures).not.toHaveProperty(
      'rate',
    );
  });
});

describe('an emergency', () => {
  it('is never delayed by weight age, results or gestation: seniors are asked afterwards', () => {
    const asked = request({
      kg: 8,
      child: { bornOn: '2026-03-20', gestationWeeks: undefined },
      lastMeasuredAt: instant(NOW - 9 * 24 * HOUR),
      weight: { kg: request({ kg: 8 }).weight.kg, method: 'scales', at: instant(NOW - 9 * 24 * HOUR) },
      results: {},
      order: bolus(),
    });
    expect(finding(asked, 'weight-old')).toMatchObject({ strength: 'senior', met: false, deferred: true });
    expect(
      worked(asked).limits.filter((limit) => limit.strength === 'senior' && !limit.met && !limit.deferred),
    ).toEqual([]);
  });

  it.each(['dka', 'severe-malnutrition'] as const)('of another kind is refused by name: %s', (flag) => {
    expect(refusal(request({ child: { flags: [flag] }, order: bolus() }))).toBe('wrong-kind');
  });

  it('always says to look again', () => {
    expect(finding(request({ order: bolus() }), 'look-again')).toMatchObject({
      strength: 'information',
      met: true,
    });
  });
});
