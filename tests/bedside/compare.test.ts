import { compareAll, compareBag, compareChild, compareLine, comparePump } from '@shared/bedside/compare';
import type { BedsideContext } from '@shared/bedside/finding';
import { volumeToInfuse } from '@shared/bedside/volume-to-infuse';
import type { OrderContent } from '@shared/orders/content';
import type { BedsideEntries, StepVerdict } from '@shared/routes/bedside';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { describe, expect, it } from 'vitest';
import { at, bolus, fluidText, maintenance, PRODUCTS } from '../checks/support/edie';

const context = (rest: Partial<BedsideContext> = {}): BedsideContext => ({
  at: at('2026-06-10T11:01:00.000Z'),
  zone: 'Europe/London',
  rulebook: DEFAULT_RULEBOOK,
  products: PRODUCTS,
  infusedMl: 0,
  ...rest,
});
const codes = ({ findings }: StepVerdict) => findings.map(({ field, code }) => `${field}:${code}`);

const child: BedsideEntries['child'] = { number: 'SM 418 207', bornOn: '2022-03-14', saidBy: 'Father' };
const bag: BedsideEntries['bag'] = {
  productId: 'sg20',
  sizeMl: '500',
  batch: 'K26B114',
  expiry: '2027-11-30',
  bagNumber: '',
};
const pump: BedsideEntries['pump'] = { device: '0417', channel: 'A', rate: '44', volume: '176', minutes: '' };
const line: BedsideEntries['line'] = {
  lineClass: 'peripheral',
  site: 'left hand',
  traced: true,
  clampOpen: true,
  siteLooksWell: true,
};

describe('child: two identifiers', () => {
  it.each([
    [{}, []],
    [{ number: 'sm418207' }, []],
    [{ number: ' SM  418 207 ' }, []],
    [{ number: 'SM 418 208' }, ['number:wrong-child']],
    [{ number: '' }, ['number:missing']],
    [{ bornOn: '2022-03-15' }, ['bornOn:wrong-child']],
    [{ bornOn: '14/03/2022' }, ['bornOn:missing']],
    [{ number: 'X', bornOn: '2020-01-01' }, ['number:wrong-child', 'bornOn:wrong-child']],
  ])('%j', (entered, expected) => {
    expect(codes(compareChild(maintenance(), { ...child, ...entered }))).toEqual(expected);
  });
});

describe('bag', () => {
  it.each<[Partial<BedsideEntries['bag']>, string[]]>([
    [{}, []],
    [{ productId: 'sg0' }, ['productId:no-potassium']],
    [{ productId: 'sg40' }, ['productId:more-potassium']],
    [{ productId: 's0' }, ['productId:another-fluid']],
    [{ productId: '' }, ['productId:missing']],
    [{ sizeMl: '250' }, ['sizeMl:not-stocked']],
    [{ sizeMl: '' }, ['sizeMl:empty']],
    [{ expiry: '2026-06-09' }, ['expiry:expired']],
    [{ expiry: '2026-06-10' }, []],
    [{ expiry: '06/2027' }, ['expiry:missing']],
    [{ batch: '' }, []],
  ])('%j', (entered, expected) => {
    expect(codes(compareBag(maintenance(), { ...bag, ...entered }, context()))).toEqual(expected);
  });

  it('says it in words', () => {
    const words = (productId: string, content: OrderContent = maintenance()) =>
      compareBag(content, { ...bag, productId }, context()).findings[0]?.text;
    expect(words('sg0')).toBe('Same fluid, but no potassium: the order has 20 mmol/L. Take another bag.');
    expect(words('sg40')).toBe(
      'Twice the potassium: this bag has 40 mmol/L, the order has 20 mmol/L. Take another bag.',
    );
    const none = maintenance({}, {}, { fluid: fluidText('sg0') });
    expect(words('sg20', none)).toBe(
      'Same fluid, but with potassium 20 mmol/L: the order has none. Take this bag away.',
    );
    const forty = maintenance({}, {}, { fluid: fluidText('sg40') });
    expect(words('sg20', forty)).toMatch(/^Half the potassium/);
  });

  it('asks for the batch of a high-risk order', () => {
    const risky = maintenance({}, {}, { isHighRisk: true });
    expect(codes(compareBag(risky, { ...bag, batch: ' ' }, context()))).toEqual(['batch:missing']);
  });

  it('takes the expiry day by the hospital’s calendar', () => {
    // 23:30 UTC on 9 June is 10 June in London
    const late = context({ at: at('2026-06-09T23:30:00.000Z') });
    expect(codes(compareBag(maintenance(), { ...bag, expiry: '2026-06-09' }, late))).toEqual([
      'expiry:expired',
    ]);
  });
});

