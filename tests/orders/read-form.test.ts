import type { OrderForm, OrderFormField } from '@shared/orders/form';
import { proposeForm } from '@shared/orders/propose-form';
import { readOrderForm } from '@shared/orders/read-form';
import { describe, expect, it } from 'vitest';
import { chart, productNamed, weight } from './chart';

const context = chart();
const maintenance: OrderForm = {
  ...proposeForm('maintenance', context),
  reason: 'Nil by mouth before surgery',
  feedsMl: '0',
  drugsMl: '70',
};
const bolus: OrderForm = { ...proposeForm('bolus', context), reason: 'Shocked, septic' };

const fieldsOf = (form: OrderForm, on = context) => {
  const reading = readOrderForm(form, on);
  return reading.ok ? {} : reading.fields;
};

describe('a whole form', () => {
  it('is read with its units, at its planned start', () => {
    const reading = readOrderForm(
      { ...maintenance, drugsMl: ' 70 ', plannedStart: '2026-06-10T12:15' },
      context,
    );
    if (!reading.ok) throw new Error(JSON.stringify(reading));
    expect(reading.request).toMatchObject({
      at: Date.UTC(2026, 5, 10, 11, 15),
      line: 'peripheral',
      weight: { kg: 16.4, method: 'scales' },
      order: { kind: 'maintenance', method: 'bands-daily', fraction: 'full', feeds: 0, drugs: 70, hours: 24 },
    });
    expect(reading.extras).toMatchObject({ urgency: 'routine', checkerId: null, weightId: 'weight-1' });
  });

  it('gives the same request whatever the clock says meanwhile', () => {
    const later = chart({ now: '2026-06-10T11:40:00.000Z' });
    expect(readOrderForm(maintenance, later)).toEqual(readOrderForm(maintenance, context));
  });
});

describe('what is empty', () => {
  it('is told apart from what is malformed', () => {
    const reading = readOrderForm({ ...maintenance, feedsMl: '  ', drugsMl: '7,5', reason: '' }, context);
    if (reading.ok) throw new Error('should not read');
    expect(reading.missing.sort()).toEqual(['feedsMl', 'reason']);
    expect(reading.fields.feedsMl).toMatch(/0 when there are none/);
    expect(reading.fields.drugsMl).toBe('Use a point, not a comma: 7.5');
  });

  it.each<[OrderForm, OrderFormField]>([
    [maintenance, 'reason'],
    [maintenance, 'weightId'],
    [maintenance, 'method'],
    [maintenance, 'fraction'],
    [maintenance, 'feedsMl'],
    [maintenance, 'drugsMl'],
    [maintenance, 'productId'],
    [maintenance, 'line'],
    [maintenance, 'plannedStart'],
    [maintenance, 'hours'],
    [maintenance, 'reviewBy'],
    [maintenance, 'bloodsBy'],
    [maintenance, 'urgency'],
    [bolus, 'doseBy'],
    [bolus, 'mlPerKg'],
    [bolus, 'overMinutes'],
    [bolus, 'route'],
  ])('is never assumed: %#', (form, field) => {
    const reading = readOrderForm({ ...form, [field]: '' }, context);
    expect(reading).toMatchObject({ ok: false, missing: [field] });
  });
});

describe('a number field', () => {
  // classes of bad input; each is refused in words, none is repaired
  const BAD = [
    '-1',
    '+5',
    '1e2',
    '4.4e1',
    '1,000',
    '1 000',
    '1.2.3',
    '12mL',
    '12 mL',
    '0x10',
    '١٢',
    '１２',
    '²',
    'NaN',
    'Infinity',
    'ten',
    '.5',
    '5.',
    '05',
    '1.234',
    '99999999',
  ];
  const FIELDS: [OrderForm, OrderFormField][] = [
    [maintenance, 'feedsMl'],
    [maintenance, 'drugsMl'],
    [maintenance, 'typedRate'],
    [maintenance, 'hours'],
    [{ ...maintenance, method: 'who' }, 'temperatureC'],
    [{ ...maintenance, method: 'newborn' }, 'newbornMlPerKgPerDay'],
    [bolus, 'mlPerKg'],
    [{ ...bolus, doseBy: 'volume' }, 'volumeMl'],
    [bolus, 'overMinutes'],
  ];

  it.each(FIELDS)('of %#: %s refuses every malformed number', (form, field) => {
    for (const text of BAD) {
      const fields = fieldsOf({ ...form, [field]: text });
      expect(Object.keys(fields), `${field}: ${text}`).toEqual([field]);
    }
  });

  it.each<[OrderForm, OrderFormField, string, boolean]>([
    [maintenance, 'hours', '0', false],
    [maintenance, 'hours', '1', true],
    [maintenance, 'hours', '12.5', false],
    [maintenance, 'typedRate', '0', false],
    [maintenance, 'typedRate', '44.0', true],
    [maintenance, 'typedRate', '44.05', false],
    [maintenance, 'drugsMl', '0', true],
    [bolus, 'mlPerKg', '0', false],
    [bolus, 'mlPerKg', '10', true],
    [bolus, 'overMinutes', '0', false],
  ])('%#: %s takes its own range', (form, field, text, isTaken) => {
    expect(field in fieldsOf({ ...form, [field]: text })).toBe(!isTaken);
  });

  it('that the method does not use is not read', () => {
    expect(fieldsOf({ ...maintenance, temperatureC: 'hot', mlPerKg: 'x', volumeMl: 'x' })).toEqual({});
  });
});

