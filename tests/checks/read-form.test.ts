import { checkEntries, isShortForm } from '@shared/checks/entries';
import { emptyCheckForm, type CheckForm, type CheckFormField } from '@shared/checks/form';
import { readCheckForm } from '@shared/checks/read-form';
import { hangTogether, workOutOwn } from '@shared/checks/own';
import { describe, expect, it } from 'vitest';
import { bolusForm, context, maintenanceForm } from './support/edie';

const faults = (form: CheckForm, kind: 'maintenance' | 'bolus', shortForm = false) => {
  const reading = readCheckForm(form, { kind, shortForm });
  return reading.ok ? [] : reading.errors.map(({ field }) => field);
};

describe('reading a checker’s own figures', () => {
  it('asks for every entry of the kind and fills nothing in', () => {
    const asked = checkEntries('maintenance', false).filter(({ askedWhen }) => !askedWhen);
    expect(faults(emptyCheckForm(), 'maintenance')).toEqual(asked.map(({ field }) => field));
  });

  it('asks the short form of an emergency bolus for child, weight, fluid, volume and time only', () => {
    expect(isShortForm('bolus', 'emergency')).toBe(true);
    expect(isShortForm('bolus', 'urgent')).toBe(false);
    expect(isShortForm('maintenance', 'emergency')).toBe(false);
    expect(checkEntries('bolus', true).map(({ field }) => field)).toEqual([
      'initials',
      'sex',
      'age',
      'ageUnit',
      'weightKg',
      'base',
      'volumeMl',
      'overMinutes',
    ]);
    expect(faults(bolusForm(), 'bolus', true)).toEqual([]);
    expect(faults(bolusForm(), 'bolus', false)).toEqual(['weightSource', 'workedOutBy']);
  });

  it('asks for a temperature with the WHO method and for the day’s volume with the newborn’s', () => {
    expect(faults(maintenanceForm({ method: 'who' }), 'maintenance')).toEqual(['temperatureC']);
    expect(faults(maintenanceForm({ method: 'newborn' }), 'maintenance')).toEqual(['newbornMlPerKgPerDay']);
  });

  it.each<[CheckFormField, string]>([
    ['weightKg', '16,4'],
    ['weightKg', '0'],
    ['weightKg', '1000'],
    ['weightKg', '16.4 kg'],
    ['weightKg', '１６'],
    ['weightKg', '16.4444'],
    ['rate', '4.4e1'],
    ['rate', '+44'],
    ['rate', '-44'],
    ['volumeMl', '1,056'],
    ['hours', '25'],
    ['feedsMl', ''],
    ['fraction', '66%'],
    ['method', 'toString'],
    ['sex', 'f'],
    ['addedPotassium', 'twenty'],
    ['initials', 'ABCDEFGHIJKLM'],
    ['workedOutBy', ''],
  ])('refuses %s %j and never repairs it', (field, typed) => {
    expect(faults(maintenanceForm({ [field]: typed }), 'maintenance')).toEqual([field]);
  });

  it('trims spaces', () => {
    expect(faults(maintenanceForm({ weightKg: ' 16.4 ', initials: ' EH ' }), 'maintenance')).toEqual([]);
  });
});

describe('what follows from the checker’s own entries', () => {
  const asked = { kind: 'maintenance', shortForm: false } as const;

  it('is worked out from theirs alone, whatever they typed as rate', () => {
    const own = workOutOwn(maintenanceForm({ rate: '', volumeMl: '', workedOutBy: '' }), context(), asked);
    // 1320 × 0.8 ÷ 24
    expect(own).toMatchObject({ ok: true, figures: { rate: 44, volume: 1056 } });
  });
  it('names the entry that is missing', () => {
    expect(workOutOwn(maintenanceForm({ weightKg: '' }), context(), asked)).toMatchObject({
      ok: false,
      field: 'weightKg',
    });
  });
  it.each([
    { form: {}, agrees: true, words: 'Your own figures hang together. 44 mL/h × 24 h = 1056 mL.' },
    {
      form: { rate: '55', volumeMl: '1320' },
      agrees: false,
      words: 'Your entries give 44 mL/h, and your rate is 55 mL/h.',
    },
    {
      form: { volumeMl: '1320' },
      agrees: false,
      words: '44 mL/h × 24 h = 1056 mL, and your volume is 1320 mL.',
    },
  ])('says whether they hang together: $words', ({ form, agrees, words }) => {
    const reading = readCheckForm(maintenanceForm(form), asked);
    if (!reading.ok) throw new Error('unread');
    expect(hangTogether(reading.entries, context())).toEqual({ agrees, words });
  });
});
