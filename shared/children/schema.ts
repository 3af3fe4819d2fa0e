import { z } from 'zod';
import { FLAGS, SEXES } from '../calc/types';
import { civilDate, isCivilDate, localDateTimeToInstant, type Instant } from '../time';

/** Control characters, and marks that turn the reading direction of what follows. */
// eslint-disable-next-line no-control-regex -- these are the characters to refuse
const UNPRINTABLE = /[\u0000-\u001f\u007f-\u009f\u202a-\u202e\u2066-\u2069]/;

/** One line of text as a person types it: outer spaces dropped, NFC, nothing invisible. */
const line = (missing: string, max: number) =>
  z
    .string()
    .trim()
    .normalize()
    .min(1, missing)
    .max(max, `At most ${max} characters.`)
    .refine((text) => !UNPRINTABLE.test(text), 'There is a character in it that cannot be printed.');

/** What allergies say before anyone has asked, and when asking brought none; anything else is a list. */
export const ALLERGIES_NOT_ASKED = 'Not asked';
export const ALLERGIES_NONE_KNOWN = 'None known';
export type AllergyStatus = 'not-asked' | 'none-known' | 'listed';

export function allergyStatus(text: string): AllergyStatus {
  const plain = text.trim().toLowerCase();
  if (plain === ALLERGIES_NOT_ASKED.toLowerCase()) return 'not-asked';
  return plain === ALLERGIES_NONE_KNOWN.toLowerCase() ? 'none-known' : 'listed';
}

/** A child as a person registers or corrects it; null means not recorded. */
export const childFields = z.object({
  number: line('Give the hospital number.', 40).regex(/^[\p{L}\p{N}]([\p{L}\p{N}/. -]*[\p{L}\p{N}])?$/u, {
    error: 'A hospital number has letters, digits, spaces, points, strokes and hyphens only.',
    abort: true,
  }),
  surname: line('Give the surname.', 120),
  given: line('Give the first name.', 120),
  bornOn: z.string().refine(isCivilDate, 'Give a date of the calendar.'),
  /** Local date and time; its day is `bornOn`. */
  bornAt: z.string().nullable(),
  sex: z.enum(SEXES).nullable(),
  gestationWeeks: z.int().min(22, 'At least 22 weeks.').max(44, 'At most 44 weeks.').nullable(),
  gestationDays: z.int().min(0, 'From 0 to 6 days.').max(6, 'From 0 to 6 days.').nullable(),
  allergies: line(`Say what is known, or “${ALLERGIES_NONE_KNOWN}”.`, 500),
  flags: z.array(z.enum(FLAGS)).transform((flags) => FLAGS.filter((flag) => flags.includes(flag))),
});
export type ChildFields = z.infer<typeof childFields>;

export type BirthFault = {
  field: 'bornOn' | 'bornAt' | 'gestationDays';
  code: 'born-in-future' | 'other-day' | 'days-without-weeks' | 'malformed' | 'does-not-exist' | 'twice';
  message: string;
  /** The two moments of a time that came twice that night. */
  instants?: [Instant, Instant];
};
export type BirthReading = { ok: true; bornAt?: Instant } | { ok: false; fault: BirthFault };

type BirthFields = Pick<ChildFields, 'bornOn' | 'bornAt' | 'gestationWeeks' | 'gestationDays'>;

/** Holds the birth against the hospital's clock and turns the time of birth into a moment. */
export function readBirth(fields: BirthFields, now: Instant, zone: string): BirthReading {
  if (fields.bornOn > civilDate(now, zone)) {
    return refuse('bornOn', 'born-in-future', 'The date of birth lies ahead.');
  }
  if (fields.gestationDays !== null && fields.gestationWeeks === null) {
    return refuse('gestationDays', 'days-without-weeks', 'Give the weeks too.');
  }
  return fields.bornAt === null ? { ok: true } : readBirthTime(fields.bornAt, fields.bornOn, now, zone);
}

function readBirthTime(text: string, bornOn: string, now: Instant, zone: string): BirthReading {
  const moment = localDateTimeToInstant(text, zone);
  if (!moment.ok) {
    const instants = moment.code === 'twice' ? moment.instants : undefined;
    return { ok: false, fault: { field: 'bornAt', code: moment.code, message: moment.message, instants } };
  }
  if (!text.startsWith(bornOn)) {
    return refuse('bornAt', 'other-day', 'The time of birth is on another day than the date of birth.');
  }
  if (moment.instant > now) return refuse('bornAt', 'born-in-future', 'The time of birth lies ahead.');
  return { ok: true, bornAt: moment.instant };
}

const refuse = (field: BirthFault['field'], code: BirthFault['code'], message: string): BirthReading => ({
  ok: false,
  fault: { field, code, message },
});
