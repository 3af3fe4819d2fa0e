import { workOut } from '@shared/calc/work-out';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { millilitres } from '@shared/units';
import { describe, expect, it } from 'vitest';
import { bolus, maintenance, newborn, refusal, request, worked } from './make-request';

describe('who is in scope', () => {
  it.each([
    ['2010-06-11', 'worked out', 'the day before the 16th birthday'],
    ['2010-06-10', 'too-old', 'a birthday is reached on its day'],
    ['2026-06-11', 'born-in-future', 'born tomorrow'],
  ])('born %s: %s (%s)', (bornOn, expected) => {
    expect(refusal(request({ child: { bornOn }, order: bolus() }))).toBe(expected);
  });

  it.each<[number | undefined, number | undefined, string, string, string]>([
    [36, 6, '2026-05-20', 'preterm', 'born at 36+6, now 39+6'],
    [36, 6, '2026-05-19', 'worked out', 'born at 36+6, now 40+0'],
    [37, 0, '2026-06-08', 'worked out', 'born at term'],
    [undefined, undefined, '2026-03-12', 'gestation-unknown', '90 days old, gestation not recorded'],
    [undefined, undefined, '2026-03-11', 'worked out', '91 days old, 13 weeks'],
  ])('gestation %s+%s, born %s: %s (%s)', (gestationWeeks, gestationDays, bornOn, expected) => {
    const isNewborn = bornOn > '2026-05-13';
    const bornAt = isNewborn
      ? newborn((Date.UTC(2026, 5, 10, 9, 42) - Date.parse(bornOn)) / 3_600_000).bornAt
      : undefined;
    const order = maintenance({ method: isNewborn ? 'newborn' : 'bands-daily' });
    expect(
      refusal(request({ kg: 3.5, child: { bornOn, bornAt, gestationWeeks, gestationDays }, order })),
    ).toBe(expected);
  });

  it('never delays an emergency for a gestation', () => {
    const child = { ...newborn(60), gestationWeeks: undefined };
    expect(refusal(request({ kg: 3.5, child, order: bolus() }))).toBe('worked out');
  });
});

describe('what cannot be worked out', () => {
  it('is a newborn without the time of birth', () => {
    const child = { bornOn: '2026-06-01' };
    expect(refusal(request({ kg: 3.5, child, order: maintenance({ method: 'newborn' }) }))).toBe(
      'birth-time-needed',
    );
  });

  it.each([
    [671.99, 'bands-daily', 'method-not-for-age'],
    [671.99, 'newborn', 'worked out'],
    [672, 'newborn', 'method-not-for-age'],
    [672, 'bands-daily', 'worked out'],
  ] as const)('at %s h the method %s: %s', (h, method, expected) => {
    expect(refusal(request({ kg: 4, child: newborn(h), order: maintenance({ method }) }))).toBe(expected);
  });

  it('is a temperature no child has', () => {
    const at = (temperatureC: number) =>
      refusal(request({ order: maintenance({ method: 'who', temperatureC }) }));
    expect([29.9, 30, 43, 43.1].map(at)).toEqual([
      'temperature-range',
      'worked out',
      'worked out',
      'temperature-range',
    ]);
  });

  it('is an amount that feeds already cover, unless a rate keeps the vein open', () => {
    const covered = { feeds: millilitres(1320) };
    expect(refusal(request({ order: maintenance(covered) }))).toBe('nothing-left');
    const open = worked(request({ order: maintenance({ ...covered, typedRate: 3 as never }) }));
    expect(open.figures).toMatchObject({ rate: 3, workedOutRate: 0, dayMl: 0 });
    expect(open.limits.find((limit) => limit.code === 'above-method')).toBeUndefined();
  });

  it('is a kind on which the rulebook is silent', () => {
    const { bolus: _, ...sections } = DEFAULT_RULEBOOK.sections;
    const silent = { number: 7, sections };
    const outcome = workOut(request({ order: bolus() }), silent);
    expect(outcome).toMatchObject({ ok: false, code: 'rulebook-silent' });
  });

  it('is a section that lacks an entry', () => {
    const section = DEFAULT_RULEBOOK.sections.potassium!;
    const { peripheralMost: _, ...entries } = section.entries;
    const sections = { ...DEFAULT_RULEBOOK.sections, potassium: { ...section, entries } };
    expect(workOut(request(), { number: 8, sections })).toMatchObject({ ok: false, code: 'rulebook-silent' });
  });
});
