import { deferredMatters, reasonsOwed, seniorMatters } from '@shared/calc/findings';
import { numberWords } from '@shared/calc/number-words';
import { isHighRisk } from '@shared/calc/risk';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { millilitres, millilitresPerKg, minutes } from '@shared/units';
import { describe, expect, it } from 'vitest';
import { ago, bolus, fluid, maintenance, request, SALINE, USUAL_20, USUAL_40, worked } from './make-request';

/** A girl of 16.4 kg, 70 mL of drugs, saline with glucose and potassium 20: every figure worked out by a separate hand. */
const example = request({
  child: { flags: ['raised-adh'] },
  order: maintenance({ drugs: millilitres(70), fluid: fluid(USUAL_20) }),
});

describe('what a maintenance order shows', () => {
  const out = worked(example);

  it('prints its workings line by line', () => {
    expect(
      out.steps.map(({ label, working, result, unit }) => `${label}: ${working} = ${result} ${unit}`),
    ).toEqual([
      'first 10 kg: 10 × 100 = 1000 mL',
      'next 6.4 kg: 6.4 × 50 = 320 mL',
      'in full, 24 h: 1000 + 320 = 1320 mL',
      'fraction: 1320 × 100% = 1320 mL',
      'drug volumes: 1320 − 70 = 1250 mL',
      'per hour: 1250 ÷ 24 = 52.08 mL/h',
      'on the pump: nearest 0.1 = 52.1 mL/h',
    ]);
    expect(out.steps[0]?.source).toBe('Holliday & Segar 1957');
  });

  it('says what it gives', () => {
    expect(Object.fromEntries(out.gives.map(({ code, text, unit }) => [code, `${text} ${unit}`]))).toEqual({
      'ml-per-kg-per-hour': '3.18 mL/kg/h',
      'percent-of-full': '94.7 %',
      glucose: '2.65 mg/kg/min',
      sodium: '11.7 mmol/kg/day',
      potassium: '1.5 mmol/kg/day',
      energy: '15.2 kcal/kg/day',
      chloride: '13.3 mmol/kg/day',
      'ml-per-kg-per-day': '76.2 mL/kg/day',
      osmolarity: '625 mOsm/L',
    });
  });

  it('draws bands, brim and what comes otherwise', () => {
    expect(out.gauge).toEqual({
      orderMl: 1250,
      brimMl: 2000,
      brimNote: 'in 24 h',
      bands: [
        { label: 'first 10 kg', ml: 1000, fullMl: 1000 },
        { label: 'next 6.4 kg', ml: 320, fullMl: 320 },
      ],
      ghosts: [{ label: 'as drugs', ml: 70 }],
    });
    const less = worked(request({ order: maintenance({ fraction: 'four-fifths' }) }));
    expect(less.gauge.ghosts).toEqual([{ label: 'held back', ml: 264 }]);
    expect(out.otherBrims.map(({ code, text }) => `${code}: ${text}`)).toEqual([
      'potassium-rate: 0.06 of 0.2 mmol/kg/h',
      'order-life: 24 of 24 h',
    ]);
  });

  it('reads back in one sentence, units in full, the rate in figures and words', () => {
    expect(out.readBack).toBe(
      'Maintenance for a weight of 16.4 kilograms: sodium chloride 0.9% + glucose 5% + potassium chloride 20 ' +
        'millimoles per litre by a peripheral line at 52.1 millilitres per hour (fifty-two point one), ' +
        '1250 millilitres over 24 hours.',
    );
  });

  it('says that it feeds nobody', () => {
    expect(out.limits.at(-1)).toMatchObject({ code: 'not-a-feed', strength: 'information', met: true });
  });

  it('shows a typed rate beside the worked-out one', () => {
    const typed = worked(request({ order: maintenance({ typedRate: 40 as never }) }));
    expect(typed.steps.slice(-2).map(({ label, working, result }) => [label, working, result])).toEqual([
      ['worked out', 'nearest 0.1', '55'],
      ['on the pump', 'typed', '40'],
    ]);
  });

  it('says when rounding went down', () => {
    const child = { sex: 'male' as const, bornOn: '2012-01-01' };
    const held = worked(request({ kg: 75, child, order: maintenance({ drugs: millilitres(110) }) }));
    expect(held.steps.at(-1)).toMatchObject({
      working: 'one step down, rounding up would pass a brim',
      result: '99.5',
    });
  });
});

