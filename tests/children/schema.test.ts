import { FLAGS } from '@shared/calc/types';
import { FLAG_WORDS, flagLabels } from '@shared/children/flags';
import { allergyStatus, childFields, readBirth, type ChildFields } from '@shared/children/schema';
import { parseInstant } from '@shared/time';
import { describe, expect, it } from 'vitest';

const ZONE = 'Europe/London';
const NOW = parseInstant('2026-06-10T12:00:00Z')!;

const child: ChildFields = {
  number: 'SM-10442',
  surname: 'Ferndale',
  given: 'Zoë',
  bornOn: '2022-03-14',
  bornAt: null,
  sex: null,
  gestationWeeks: null,
  gestationDays: null,
  allergies: 'None known',
  flags: [],
};

describe('childFields', () => {
  it('takes a child with nothing optional', () => {
    expect(childFields.parse(child)).toEqual(child);
  });

  it('trims, writes NFC and puts flags in one order, each once', () => {
    const read = childFields.parse({
      ...child,
      given: '  Zoe\u0308 ',
      flags: ['ceftriaxone', 'raised-adh', 'ceftriaxone'],
    });
    expect(read.given).toBe('Zoë');
    expect(read.flags).toEqual(['raised-adh', 'ceftriaxone']);
  });

  it.each<[string, Record<string, unknown>]>([
    ['no number', { number: ' ' }],
    ['a number that ends in a stroke', { number: 'SM 10442/' }],
    ['no surname', { surname: '' }],
    ['a line break in a name', { given: 'Zoë\nX' }],
    ['a turned reading direction', { surname: 'Fern\u202edale' }],
    ['a day that is none', { bornOn: '2022-02-30' }],
    ['an empty date', { bornOn: '' }],
    ['a sex we do not know', { sex: 'x' }],
    ['an absent sex instead of a null', { sex: undefined }],
    ['a gestation of 21 weeks', { gestationWeeks: 21 }],
    ['a gestation of 45 weeks', { gestationWeeks: 45 }],
    ['a broken week', { gestationWeeks: 39.5 }],
    ['a gestation as text', { gestationWeeks: '39' }],
    ['7 days', { gestationDays: 7 }],
    ['silence about allergies', { allergies: '' }],
    ['an unknown flag', { flags: ['sleepy'] }],
  ])('refuses %s', (_name, change) => {
    expect(childFields.safeParse({ ...child, ...change }).success).toBe(false);
  });
});

describe('readBirth', () => {
  const read = (change: Partial<ChildFields>) => readBirth({ ...child, ...change }, NOW, ZONE);

  it('gives the moment of birth', () => {
    expect(read({ bornOn: '2026-06-08', bornAt: '2026-06-08T00:30' })).toEqual({
      ok: true,
      bornAt: parseInstant('2026-06-07T23:30:00Z'),
    });
    expect(read({})).toEqual({ ok: true });
    expect(read({ bornOn: '2026-06-10' })).toEqual({ ok: true });
  });

  it.each<[string, Partial<ChildFields>, string, string]>([
    ['tomorrow', { bornOn: '2026-06-11' }, 'bornOn', 'born-in-future'],
    ['later today', { bornOn: '2026-06-10', bornAt: '2026-06-10T13:01' }, 'bornAt', 'born-in-future'],
    ['another day', { bornOn: '2026-06-08', bornAt: '2026-06-07T23:30' }, 'bornAt', 'other-day'],
    ['half a time', { bornOn: '2026-06-08', bornAt: '2026-06-08T' }, 'bornAt', 'malformed'],
    ['a skipped hour', { bornOn: '2026-03-29', bornAt: '2026-03-29T01:30' }, 'bornAt', 'does-not-exist'],
    ['a doubled hour', { bornOn: '2025-10-26', bornAt: '2025-10-26T01:30' }, 'bornAt', 'twice'],
    ['days alone', { gestationDays: 3 }, 'gestationDays', 'days-without-weeks'],
  ])('refuses %s', (_name, change, field, code) => {
    expect(read(change)).toMatchObject({ ok: false, fault: { field, code } });
  });
});

describe('words', () => {
  it('tells a list of allergies from none known and from not asked', () => {
    expect(allergyStatus('none known')).toBe('none-known');
    expect(allergyStatus(' Not asked ')).toBe('not-asked');
    expect(allergyStatus('Penicillin: rash')).toBe('listed');
  });

  it('has different words for every flag', () => {
    expect(new Set(FLAGS.map((flag) => FLAG_WORDS[flag].label)).size).toBe(FLAGS.length);
    expect(flagLabels(['ceftriaxone', 'raised-adh'])).toEqual(['Raised ADH risk', 'On ceftriaxone']);
  });
});
