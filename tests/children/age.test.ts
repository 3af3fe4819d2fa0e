import {
  ageAt,
  ageText,
  gestationText,
  inScope,
  isPretermNow,
  postMenstrualDays,
} from '@shared/children/age';
import { DAY, HOUR, instant, localDateTimeToInstant, MINUTE, type Instant } from '@shared/time';
import { describe, expect, it } from 'vitest';

const ZONE = 'Europe/London';
const at = (local: string): Instant => {
  const read = localDateTimeToInstant(local, ZONE);
  if (!read.ok) throw new Error(read.message);
  return read.instant;
};
const plus = (moment: Instant, ms: number) => instant(moment + ms);

describe('ageAt by the calendar', () => {
  // clinical reading, ours: a birthday is reached on its day, 29 February the next day
  it.each([
    ['2022-03-14', '2026-03-13T23:59', 3, 47],
    ['2022-03-14', '2026-03-14T00:00', 4, 48],
    ['2024-02-29', '2025-02-28T23:59', 0, 11],
    ['2024-02-29', '2025-03-01T00:00', 1, 12],
    ['2024-02-29', '2028-02-28T12:00', 3, 47],
    ['2024-02-29', '2028-02-29T00:00', 4, 48],
    ['2026-01-31', '2026-02-28T12:00', 0, 0],
    ['2026-01-31', '2026-03-01T00:00', 0, 1],
    ['2025-12-31', '2026-01-01T12:00', 0, 0],
  ])('born %s, at %s: %d years, %d months', (bornOn, when, years, months) => {
    expect(ageAt({ bornOn }, at(when), ZONE)).toMatchObject({ years, months });
  });

  it('takes the day of the hospital, not of UTC', () => {
    // 00:30 in London is still the day before in UTC
    expect(ageAt({ bornOn: '2022-06-10' }, at('2026-06-10T00:30'), ZONE).years).toBe(4);
    expect(ageAt({ bornOn: '2022-06-10' }, at('2026-06-10T00:30'), 'America/New_York').years).toBe(3);
  });

  it('counts calendar days across a clock change where the hour is not known', () => {
    expect(ageAt({ bornOn: '2026-03-28' }, at('2026-03-30T00:10'), ZONE)).toMatchObject({
      days: 2,
      hours: undefined,
    });
  });
});

describe('the newborn', () => {
  const bornAt = at('2026-06-01T23:00');
  const born = { bornOn: '2026-06-01', bornAt };

  // 28 completed days, 672 h: clinical reading, ours
  it('ends at 672 h where the hour of birth is known', () => {
    expect(ageAt(born, plus(bornAt, 672 * HOUR - MINUTE), ZONE)).toMatchObject({ days: 27, isNewborn: true });
    expect(ageAt(born, plus(bornAt, 672 * HOUR), ZONE)).toMatchObject({
      days: 28,
      isNewborn: false,
      hours: 672,
    });
  });

  it('ends with the 28th day otherwise', () => {
    expect(ageAt({ bornOn: '2026-06-01' }, at('2026-06-28T23:59'), ZONE).isNewborn).toBe(true);
    expect(ageAt({ bornOn: '2026-06-01' }, at('2026-06-29T00:00'), ZONE).isNewborn).toBe(false);
  });

  it('has no completed day two hours after a birth before midnight', () => {
    expect(ageAt(born, plus(bornAt, 2 * HOUR), ZONE)).toMatchObject({ days: 0, hours: 2 });
  });

  it('is none before the birth', () => {
    expect(ageAt(born, plus(bornAt, -MINUTE), ZONE)).toMatchObject({ isUnborn: true, isNewborn: false });
    expect(ageAt({ bornOn: '2026-06-02' }, at('2026-06-01T12:00'), ZONE)).toMatchObject({
      isUnborn: true,
      isNewborn: false,
    });
  });
});

