import type { Flag, FluidComposition, RunningFluid, WorkOutRequest } from '@shared/calc/types';
import { kilograms, millilitresPerHour, milliosmolesPerLitre, mmolPerLitre } from '@shared/units';
import { describe, expect, it } from 'vitest';
import {
  ago,
  finding,
  fluid,
  maintenance,
  newborn,
  request,
  SALINE,
  strengthOf,
  USUAL,
  USUAL_20,
  USUAL_40,
} from './make-request';

type Change = Parameters<typeof request>[0];
const withFluid = (name: string, change: Change = {}, extra = {}) =>
  request({ ...change, order: maintenance({ fluid: fluid(name), ...extra }) });
const changed = (change: Partial<FluidComposition>, asked: Change = {}) =>
  request({ ...asked, order: maintenance({ fluid: { ...fluid(USUAL), ...change } }) });
const typed = (rate: number) => ({ typedRate: millilitresPerHour(rate) });
const sodium = (value: number, h = 4): Partial<WorkOutRequest> => ({
  results: { sodium: { value, at: ago(h) } },
});
const potassium = (value: number, h = 4): Partial<WorkOutRequest> => ({
  results: { potassium: { value, at: ago(h) } },
});
const HALF = 'Sodium chloride 0.45% + glucose 5%';

describe('hypotonic fluid after 28 days (CPS 2013, NICE NG29 1.4)', () => {
  it.each([
    ['sodium 138 of today', sodium(138), {}, 'senior'],
    ['sodium 137', sodium(137), {}, 'brim'],
    ['sodium of 24 h ago', sodium(140, 24), {}, 'senior'],
    ['an older sodium', sodium(140, 24.1), {}, 'brim'],
    ['no sodium', { results: {} }, {}, 'brim'],
    ['raised ADH', sodium(140), { flags: ['raised-adh' as const] }, 'brim'],
    ['raised pressure in the head', sodium(140), { flags: ['raised-icp' as const] }, 'brim'],
  ])('with %s: %s', (_, results, child, expected) => {
    expect(strengthOf(withFluid(HALF, { ...results, child }), 'hypotonic')).toBe(expected);
  });

  it.each([
    [130, 'none', 'isotonic from 130, shelf property'],
    [129, 'senior', ''],
    [77, 'senior', ''],
    [76, 'brim', 'below 77, NPSA 2007/22'],
    [154, 'none', ''],
    [155, 'none', 'hypertonic is its own finding'],
  ])('%s mmol/L of sodium: %s %s', (mmol, expected) => {
    expect(strengthOf(changed({ sodium: mmolPerLitre(mmol) }), 'hypotonic')).toBe(expected);
    expect(strengthOf(changed({ sodium: mmolPerLitre(mmol) }), 'hypertonic')).toBe(
      mmol > 154 ? 'brim' : 'none',
    );
  });
});

