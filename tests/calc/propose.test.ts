import { propose } from '@shared/calc/propose';
import type { ChildFacts, Fraction, WorkOutRequest } from '@shared/calc/types';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { describe, expect, it } from 'vitest';
import { ago, newborn, request } from './make-request';

const forMaintenance = (asked: WorkOutRequest) => propose('maintenance', asked, DEFAULT_RULEBOOK);
const forBolus = (asked: WorkOutRequest) => propose('bolus', asked, DEFAULT_RULEBOOK);

describe('what is proposed for maintenance', () => {
  it.each<[string, Partial<ChildFacts>, Fraction | undefined, string]>([
    ['no flag', {}, 'full', 'Holliday & Segar 1957'],
    ['raised ADH', { flags: ['raised-adh' as const] }, 'two-thirds', 'Royal Children’s Hospital'],
    [
      'kidney disease',
      { flags: ['renal' as const, 'raised-adh' as const] },
      undefined,
      'asked for; common practice',
    ],
  ])('%s: %s', (_, child, fraction) => {
    const proposal = forMaintenance(request({ child }));
    expect(proposal).toMatchObject({ method: 'bands-daily', hours: 24 });
    expect('fraction' in proposal ? proposal.fraction : undefined).toBe(fraction);
  });

  it('takes the plan on the chart first', () => {
    const plan = { kind: 'fraction' as const, fraction: 'half' as const };
    expect(forMaintenance(request({ plan, child: { flags: ['renal'] } }))).toMatchObject({
      fraction: 'half',
    });
  });

  it.each([
    [10, 50],
    [30, 70],
    [60, 80],
    [80, 100],
    [500, 120],
  ])('a newborn of %s h gets the lower end: %s mL/kg/24 h (NICE NG29 1.4)', (h, low) => {
    const asked = request({ kg: 3.5, child: newborn(h) });
    expect(forMaintenance(asked)).toMatchObject({ method: 'newborn', newbornMlPerKgPerDay: low });
  });

  it('needs the time of birth, and halves the hours on an old weight', () => {
    expect(forMaintenance(request({ kg: 3.5, child: { bornOn: '2026-06-08' } }))).toMatchObject({
      ok: false,
      code: 'birth-time-needed',
    });
    expect(forMaintenance(request({ lastMeasuredAt: ago(169) }))).toMatchObject({ hours: 12 });
  });
});

describe('what is proposed for a bolus (NICE NG29 1.3)', () => {
  it.each([
    ['a child', 20, {}, 10],
    ['a newborn', 3.5, newborn(60), 10],
    ['with heart disease', 20, { flags: ['cardiac' as const] }, 5],
    ['with low albumin', 20, { flags: ['low-albumin' as const] }, 5],
  ])('%s: %s kg', (_, kg, child, mlPerKg) => {
    const proposal = forBolus(request({ kg, child }));
    expect(proposal).toMatchObject({ mlPerKg, overMinutes: 10 });
    expect(proposal).not.toHaveProperty('volumeMl');
  });

  it('is the brim by volume where the dose would pass it', () => {
    expect(forBolus(request({ kg: 62, child: { bornOn: '2011-11-02' } }))).toMatchObject({
      mlPerKg: 10,
      volumeMl: 500,
    });
    expect(forBolus(request({ kg: 50, child: { bornOn: '2011-11-02' } }))).not.toHaveProperty('volumeMl');
  });

  it('is refused for a child out of scope', () => {
    expect(forBolus(request({ child: { bornOn: '2009-01-01' } }))).toMatchObject({
      ok: false,
      code: 'too-old',
    });
  });
});