describe('ageText', () => {
  const bornAt = at('2026-06-01T06:00');
  const withHour = { bornOn: '2026-06-01', bornAt };
  it.each([
    [withHour, plus(bornAt, 60 * HOUR + 59 * MINUTE), '60 h'],
    [withHour, plus(bornAt, 96 * HOUR), '4 d'],
    [{ bornOn: '2026-06-01' }, at('2026-06-03T12:00'), '2 d'],
    [withHour, plus(bornAt, 12 * DAY), '12 d'],
    [{ bornOn: '2026-06-01' }, at('2026-07-31T12:00'), '60 d'],
    [{ bornOn: '2026-06-01' }, at('2026-08-01T12:00'), '2 m'],
    [{ bornOn: '2025-06-30' }, at('2026-06-01T12:00'), '11 m'],
    [{ bornOn: '2024-06-02' }, at('2026-06-01T12:00'), '23 m'],
    [{ bornOn: '2024-06-01' }, at('2026-06-01T12:00'), '2 y'],
    [{ bornOn: '2022-03-14' }, at('2026-06-01T12:00'), '4 y'],
    [{ bornOn: '2026-06-02' }, at('2026-06-01T12:00'), 'not yet born'],
  ])('%o', (child, when, text) => {
    expect(ageText(ageAt(child, when, ZONE))).toBe(text);
  });
});

describe('gestation', () => {
  const early = { bornOn: '2026-05-01', gestationWeeks: 34, gestationDays: 2 };

  it('counts on from birth', () => {
    expect(postMenstrualDays(early, at('2026-05-01T12:00'), ZONE)).toBe(34 * 7 + 2);
    expect(gestationText(postMenstrualDays(early, at('2026-06-09T12:00'), ZONE)!)).toBe('39+6');
    expect(postMenstrualDays({ bornOn: '2026-05-01' }, at('2026-06-09T12:00'), ZONE)).toBeUndefined();
  });

  it('calls a child preterm until 40+0', () => {
    expect(isPretermNow(early, at('2026-06-09T12:00'), ZONE)).toBe(true);
    expect(isPretermNow(early, at('2026-06-10T12:00'), ZONE)).toBe(false);
    expect(
      isPretermNow({ ...early, gestationWeeks: 37, gestationDays: 0 }, at('2026-05-02T12:00'), ZONE),
    ).toBe(false);
    expect(
      isPretermNow({ ...early, gestationWeeks: 36, gestationDays: 6 }, at('2026-05-02T12:00'), ZONE),
    ).toBe(true);
  });
});

describe('inScope', () => {
  const limits = { maxYears: 16 };
  const now = at('2026-06-10T12:00');

  it.each([
    ['a term newborn', { bornOn: '2026-06-08', gestationWeeks: 37, gestationDays: 0 }, 'ok'],
    ['one born at 36+6', { bornOn: '2026-06-08', gestationWeeks: 36, gestationDays: 6 }, 'preterm'],
    ['one born at 34+2, 40+0 today', { bornOn: '2026-05-01', gestationWeeks: 34, gestationDays: 2 }, 'ok'],
    ['12 weeks 6 days, gestation not recorded', { bornOn: '2026-03-12' }, 'gestation-unknown'],
    ['13 weeks, gestation not recorded', { bornOn: '2026-03-11' }, 'ok'],
    ['the day before 16', { bornOn: '2010-06-11' }, 'ok'],
    ['the 16th birthday', { bornOn: '2010-06-10' }, 'too-old'],
    ['born tomorrow', { bornOn: '2026-06-11', gestationWeeks: 40 }, 'born-in-future'],
  ])('%s: %s', (_name, child, expected) => {
    const verdict = inScope(child, now, ZONE, limits);
    expect(verdict.ok ? 'ok' : verdict.code).toBe(expected);
  });

  it('does not keep an emergency waiting for the gestation, but keeps the other refusals', () => {
    expect(inScope({ bornOn: '2026-06-01' }, now, ZONE, { ...limits, emergency: true })).toEqual({
      ok: true,
    });
    const early = { bornOn: '2026-06-01', gestationWeeks: 33 };
    expect(inScope(early, now, ZONE, { ...limits, emergency: true })).toMatchObject({ code: 'preterm' });
  });

  it('follows the rulebook to 18', () => {
    expect(inScope({ bornOn: '2010-06-10' }, now, ZONE, { maxYears: 18 })).toEqual({ ok: true });
  });
});
