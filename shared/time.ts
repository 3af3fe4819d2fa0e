/** Milliseconds since 1970-01-01T00:00:00Z. The only representation of a moment inside the program. */
export type Instant = number & { readonly __brand: 'Instant' };

export const instant = (ms: number): Instant => {
  if (!Number.isSafeInteger(ms)) throw new RangeError('instant wants whole milliseconds');
  return ms as Instant;
};

export const MINUTE = 60_000;
export const HOUR = 3_600_000;
export const DAY = 86_400_000;

// ── Civil dates: a day on the calendar, 'YYYY-MM-DD', with no clock and no zone ────────────────────────────

/** Year, month 1–12 and day of the month. */
export type CivilDate = { year: number; month: number; day: number };

export const isLeapYear = (year: number): boolean => (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;

const daysInMonth = (year: number, month: number): number =>
  month === 2
    ? isLeapYear(year)
      ? 29
      : 28
    : month === 4 || month === 6 || month === 9 || month === 11
      ? 30
      : 31;

/** The number that stands in `text` from one index to before another; NaN where that is not all digits. */
function digits(text: string, from: number, to: number): number {
  let value = 0;
  for (let i = from; i < to; i += 1) {
    const digit = text.charCodeAt(i) - 48;
    if (!(digit >= 0 && digit <= 9)) return NaN;
    value = value * 10 + digit;
  }
  return value;
}

/** The parts of 'YYYY-MM-DD', or undefined where the text is no day of the calendar (years 1000 to 9999). */
export function parseCivilDate(text: string): CivilDate | undefined {
  if (text.length !== 10 || text[4] !== '-' || text[7] !== '-') return undefined;
  const year = digits(text, 0, 4);
  const month = digits(text, 5, 7);
  const day = digits(text, 8, 10);
  const isDay = year >= 1000 && month >= 1 && month <= 12 && day >= 1 && day <= daysInMonth(year, month);
  return isDay ? { year, month, day } : undefined;
}

export const isCivilDate = (text: string): boolean => parseCivilDate(text) !== undefined;

/** The parts of a date already known to be one; throws otherwise. */
export function civilParts(date: string): CivilDate {
  const parts = parseCivilDate(date);
  if (parts === undefined) throw new RangeError(`not a calendar date: ${date}`);
  return parts;
}

/** Days from 1970-01-01 to the date; negative before it. */
export function civilDayNumber(date: string): number {
  const { year, month, day } = civilParts(date);
  return Date.UTC(year, month - 1, day) / DAY;
}

/** Whole calendar days from one date to another; negative when `to` is the earlier. */
export const civilDaysBetween = (from: string, to: string): number =>
  civilDayNumber(to) - civilDayNumber(from);

/** The date so many days later (or earlier, when negative). */
export const addCivilDays = (date: string, days: number): string =>
  new Date((civilDayNumber(date) + days) * DAY).toISOString().slice(0, 10);

// ── Instants as text ───────────────────────────────────────────────────────────────────────────────────────

const RFC_3339 =
  /^(\d{4}-\d{2}-\d{2})T([01]\d|2[0-3]):[0-5]\d:[0-5]\d(?:\.\d{1,3})?(?:Z|[+-](?:0\d|1[0-4]):[0-5]\d)$/;

/** A moment from RFC 3339 text with its offset; undefined for anything else, finer than a millisecond included. */
export function parseInstant(text: string): Instant | undefined {
  const match = RFC_3339.exec(text);
  if (match === null || !isCivilDate(match[1] ?? '')) return undefined;
  const ms = Date.parse(text);
  return Number.isSafeInteger(ms) ? (ms as Instant) : undefined;
}

/** RFC 3339 in UTC with milliseconds: '2026-06-10T06:50:00.000Z'. */
export const toRfc3339 = (at: Instant): string => new Date(at).toISOString();

// ── The wall clock of a zone ───────────────────────────────────────────────────────────────────────────────

const clocks = new Map<string, Intl.DateTimeFormat>();
const zoneNames = new Map<string, Intl.DateTimeFormat>();

function cached(store: Map<string, Intl.DateTimeFormat>, zone: string, options: Intl.DateTimeFormatOptions) {
  let format = store.get(zone);
  if (format === undefined) {
    format = new Intl.DateTimeFormat('en-GB', {
      ...options,
      timeZone: zone,
      calendar: 'gregory',
      numberingSystem: 'latn',
    });
    store.set(zone, format);
  }
  return format;
}

/** Whether the name is a time zone this engine knows ('Europe/London'). */
export function isZone(zone: string): boolean {
  try {
    cached(zoneNames, zone, { hour: 'numeric', timeZoneName: 'short' });
    return true;
  } catch {
    return false;
  }
}

/** The wall clock of the zone, read as if it were UTC, in ms. */
function wallMs(at: Instant, zone: string): number {
  const format = cached(clocks, zone, {
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
    hourCycle: 'h23',
  });
  const part: Record<string, number> = {};
  for (const { type, value } of format.formatToParts(at)) part[type] = Number(value);
  const { year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0 } = part;
  return Date.UTC(year, month - 1, day, hour, minute, second);
}

const offsetMs = (at: Instant, zone: string): number => wallMs(at, zone) - Math.floor(at / 1000) * 1000;

const QUARTER = 15 * MINUTE;
/** Since 1972 every zone is off UTC by whole quarters of an hour, so a day never changes within one. */
const QUARTERS_SINCE = 2 * 366 * DAY;
const lastQuarter = new Map<string, { quarter: number; date: string }>();

/** The calendar day of a moment in the zone, 'YYYY-MM-DD'. */
export function civilDate(at: Instant, zone: string): string {
  const quarter = Math.floor(at / QUARTER);
  const last = lastQuarter.get(zone);
  if (last?.quarter === quarter) return last.date;
  const date = new Date(wallMs(at, zone)).toISOString().slice(0, 10);
  if (at > QUARTERS_SINCE) lastQuarter.set(zone, { quarter, date });
  return date;
}

/** Date and wall-clock minute in the zone, '2026-06-10T07:50': the value of a datetime-local field. */
export const localDateTime = (at: Instant, zone: string): string =>
  new Date(wallMs(at, zone)).toISOString().slice(0, 16);

export type LocalMoment =
  | { ok: true; instant: Instant }
  | { ok: false; code: 'malformed' | 'does-not-exist'; message: string }
  | { ok: false; code: 'twice'; message: string; instants: [Instant, Instant] };

const LOCAL = /^(\d{4}-\d{2}-\d{2})T([01]\d|2[0-3]):([0-5]\d)$/;

/** The moment at which a wall clock in the zone shows '2026-06-10T07:50'; on clock-change nights none or two. */
export function localDateTimeToInstant(text: string, zone: string): LocalMoment {
  const match = LOCAL.exec(text);
  if (match === null || !isCivilDate(match[1] ?? '')) {
    return { ok: false, code: 'malformed', message: 'Give a date and a time, like 2026-06-10 and 07:50.' };
  }
  const wall = Date.parse(`${text}:00Z`);
  const clock = text.slice(11);
  // the offsets in force a day before and a day after: they differ only when the clocks change between
  const offsets = new Set([offsetMs((wall - DAY) as Instant, zone), offsetMs((wall + DAY) as Instant, zone)]);
  const found = [...offsets]
    .map((offset) => (wall - offset) as Instant)
    .filter((at) => wallMs(at, zone) === wall);
  const [first, second] = found.sort((a, b) => a - b);
  if (first === undefined) {
    return {
      ok: false,
      code: 'does-not-exist',
      message: `The clocks go forward that night: there is no ${clock}.`,
    };
  }
  if (second === undefined) return { ok: true, instant: first };
  return {
    ok: false,
    code: 'twice',
    message: `The clocks go back that night: ${clock} comes twice (${zoneName(first, zone)}, then ${zoneName(second, zone)}). Say which.`,
    instants: [first, second],
  };
}

// ── Words for the screen and the paper, always in the hospital's zone ──────────────────────────────────────

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** The short name of the offset in force: 'BST', 'GMT', 'GMT-4'. */
export function zoneName(at: Instant, zone: string): string {
  const parts = cached(zoneNames, zone, { hour: 'numeric', timeZoneName: 'short' }).formatToParts(at);
  return parts.find(({ type }) => type === 'timeZoneName')?.value ?? zone;
}

/** Whether the zone's clocks change within 12 h of the moment, so that a bare time could be misread. */
export const isNearClockChange = (at: Instant, zone: string): boolean =>
  offsetMs((at - 12 * HOUR) as Instant, zone) !== offsetMs((at + 12 * HOUR) as Instant, zone);

/** '07:50'; near a clock change with the zone's name, '01:30 BST'. */
export function formatTime(at: Instant, zone: string): string {
  const time = localDateTime(at, zone).slice(11);
  return isNearClockChange(at, zone) ? `${time} ${zoneName(at, zone)}` : time;
}

/** '14 Mar 2022' of a calendar date. */
export function formatCivilDate(date: string): string {
  const { year, month, day } = civilParts(date);
  return `${day} ${MONTHS[month - 1]} ${year}`;
}

/** '14 Mar 2022' of a moment. */
export const formatDate = (at: Instant, zone: string): string => formatCivilDate(civilDate(at, zone));

/** '10 Jun 2026, 07:50'. */
export const formatDateTime = (at: Instant, zone: string): string =>
  `${formatDate(at, zone)}, ${formatTime(at, zone)}`;

/** '10 Jun 07:50', for strips and lists in which the year is plain. */
export function formatDayTime(at: Instant, zone: string): string {
  const { month, day } = civilParts(civilDate(at, zone));
  return `${day} ${MONTHS[month - 1]} ${formatTime(at, zone)}`;
}

/** 'today, 12:00', else '9 Jun, 12:01', with the year where it is another one. */
export function formatRelativeDay(at: Instant, now: Instant, zone: string): string {
  const date = civilDate(at, zone);
  const today = civilDate(now, zone);
  if (date === today) return `today, ${formatTime(at, zone)}`;
  const { year, month, day } = civilParts(date);
  const shown = year === civilParts(today).year ? '' : ` ${year}`;
  return `${day} ${MONTHS[month - 1]}${shown}, ${formatTime(at, zone)}`;
}

/** '38 min', '1 h 12 min', '2 h', from two days on '3 d 4 h'; whole minutes passed, a minus sign before the negative. */
export function formatDuration(ms: number): string {
  if (ms < 0) return `−${formatDuration(-ms)}`;
  const join = (big: number, bigUnit: string, small: number, smallUnit: string) =>
    small === 0 ? `${big} ${bigUnit}` : `${big} ${bigUnit} ${small} ${smallUnit}`;
  const minutes = Math.floor(ms / MINUTE);
  if (minutes < 60) return `${minutes} min`;
  const hours = Math.floor(minutes / 60);
  if (hours < 48) return join(hours, 'h', minutes % 60, 'min');
  return join(Math.floor(hours / 24), 'd', hours % 24, 'h');
}