describe('what a bolus shows', () => {
  const asked = request({
    kg: 62,
    child: { bornOn: '2011-11-02' },
    order: bolus({ over: minutes(15), route: 'pump' }),
  });

  it('gives by weight, pace and sodium', () => {
    expect(Object.fromEntries(worked(asked).gives.map(({ code, text }) => [code, text]))).toMatchObject({
      'ml-per-kg': '10',
      'ml-per-minute': '41.3',
      sodium: '1.54',
      'total-24h': '10',
    });
  });

  it('reads back volume, time and way', () => {
    expect(worked(request({ kg: 20, order: bolus() })).readBack).toBe(
      'Bolus for a weight of 20 kilograms: 200 millilitres (two hundred) of sodium chloride 0.9% by a peripheral line ' +
        'over 10 minutes, by hand with a syringe. Then look again.',
    );
    expect(worked(asked).readBack).toContain(
      '2480 millilitres per hour (two thousand four hundred and eighty)',
    );
  });

  it('shows a lowered volume as a line of its own', () => {
    const { steps } = worked(request({ kg: 3.36, order: bolus() }));
    expect(steps[0]).toMatchObject({ working: '3.36 × 10', result: '33.6' });
    expect(steps[1]).toMatchObject({ working: 'rounded down', result: '33' });
  });
});

describe('numbers in words', () => {
  it.each([
    [44, 'forty-four'],
    [52.1, 'fifty-two point one'],
    [104, 'one hundred and four'],
    [0.5, 'zero point five'],
    [70.05, 'seventy point zero five'],
    [19, 'nineteen'],
    [20, 'twenty'],
    [100, 'one hundred'],
    [999, 'nine hundred and ninety-nine'],
    [1000, 'one thousand'],
    [1016, 'one thousand and sixteen'],
    [2480, 'two thousand four hundred and eighty'],
    [12_345, 'twelve thousand three hundred and forty-five'],
  ])('%s is "%s"', (value, words) => expect(numberWords(value)).toBe(words));

  it('has none for a million', () => expect(() => numberWords(1e6)).toThrow(RangeError));
});

describe('what must be settled before signing', () => {
  it('names reasons and senior matters, those of an emergency apart', () => {
    const late = request({ child: { flags: ['raised-adh'] }, lastMeasuredAt: ago(200) });
    expect(reasonsOwed(worked(late).limits).map(({ code }) => code)).toEqual(['adh-fraction']);
    expect(seniorMatters(worked(late).limits).map(({ code }) => code)).toEqual(['weight-old']);
    const rescue = worked({ ...late, order: bolus() }).limits;
    expect(seniorMatters(rescue)).toEqual([]);
    expect(deferredMatters(rescue).map(({ code }) => code)).toEqual(['weight-old']);
  });
});

describe('high risk (ours)', () => {
  it.each([
    [SALINE, false],
    [USUAL_20, false],
    [USUAL_40, true],
    ['Sodium chloride 3%', true],
  ])('%s: %s', (name, expected) => expect(isHighRisk(fluid(name), DEFAULT_RULEBOOK)).toBe(expected));
});

it('a volume typed by weight or by volume is one and the same', () => {
  const byWeight = worked(
    request({ kg: 20, order: bolus({ dose: { by: 'weight', mlPerKg: millilitresPerKg(10) } }) }),
  );
  const byVolume = worked(
    request({ kg: 20, order: bolus({ dose: { by: 'volume', volume: millilitres(200) } }) }),
  );
  expect(byVolume.figures).toEqual(byWeight.figures);
});
