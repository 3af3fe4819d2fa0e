import {
  addCivilDays,
  civilDate,
  civilDaysBetween,
  DAY,
  formatCivilDate,
  formatDate,
  formatDateTime,
  formatDayTime,
  formatDuration,
  formatRelativeDay,
  formatTime,
  HOUR,
  type Instant,
  instant,
  isCivilDate,
  isZone,
  localDateTime,
  localDateTimeToInstant,
  MINUTE,
  parseCivilDate,
  parseInstant,
  toRfc3339,
} from '@shared/time';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

const LONDON = 'Europe/London';
const at = (text: string): Instant => {
  const read = parseInstant(text);
  if (read === undefined) throw new Error(text);
  return read;
};

describe('parseInstant', () => {
  it.each([
    ['1970-01-01T00:00:00Z', 0],
    ['1970-01-01T01:00:00+01:00', 0],
    ['1970-01-01T00:00:00.5Z', 500],
    ['1969-12-31T23:59:59.999-00:00', -1],
    // RFC 3339 section 5.8: the same moment twice
    ['1996-12-19T16:39:57-08:00', Date.UTC(1996, 11, 20, 0, 39, 57)],
    ['1996-12-20T00:39:57Z', Date.UTC(1996, 11, 20, 0, 39, 57)],
  ])('%s', (text, ms) => {
    expect(parseInstant(text)).toBe(ms);
  });

  it.each([
    ['', 'empty'],
    ['2026-06-10', 'no time'],
    ['2026-06-10T07:50:00', 'no offset'],
    ['2026-06-10T07:50Z', 'no seconds'],
    ['2026-06-10 07:50:00Z', 'no T'],
    ['2026-06-10T07:50:00z', 'small z'],
    ['2026-02-30T07:50:00Z', 'no such day'],
    ['2026-13-01T07:50:00Z', 'no such month'],
    ['2025-02-29T07:50:00Z', 'no leap year'],
    ['2026-06-10T24:00:00Z', 'hour 24'],
    ['2026-06-10T07:50:60Z', 'leap second'],
    ['2026-06-10T07:50:00.1234Z', 'finer than a millisecond'],
    ['2026-06-10T07:50:00+0100', 'offset without colon'],
    ['2026-06-10T07:50:00+15:00', 'no such offset'],
    [' 2026-06-10T07:50:00Z', 'space before'],
    ['2026-06-10T07:50:00Z\n', 'line end'],
    ['1781077800000', 'a number'],
  ])('refuses %j (%s)', (text) => {
    expect(parseInstant(text)).toBeUndefined();
  });

  it('reads back what toRfc3339 writes, to the millisecond', () => {
    expect(toRfc3339(at('2026-06-10T07:50:00+01:00'))).toBe('2026-06-10T06:50:00.000Z');
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 4_000_000_000_000 }), (ms) => {
        expect(parseInstant(toRfc3339(instant(ms)))).toBe(ms);
      }),
    );
  });
});

describe('civil dates', () => {
  it('keeps to the calendar', () => {
    expect(parseCivilDate('2024-02-29')).toEqual({ year: 2024, month: 2, day: 29 });
    for (const text of [
      '2023-02-29',
      '1900-02-29',
      '2026-04-31',
      '2026-00-10',
      '2026-6-10',
      '26-06-10',
      '0026-06-10',
      '',
    ]) {
      expect(isCivilDate(text), text).toBe(false);
    }
    expect(isCivilDate('2000-02-29')).toBe(true);
  });

  it('counts and adds days across a clock change', () => {
    expect(civilDaysBetween('2026-03-28', '2026-03-30')).toBe(2);
    expect(civilDaysBetween('2026-03-30', '2026-03-28')).toBe(-2);
    expect(addCivilDays('2024-02-28', 2)).toBe('2024-03-01');
    expect(addCivilDays('2026-01-01', -1)).toBe('2025-12-31');
  });

  it('takes the day from the zone, not from UTC', () => {
    expect(civilDate(at('2026-06-09T23:30:00Z'), LONDON)).toBe('2026-06-10');
    expect(civilDate(at('2026-06-09T23:30:00Z'), 'America/New_York')).toBe('2026-06-09');
    expect(civilDate(at('2026-01-01T00:00:00Z'), 'Pacific/Kiritimati')).toBe('2026-01-01');
    expect(civilDate(at('2025-12-31T10:00:00Z'), 'Pacific/Kiritimati')).toBe('2026-01-01');
  });
});

