import { civilDate, civilDaysBetween, civilParts, DAY, HOUR, type Instant } from '../time';

/** When a child was born: the calendar day in the hospital's zone, and the moment where it is known. */
export type Birth = { bornOn: string; bornAt?: Instant };
export type Gestation = { gestationWeeks?: number; gestationDays?: number };

/** A newborn is under 28 completed days (672 h). Clinical reading, ours. */
export const NEWBORN_DAYS = 28;
/** Before this age the gestation at birth must be known. Ours: 13 weeks. */
export const GESTATION_ASKED_DAYS = 91;
export const TERM_WEEKS = 37;
export const DUE_WEEKS = 40;

export type Age = {
  /** Calendar years and months completed; a birthday is reached on its day, one of 29 February the day after. */
  years: number;
  months: number;
  /** Completed days: spans of 24 h where the hour of birth is known, else calendar days. */
  days: number;
  /** Hours since birth, unrounded; absent where the hour of birth is not known. */
  hours?: number;
  isNewborn: boolean;
  /** The birth lies ahead: every figure is negative. */
  isUnborn: boolean;
};

/** The age of a child at a moment, by the hospital's calendar; `months` counts all of them, not those past the year. */
export function ageAt(child: Birth, at: Instant, zone: string): Age {
  const today = civilDate(at, zone);
  const born = civilParts(child.bornOn);
  const now = civilParts(today);
  // a day that the month lacks is reached on the next one, the first of the month after
  const months = (now.year - born.year) * 12 + now.month - born.month - (now.day < born.day ? 1 : 0);
  const hours = child.bornAt === undefined ? undefined : (at - child.bornAt) / HOUR;
  const days =
    child.bornAt === undefined
      ? civilDaysBetween(child.bornOn, today)
      : Math.floor((at - child.bornAt) / DAY);
  const isUnborn = days < 0;
  return {
    years: Math.floor(months / 12),
    months,
    days,
    hours,
    isNewborn: !isUnborn && days < NEWBORN_DAYS,
    isUnborn,
  };
}

/** Short words for an age: '60 h' (to 4 days, hour of birth known), '12 d' (to 2 months), '11 m' (to 2 years), '4 y'. */
export function ageText(age: Age): string {
  if (age.isUnborn) return 'not yet born';
  if (age.hours !== undefined && age.hours < 96) return `${Math.floor(age.hours)} h`;
  if (age.months < 2) return `${age.days} d`;
  return age.years < 2 ? `${age.months} m` : `${age.years} y`;
}

/** Completed days from the last period: gestation at birth plus the days since; undefined where it was not recorded. */
export function postMenstrualDays(child: Birth & Gestation, at: Instant, zone: string): number | undefined {
  if (child.gestationWeeks === undefined) return undefined;
  const atBirth = child.gestationWeeks * 7 + (child.gestationDays ?? 0);
  return atBirth + civilDaysBetween(child.bornOn, civilDate(at, zone));
}

/** '34+2' of days counted from the last period. */
export const gestationText = (days: number): string => `${Math.floor(days / 7)}+${days % 7}`;

/** Born before 37+0 weeks and not yet 40+0 weeks after the last period. The careful reading of "term-corrected", ours. */
export function isPretermNow(child: Birth & Gestation, at: Instant, zone: string): boolean {
  if (child.gestationWeeks === undefined || child.gestationWeeks >= TERM_WEEKS) return false;
  const reached = postMenstrualDays(child, at, zone);
  return reached !== undefined && reached < DUE_WEEKS * 7;
}

export type ScopeLimits = {
  /** Orders end at this birthday: 16, by rulebook up to 18. */
  maxYears: number;
  /** An emergency order does not wait for the gestation. */
  emergency?: boolean;
};

export type ScopeCode = 'born-in-future' | 'too-old' | 'preterm' | 'gestation-unknown';
export type ScopeVerdict = { ok: true } | { ok: false; code: ScopeCode; message: string };

/** Whether the program may work out an order for this child at this moment. */
export function inScope(
  child: Birth & Gestation,
  at: Instant,
  zone: string,
  limits: ScopeLimits,
): ScopeVerdict {
  const age = ageAt(child, at, zone);
  if (age.isUnborn) return refuse('born-in-future', 'The date of birth lies ahead. Correct it first.');
  if (age.years >= limits.maxYears) {
    return refuse('too-old', `From the ${limits.maxYears}th birthday on, use the adult protocol.`);
  }
  if (isPretermNow(child, at, zone)) {
    const reached = gestationText(postMenstrualDays(child, at, zone)!);
    return refuse(
      'preterm',
      `Born early and only ${reached} weeks now: use the newborn unit's own protocol.`,
    );
  }
  if (child.gestationWeeks === undefined && age.days < GESTATION_ASKED_DAYS && limits.emergency !== true) {
    return refuse(
      'gestation-unknown',
      'Under 13 weeks of age the gestation at birth must be recorded first.',
    );
  }
  return { ok: true };
}

const refuse = (code: ScopeCode, message: string): ScopeVerdict => ({ ok: false, code, message });
