import { ageAt } from '../children/age';
import { civilDate, civilDaysBetween, type Instant } from '../time';
import type { Sex } from '../calc/types';
import type { AgeUnit } from './entries';
import type { ReenteredChild } from './read-form';

/** What the chart knows of the child that is re-entered. */
export type ChartChild = {
  given: string;
  surname: string;
  sex: Sex | null;
  bornOn: string;
  bornAt?: Instant;
};

export type Reentered = { ok: true } | { ok: false; differs: ('initials' | 'sex' | 'age')[]; words: string };

const WORDS = { initials: 'initials', sex: 'sex', age: 'age' } as const;

/**
 * Holds the re-entered initials, sex and age against the chart. Names which entry differs and never what the chart
 * has: whoever is at the wrong child must look again, not copy.
 */
export function reenterChild(
  entered: ReenteredChild,
  child: ChartChild,
  at: Instant,
  zone: string,
): Reentered {
  const differs: ('initials' | 'sex' | 'age')[] = [];
  if (!initialsOf(child).includes(letters(entered.initials))) differs.push('initials');
  if (entered.sex !== (child.sex ?? 'not-recorded')) differs.push('sex');
  if (!agesOf(child, at, zone)[entered.ageUnit].includes(entered.age)) differs.push('age');
  if (differs.length === 0) return { ok: true };
  const named = differs.map((entry) => WORDS[entry]).join(' and ');
  const verb = differs.length === 1 && differs[0] !== 'initials' ? 'does' : 'do';
  return {
    ok: false,
    differs,
    words: `The ${named} you entered ${verb} not fit this child. Look at the wristband and the chart: is this the child you mean?`,
  };
}

/** Base letters in capitals, marks and everything else left out. */
const letters = (text: string): string =>
  text
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .replace(/[^\p{L}]/gu, '')
    .toUpperCase();

const wordsOf = (name: string): string[] => name.split(/[\s\-‐–’']+/u).filter((word) => letters(word) !== '');
const first = (word: string): string => Array.from(letters(word))[0] ?? '';

/** First names before surnames; of double names the first alone or all of them. */
function initialsOf({ given, surname }: ChartChild): string[] {
  const [givens, surnames] = [wordsOf(given).map(first), wordsOf(surname).map(first)];
  const ways = (initials: string[]) => [initials[0] ?? '', initials.join('')];
  // names begin with what precedes an apostrophe too: O'Neill is O, not N
  return ways(givens).flatMap((front) => ways(surnames).map((back) => front + back));
}

/**
 * Every right answer in each unit: completed years and months by the calendar, days by the clock or by the calendar.
 * Nought says nothing of a child in years or months, so it is right only in days and hours.
 */
function agesOf(child: ChartChild, at: Instant, zone: string): Record<AgeUnit, number[]> {
  const age = ageAt(child, at, zone);
  const calendarDays = civilDaysBetween(child.bornOn, civilDate(at, zone));
  const notNought = (n: number) => (n > 0 ? [n] : []);
  const wholeHours = age.hours === undefined ? undefined : Math.floor(age.hours);
  return {
    years: notNought(age.years),
    months: notNought(age.months),
    days: [age.days, calendarDays],
    // read off a clock that moves on while the form is filled in
    hours: wholeHours === undefined ? [] : [wholeHours, wholeHours - 1],
  };
}