describe('localDateTimeToInstant', () => {
  it.each([
    ['2026-06-10T07:50', LONDON, '2026-06-10T06:50:00.000Z'],
    ['2026-12-10T07:50', LONDON, '2026-12-10T07:50:00.000Z'],
    ['2026-06-10T00:00', 'Asia/Kathmandu', '2026-06-09T18:15:00.000Z'],
    // the first minute after the clocks went forward, and the last before
    ['2026-03-29T02:00', LONDON, '2026-03-29T01:00:00.000Z'],
    ['2026-03-29T00:59', LONDON, '2026-03-29T00:59:00.000Z'],
  ])('%s in %s', (text, zone, utc) => {
    expect(localDateTimeToInstant(text, zone)).toEqual({ ok: true, instant: at(utc) });
  });

  it('refuses a time the clocks skip', () => {
    expect(localDateTimeToInstant('2026-03-29T01:30', LONDON)).toMatchObject({
      ok: false,
      code: 'does-not-exist',
    });
  });

  it('offers both moments of a time that comes twice', () => {
    const read = localDateTimeToInstant('2026-10-25T01:30', LONDON);
    expect(read).toMatchObject({
      ok: false,
      code: 'twice',
      instants: [at('2026-10-25T00:30:00Z'), at('2026-10-25T01:30:00Z')],
    });
    expect(read.ok ? '' : read.message).toContain('BST, then GMT');
  });

  // Lord Howe moves by half an hour
  it('handles a half-hour change', () => {
    expect(localDateTimeToInstant('2026-10-04T02:15', 'Australia/Lord_Howe')).toMatchObject({
      code: 'does-not-exist',
    });
    expect(localDateTimeToInstant('2026-04-05T01:45', 'Australia/Lord_Howe')).toMatchObject({
      code: 'twice',
    });
  });

  it.each([
    '',
    '2026-06-10',
    '2026-06-10T7:50',
    '2026-02-30T07:50',
    '2026-06-10T24:00',
    '2026-06-10 07:50',
    '2026-06-10T07:50Z',
  ])('calls %j malformed', (text) => {
    expect(localDateTimeToInstant(text, LONDON)).toMatchObject({ ok: false, code: 'malformed' });
  });

  it('is undone by localDateTime for every minute of the year that is not doubtful', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 525_600 }),
        fc.constantFrom(LONDON, 'America/New_York', 'Asia/Kolkata'),
        (m, zone) => {
          const moment = instant(Date.UTC(2026, 0, 1) + m * MINUTE);
          const read = localDateTimeToInstant(localDateTime(moment, zone), zone);
          if (read.ok) expect(read.instant).toBe(moment);
          else expect(read).toMatchObject({ code: 'twice', instants: expect.arrayContaining([moment]) });
        },
      ),
    );
  });
});

describe('words', () => {
  it('writes dates and times in the zone', () => {
    const morning = at('2026-06-10T06:50:00Z');
    expect(formatTime(morning, LONDON)).toBe('07:50');
    expect(formatDate(morning, LONDON)).toBe('10 Jun 2026');
    expect(formatDateTime(morning, LONDON)).toBe('10 Jun 2026, 07:50');
    expect(formatDayTime(morning, LONDON)).toBe('10 Jun 07:50');
    expect(formatCivilDate('2022-03-14')).toBe('14 Mar 2022');
    expect(formatCivilDate('2025-09-01')).toBe('1 Sep 2025');
    expect(formatTime(at('2026-06-09T23:00:00Z'), LONDON)).toBe('00:00');
  });

  it('says today by the hospital calendar', () => {
    const now = at('2026-06-10T10:00:00Z');
    expect(formatRelativeDay(at('2026-06-10T11:00:00Z'), now, LONDON)).toBe('today, 12:00');
    expect(formatRelativeDay(at('2026-06-09T23:10:00Z'), now, LONDON)).toBe('today, 00:10');
    expect(formatRelativeDay(at('2026-06-09T11:01:00Z'), now, LONDON)).toBe('9 Jun, 12:01');
    expect(formatRelativeDay(at('2025-06-09T11:01:00Z'), now, LONDON)).toBe('9 Jun 2025, 12:01');
  });

  it('names the offset near a clock change, so that the two 01:30 differ', () => {
    expect(formatTime(at('2026-10-25T00:30:00Z'), LONDON)).toBe('01:30 BST');
    expect(formatTime(at('2026-10-25T01:30:00Z'), LONDON)).toBe('01:30 GMT');
    expect(formatDateTime(at('2026-10-24T21:00:00Z'), LONDON)).toBe('24 Oct 2026, 22:00 BST');
    expect(formatTime(at('2026-10-24T08:00:00Z'), LONDON)).toBe('09:00');
  });

  it.each([
    [0, '0 min'],
    [59_999, '0 min'],
    [38 * MINUTE, '38 min'],
    [HOUR, '1 h'],
    [72 * MINUTE + 59_000, '1 h 12 min'],
    [47 * HOUR + 59 * MINUTE, '47 h 59 min'],
    [2 * DAY, '2 d'],
    [3 * DAY + 4 * HOUR + MINUTE, '3 d 4 h'],
    [-5 * MINUTE, '−5 min'],
  ])('%d ms is %s', (ms, text) => {
    expect(formatDuration(ms)).toBe(text);
  });

  it('knows a zone from a typing error', () => {
    expect(isZone(LONDON)).toBe(true);
    expect(isZone('Europe/Lundon')).toBe(false);
  });
});
