import { atMost } from '@shared/rounding';
import { millilitres } from '@shared/units';
import type { Fraction, MaintenanceMethod, Sex } from '@shared/calc/types';
import { describe, expect, it } from 'vitest';
import { finding, maintenance, newborn, request, strengthOf, worked } from './make-request';
import { optional, readTable } from './table';

describe('maintenance, checked values', () => {
  it.each(readTable('maintenance'))(
    '$kg kg $sex $method $fraction − $feeds − $drugs: $pump mL/h ($source)',
    (row) => {
      const order = maintenance({
        method: row.method as MaintenanceMethod,
        fraction: row.fraction as Fraction,
        temperatureC: optional(row.temperature),
        feeds: millilitres(Number(row.feeds)),
        drugs: millilitres(Number(row.drugs)),
      });
      const sex = row.sex === '' ? undefined : (row.sex as Sex);
      const { figures } = worked(
        request({ kg: Number(row.kg), child: { sex, bornOn: '2014-01-01' }, order }),
      );
      if (figures.kind !== 'maintenance') throw new Error('wrong kind');
      expect(figures.fullMl).toBeCloseTo(Number(row.full_ml), 9);
      expect(figures.dayMl).toBeCloseTo(Number(row.day_ml), 9);
      expect(figures.rate).toBe(Number(row.pump));
      expect(figures.workedOutRate).toBe(Number(row.pump));
      const ceiling = sex === 'male' ? 2500 : 2000;
      expect(atMost(figures.rate * 24 + Number(row.feeds) + Number(row.drugs), ceiling)).toBe(true);
    },
  );
});

describe('term newborn by hours since birth, checked values', () => {
  it.each(readTable('newborn'))('$kg kg at $hours h, stated "$stated": $pump mL/h ($source)', (row) => {
    const order = maintenance({ method: 'newborn', newbornMlPerKgPerDay: optional(row.stated) });
    const asked = request({ kg: Number(row.kg), child: newborn(Number(row.hours)), order });
    const { figures } = worked(asked);
    if (figures.kind !== 'maintenance') throw new Error('wrong kind');
    expect(figures.fullMl).toBeCloseTo(Number(row.full_ml), 9);
    expect(figures.rate).toBe(Number(row.pump));
    const stated = Number(row.stated || row.low);
    const isInside = stated >= Number(row.low) && stated <= Number(row.high);
    expect(strengthOf(asked, 'newborn-band')).toBe(isInside ? 'none' : 'senior');
  });

  const at60h = (stated: number, fractionReason?: string) =>
    request({
      kg: 3.5,
      child: newborn(60),
      order: maintenance({ method: 'newborn', newbornMlPerKgPerDay: stated, fractionReason }),
    });

  it.each([
    [79.9, 'senior', 'below the band, NICE NG29 1.4'],
    [80, 'none', 'lower end'],
    [100, 'none', 'upper end'],
    [100.1, 'senior', 'above the band, NICE NG29 1.4'],
    [180, 'senior', 'the brim may be met'],
  ])('%s mL/kg/24 h at 60 h: %s (%s)', (stated, expected) => {
    expect(strengthOf(at60h(stated), 'newborn-band')).toBe(expected);
    expect(strengthOf(at60h(stated), 'newborn-brim')).toBe('none');
  });

  it('passes nobody above 180 mL/kg/24 h and offers the band', () => {
    const found = finding(at60h(180.1), 'newborn-brim');
    expect(found).toMatchObject({
      strength: 'brim',
      met: false,
      offer: { field: 'newbornMlPerKgPerDay', value: '100' },
    });
  });

  it('takes less than the band as a caution once a reason is given, and more never', () => {
    expect(strengthOf(at60h(60, 'Asphyxia, cooled'), 'newborn-band')).toBe('caution');
    expect(strengthOf(at60h(110, 'Asphyxia, cooled'), 'newborn-band')).toBe('senior');
  });
});