describe('the fluid of a newborn', () => {
  const at = (h: number, name: string) =>
    withFluid(name, { kg: 3.5, child: newborn(h) }, { method: 'newborn' });
  it.each([
    [10, 'Glucose 10%', 'none', 'none', 'glucose 10% without sodium, RCH'],
    [10, 'Sodium chloride 0.18% + glucose 10%', 'caution', 'none', 'sodium before 48 h'],
    [47.9, 'Glucose 10%', 'none', 'none', ''],
    [48, 'Glucose 10%', 'caution', 'none', 'from 48 h with sodium 30 to 77'],
    [48, 'Sodium chloride 0.18% + glucose 10%', 'none', 'none', ''],
    [100, 'Sodium chloride 0.45% + glucose 10%', 'none', 'none', ''],
    [100, HALF, 'caution', 'none', 'glucose 5%'],
    [191.9, 'Glucose 10%', 'caution', 'none', 'no isotonic asked before 8 days'],
    [192, 'Sodium chloride 0.18% + glucose 10%', 'none', 'caution', 'from 8 days a caution, never a brim'],
    [192, USUAL, 'none', 'none', ''],
    [671, 'Glucose 10%', 'none', 'caution', 'to 27 days'],
  ])('at %s h %s: usual %s, hypotonic %s (%s)', (h, name, usual, hypotonic) => {
    expect(strengthOf(at(h, name), 'newborn-fluid')).toBe(usual);
    expect(strengthOf(at(h, name), 'hypotonic')).toBe(hypotonic);
  });

  it('becomes a brim on the 28th day', () => {
    const asked = withFluid('Glucose 10%', { kg: 4, child: newborn(672) });
    expect(strengthOf(asked, 'hypotonic')).toBe('brim');
  });

  it('carries no potassium before 24 h of age and urine (RCH)', () => {
    const asked = (h: number, urine: boolean) =>
      strengthOf(
        withFluid(
          USUAL_20,
          {
            kg: 3.5,
            child: newborn(h),
            results: { potassium: { value: 4, at: ago(1) }, ...(urine ? { urinePassedAt: ago(2) } : {}) },
          },
          { method: 'newborn' },
        ),
        'potassium-newborn',
      );
    expect([asked(23.9, true), asked(24, true), asked(60, false)]).toEqual(['brim', 'none', 'brim']);
  });
});

describe('potassium', () => {
  it('is too strong for a peripheral line above 40 mmol/L (MSF, NHS Highland)', () => {
    const at = (mmol: number, line: WorkOutRequest['line']) =>
      strengthOf(changed({ potassium: mmolPerLitre(mmol) }, { line }), 'potassium-concentration');
    expect([at(40, 'peripheral'), at(41, 'peripheral'), at(41, 'intraosseous'), at(41, 'central')]).toEqual([
      'none',
      'brim',
      'brim',
      'none',
    ]);
  });

  it.each<[WorkOutRequest['line'], number, number, string, string]>([
    ['peripheral', 10, 41.7, 'met', '0.167 mmol/kg/h'],
    ['peripheral', 10, 50, 'met', '0.2 mmol/kg/h may be met: 10 kg, 2 mmol/h'],
    ['peripheral', 10, 50.1, 'brim', 'above 0.2 mmol/kg/h'],
    ['central', 10, 50.1, 'senior', 'high dependency and ECG'],
    ['central', 10, 125, 'senior', '0.5 mmol/kg/h, PCH'],
    ['central', 10, 126, 'brim', 'above 0.5 mmol/kg/h'],
    ['peripheral', 70, 250, 'met', '10 mmol/h'],
    ['peripheral', 70, 251, 'brim', 'above 10 mmol/h'],
    ['central', 70, 500, 'senior', '20 mmol/h, from memory'],
    ['central', 70, 501, 'brim', 'above 20 mmol/h'],
  ])('40 mmol/L by a %s line, %s kg at %s mL/h: %s (%s)', (line, kg, rate, expected) => {
    expect(strengthOf(withFluid(USUAL_40, { line, kg }, typed(rate)), 'potassium-rate')).toBe(expected);
  });

  it('adds up over all fluids and offers what is left', () => {
    const running: RunningFluid[] = [{ code: 'BL-1', rate: millilitresPerHour(30), fluid: fluid(USUAL_40) }];
    const asked = withFluid(USUAL_40, { kg: 10, intake: { bolusesLast24h: [], running } }, typed(30));
    expect(finding(asked, 'potassium-rate')).toMatchObject({
      strength: 'brim',
      value: 2.4,
      offer: { value: '20' },
    });
  });

  it.each([
    [potassium(5.5), {}, 'met', 'none'],
    [potassium(5.6), {}, 'senior', 'none'],
    [potassium(6), {}, 'senior', 'none'],
    [potassium(6.1), {}, 'brim', 'none'],
    [potassium(6.1, 100), {}, 'brim', 'none'],
    [potassium(4, 24), {}, 'met', 'none'],
    [potassium(4, 24.1), {}, 'none', 'caution'],
    [{ results: {} }, {}, 'none', 'caution'],
    [{ results: {} }, { flags: ['renal' as const] }, 'none', 'senior'],
  ])(
    'is withheld by results %#: blood %s, unknown %s (RCH; strengths ours)',
    (results, child, serum, unknown) => {
      const asked = withFluid(USUAL_20, { ...results, child });
      expect(strengthOf(asked, 'potassium-serum')).toBe(serum);
      expect(strengthOf(asked, 'potassium-unknown')).toBe(unknown);
    },
  );

  it('of a balanced fluid is no potassium bag; a high result is still said', () => {
    const asked = withFluid('Compound sodium lactate', potassium(6.5));
    expect(strengthOf(asked, 'potassium-serum')).toBe('none');
    expect(strengthOf(asked, 'potassium-balanced')).toBe('caution');
  });
});