describe('pump', () => {
  it.each<[Partial<BedsideEntries['pump']>, string[]]>([
    [{}, []],
    [{ rate: '44.0' }, []],
    [{ rate: '440' }, ['rate:ten-times']],
    [{ rate: '4.4' }, ['rate:a-tenth']],
    [{ rate: '88' }, ['rate:double']],
    [{ rate: '22' }, ['rate:half']],
    [{ rate: '44.1' }, ['rate:differs']],
    [{ rate: '176', volume: '44' }, ['rate:swapped']],
    [{ rate: '' }, ['rate:empty']],
    [{ rate: '44,0' }, ['rate:comma']],
    [{ rate: '44.05' }, ['rate:too-many-decimals']],
    [{ volume: '0' }, ['volume:nought']],
    // 4 h × 44 mL/h, common practice
    [{ volume: '176.1' }, ['volume:too-much']],
    [{ volume: '1056' }, ['volume:too-much']],
    [{ rate: '440', volume: '' }, ['volume:empty', 'rate:ten-times']],
    [{ device: ' ' }, ['device:missing']],
  ])('%j', (entered, expected) => {
    expect(codes(comparePump(maintenance(), { ...pump, ...entered }, context(), 500))).toEqual(expected);
  });

  it('says what differs', () => {
    const words = (entered: Partial<BedsideEntries['pump']>) =>
      comparePump(maintenance(), { ...pump, ...entered }, context(), 500).findings[0]?.text;
    expect(words({ rate: '440' })).toBe('Ten times the order. Correct the pump, then type what it shows.');
    expect(words({ rate: '46' })).toBe(
      '2 mL/h above the order, which says 44 mL/h. Correct the pump, then type what it shows.',
    );
    expect(words({ volume: '500' })).toBe('Set at most 176 mL: 4 h of flow at 44 mL/h.');
  });

  it.each<[Partial<BedsideEntries['pump']>, string[]]>([
    [{ volume: '164', minutes: '10' }, []],
    [{ volume: '1640', minutes: '10' }, ['volume:ten-times']],
    [{ volume: '164', minutes: '20' }, ['minutes:double']],
    [{ volume: '164', minutes: '' }, ['minutes:empty']],
  ])('a bolus by hand: %j', (entered, expected) => {
    const byHand = { device: '', channel: '', rate: '', volume: '', minutes: '', ...entered };
    expect(codes(comparePump(bolus(), byHand, context(), 500))).toEqual(expected);
  });

  it('a bolus by pump has a rate: 164 mL in 10 min is 984 mL/h', () => {
    const order = bolus({ route: 'pump' }, { rateMlPerH: '984.0' });
    expect(codes(comparePump(order, { ...pump, rate: '984', volume: '164' }, context(), 500))).toEqual([]);
    expect(codes(comparePump(order, { ...pump, rate: '98.4', volume: '164' }, context(), 500))).toEqual([
      'rate:a-tenth',
    ]);
  });
});

describe('volume to be infused: the least of left, bag and hours of flow', () => {
  it.each([
    { infusedMl: 0, bag: 500, ml: 176, words: '4 h of flow at 44 mL/h' },
    { infusedMl: 0, bag: 100, ml: 100, words: 'the bag holds 100 mL' },
    { infusedMl: 1000, bag: 500, ml: 56, words: '56 mL of the order is left' },
    { infusedMl: 0, bag: null, ml: 176, words: '4 h of flow at 44 mL/h' },
    { infusedMl: 2000, bag: 500, ml: 0, words: '0 mL of the order is left' },
  ])('$infusedMl mL in, bag $bag: $ml', ({ infusedMl, bag: size, ml, words }) => {
    expect(volumeToInfuse(maintenance(), context({ infusedMl }), size)).toEqual({ ml, words });
  });
  it('counts two hours for a newborn', () => {
    const newborn = maintenance({}, {}, { child: { ...maintenance().child, bornOn: '2026-06-05' } });
    expect(volumeToInfuse(newborn, context(), 500)).toEqual({ ml: 88, words: '2 h of flow at 44 mL/h' });
  });
});

describe('line', () => {
  it.each<[Partial<BedsideEntries['line']>, string[]]>([
    [{}, []],
    [{ lineClass: 'central' }, ['lineClass:another-line']],
    [{ lineClass: '' }, ['lineClass:missing']],
    [{ site: '' }, ['site:missing']],
    [{ traced: false }, ['traced:not-done']],
    [{ clampOpen: false, siteLooksWell: false }, ['clampOpen:not-done', 'siteLooksWell:not-done']],
  ])('%j', (entered, expected) => {
    expect(codes(compareLine(maintenance(), { ...line, ...entered }))).toEqual(expected);
  });
});

it('holds all four against the order at once', () => {
  const entries = { child, bag, pump, line };
  expect(compareAll(maintenance(), entries, context()).map(({ agrees }) => agrees)).toEqual([
    true,
    true,
    true,
    true,
  ]);
  const wrong = compareAll(maintenance(), { ...entries, pump: { ...pump, rate: '440' } }, context());
  expect(wrong.filter(({ agrees }) => !agrees).map(({ step }) => step)).toEqual(['pump']);
});