describe('what the chart has to say', () => {
  it.each<[string, Partial<OrderForm>, OrderFormField]>([
    ['a weight that is not on the chart', { weightId: 'weight-9' }, 'weightId'],
    ['a fluid that is not on the shelf', { productId: 'product-999' }, 'productId'],
    ['a method that is none', { method: 'guess' }, 'method'],
    ['an emergency for maintenance', { urgency: 'emergency' }, 'urgency'],
    ['a start more than an hour ago', { plannedStart: '2026-06-10T10:59' }, 'plannedStart'],
    ['a start beyond tomorrow', { plannedStart: '2026-06-11T12:01' }, 'plannedStart'],
    ['a start that is no time', { plannedStart: '2026-06-31T12:00' }, 'plannedStart'],
    ['a start the clocks leave out', { plannedStart: '2026-03-29T01:30' }, 'plannedStart'],
    ['a review before the start', { reviewBy: '2026-06-10T12:00' }, 'reviewBy'],
    ['bloods more than a day on', { bloodsBy: '2026-06-11T12:01' }, 'bloodsBy'],
    ['a dose in the reason, which the checker reads', { reason: 'Give 10 mL/kg' }, 'reason'],
    ['a fluid in the reason', { reason: '0.9 % saline, dry' }, 'reason'],
  ])('refuses %s', (_what, change, field) => {
    expect(Object.keys(fieldsOf({ ...maintenance, ...change }))).toEqual([field]);
  });

  it('refuses a bolus planned for later than it would keep', () => {
    expect(fieldsOf({ ...bolus, plannedStart: '2026-06-10T14:01' })).toHaveProperty('plannedStart');
    expect(fieldsOf({ ...bolus, plannedStart: '2026-06-10T14:00' })).toEqual({});
  });

  it('refuses a weight whose second measurement is owed', () => {
    const owed = chart({ weights: [weight('weight-1', '25.000', { usable: false })] });
    expect(fieldsOf({ ...maintenance, weightId: 'weight-1' }, owed).weightId).toMatch(/second measurement/);
  });
});

describe('the proposed form', () => {
  it('leaves what must be stated empty', () => {
    const form = proposeForm('maintenance', context);
    expect(form).toMatchObject({ reason: '', feedsMl: '', drugsMl: '', checkerId: '', typedRate: '' });
    expect(readOrderForm(form, context)).toMatchObject({
      ok: false,
      missing: ['reason', 'feedsMl', 'drugsMl'],
    });
  });

  it('proposes isotonic fluid with glucose 5%, and potassium only with a fresh result that allows it', () => {
    const named = (on: typeof context) =>
      on.products.find(({ id }) => id === proposeForm('maintenance', on).productId)?.name;
    expect(named(context)).toBe('Sodium chloride 0.9% + glucose 5%');
    const potassium = (value: string) =>
      chart({ results: [{ analyte: 'potassium', value, unit: 'mmol/L', at: '2026-06-10T08:40:00.000Z' }] });
    expect(productNamed(context, named(potassium('3.9'))!)).not.toBe(productNamed(context, named(context)!));
    expect(named(potassium('5.8'))).toBe('Sodium chloride 0.9% + glucose 5%');
  });

  it.each([
    [['raised-adh'], 'two-thirds'],
    [['cardiac'], ''],
    [[], 'full'],
  ] as const)('with flags %j proposes the fraction %j', (flags, fraction) => {
    expect(proposeForm('maintenance', chart({}, { flags: [...flags] })).fraction).toBe(fraction);
  });

  it('halves the life of an order on an estimated weight', () => {
    const guess = chart({
      weights: [weight('weight-1', '16.000', { method: 'estimated-age' })],
      lastMeasuredAt: null,
    });
    expect(proposeForm('maintenance', guess).hours).toBe('12');
  });

  it('never proposes a bolus past its brim: 62 kg is ordered as 500 mL', () => {
    const heavy = chart({ weights: [weight('weight-1', '62.000')] }, { bornOn: '2012-01-05' });
    expect(proposeForm('bolus', heavy)).toMatchObject({ doseBy: 'volume', volumeMl: '500' });
    expect(proposeForm('bolus', context)).toMatchObject({ doseBy: 'weight', mlPerKg: '10' });
  });

  it('without a weight proposes the bare form', () => {
    const form = proposeForm('maintenance', chart({ weights: [], lastMeasuredAt: null }));
    expect(form).toMatchObject({ weightId: '', productId: '', kind: 'maintenance' });
  });
});