describe('glucose rate to 2 years (Koletzko)', () => {
  const TEN = 'Sodium chloride 0.9% + glucose 10%';
  const flags = ['nil-by-mouth' as const];
  it.each([
    // 10 kg, glucose 10%: 1 mL/h is 0.16667 mg/kg/min
    ['2025-06-10', 48, [], 'none', '8.0 mg/kg/min'],
    ['2025-06-10', 48.1, [], 'caution', 'above 8'],
    ['2025-06-10', 78, [], 'caution', '13 may be met'],
    ['2025-06-10', 78.1, [], 'brim', 'above 13'],
    ['2024-06-11', 78.1, [], 'brim', 'the day before 2 years'],
    ['2024-06-10', 78.1, [], 'none', 'no rate line from 2 years'],
  ])('born %s at %s mL/h %s: %s (%s)', (bornOn, rate, _flags, expected) => {
    const asked = withFluid(TEN, { kg: 10, child: { bornOn } }, typed(rate));
    expect(strengthOf(asked, 'glucose-rate')).toBe(expected);
  });

  it('is too little only when nil by mouth', () => {
    const at = (rate: number, child: object) =>
      strengthOf(
        withFluid(TEN, { kg: 10, child: { bornOn: '2025-06-10', ...child } }, typed(rate)),
        'glucose-low',
      );
    expect([at(11.9, {}), at(11.9, { flags }), at(12, { flags })]).toEqual(['none', 'caution', 'none']);
  });

  it.each([
    [5.4, 'glucose-low', 'none', '3.0 mg/kg/min'],
    [5.3, 'glucose-low', 'caution', 'below 3'],
    [21.6, 'glucose-rate', 'none', '12.0'],
    [21.7, 'glucose-rate', 'caution', 'above 12'],
    [23.4, 'glucose-rate', 'caution', '13.0 may be met'],
    [23.5, 'glucose-rate', 'brim', 'above 13'],
  ])('a newborn of 3 kg at %s mL/h of 10%%, %s: %s (%s)', (rate, code, expected) => {
    const asked = withFluid(
      'Glucose 10%',
      { kg: 3, child: { ...newborn(100), flags } },
      { ...typed(rate), method: 'newborn' },
    );
    expect(strengthOf(asked, code)).toBe(expected);
  });

  it('by a peripheral line is at most 12.5% (Leeds)', () => {
    const at = (g: number, line: WorkOutRequest['line']) =>
      strengthOf(changed({ glucoseGPerL: g }, { line }), 'glucose-concentration');
    expect([at(125, 'peripheral'), at(126, 'peripheral'), at(126, 'central')]).toEqual([
      'none',
      'brim',
      'none',
    ]);
  });

  it.each<[string, Flag[], string, string, string, string]>([
    ['2025-06-11', [], SALINE, 'caution', 'none', 'the day before the first birthday'],
    ['2025-06-10', [], SALINE, 'none', 'none', ''],
    ['2020-01-01', ['metabolic'], SALINE, 'caution', 'none', 'metabolic flag'],
    ['2020-01-01', ['ketogenic-diet'], USUAL, 'none', 'senior', 'ketogenic diet'],
    ['2020-01-01', ['ketogenic-diet'], SALINE, 'none', 'none', ''],
  ])('born %s, %s, %s: none %s, ketogenic %s (%s; common practice)', (bornOn, list, name, none, keto) => {
    const asked = withFluid(name, { kg: 10, child: { bornOn, flags: list } });
    expect(strengthOf(asked, 'glucose-none')).toBe(none);
    expect(strengthOf(asked, 'glucose-ketogenic')).toBe(keto);
  });
});

describe('osmolarity by a peripheral line (ASPEN 2014)', () => {
  it.each([
    [900, 'peripheral', 'none'],
    [901, 'peripheral', 'senior'],
    [943, 'peripheral', 'senior'],
    [1000, 'peripheral', 'senior'],
    [1001, 'peripheral', 'brim'],
    [1001, 'central', 'none'],
  ] as const)('%s mOsm/L, %s: %s', (osmolarity, line, expected) => {
    expect(
      strengthOf(changed({ osmolarity: milliosmolesPerLitre(osmolarity) }, { line }), 'osmolarity'),
    ).toBe(expected);
  });
});

describe('other rules of the fluid', () => {
  it('keeps calcium from ceftriaxone: brim to 28 days, then a caution (FDA)', () => {
    const flags = ['ceftriaxone' as const];
    const at = (h: number, method: 'newborn' | 'bands-daily') =>
      strengthOf(
        withFluid('Ringer’s lactate', { kg: 4, child: { ...newborn(h), flags } }, { method }),
        'calcium-ceftriaxone',
      );
    expect([at(600, 'newborn'), at(28.9 * 24, 'bands-daily'), at(29 * 24, 'bands-daily')]).toEqual([
      'brim',
      'brim',
      'caution',
    ]);
    expect(strengthOf(withFluid('Ringer’s lactate'), 'calcium-ceftriaxone')).toBe('none');
    expect(strengthOf(withFluid(SALINE, { child: { flags } }), 'calcium-ceftriaxone')).toBe('none');
  });

  it.each([
    [134, 'caution'],
    [135, 'none'],
    [145, 'none'],
    [146, 'caution'],
    [130, 'caution'],
    [129, 'senior'],
    [155, 'caution'],
    [156, 'senior'],
  ])('blood sodium %s: %s (NICE NG29)', (value, expected) => {
    expect(strengthOf(request(sodium(value)), 'blood-sodium')).toBe(expected);
  });

  it('holds a product to what the shelf permits', () => {
    const narrow = {
      permittedKinds: ['bolus' as const],
      permittedLines: ['central' as const],
      newbornOnly: true,
    };
    const asked = changed(narrow);
    expect(['fluid-kind', 'fluid-line', 'fluid-newborn'].map((code) => strengthOf(asked, code))).toEqual([
      'brim',
      'brim',
      'brim',
    ]);
    expect(strengthOf(withFluid('Sodium chloride 2.7%'), 'fluid-kind')).toBe('brim');
  });

  it('sends plain maintenance in malnutrition and ketoacidosis to a senior', () => {
    expect(strengthOf(request({ child: { flags: ['severe-malnutrition'] } }), 'malnutrition-fluid')).toBe(
      'senior',
    );
    expect(strengthOf(request({ child: { flags: ['dka'] } }), 'dka-fluid')).toBe('senior');
  });

  it('takes the weight the order is dosed on', () => {
    const asked = {
      ...withFluid(USUAL_20),
      weight: { kg: kilograms(8), method: 'scales' as const, at: ago(1) },
    };
    expect(finding(asked, 'potassium-rate')).toMatchObject({ limit: 1.6 });
  });
});
