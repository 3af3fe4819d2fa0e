import type { Fraction, MaintenanceMethod, Sex } from '../calc/types';

/** Words of the check, the same on the page, in the comparison and on paper. */
export const SEX_WORDS: Readonly<Record<Sex | 'not-recorded', string>> = {
  female: 'Female',
  male: 'Male',
  'not-recorded': 'Not recorded',
};

export const AGE_UNIT_WORDS = { years: 'years', months: 'months', days: 'days', hours: 'hours' } as const;

export const SOURCE_WORDS = {
  'weighed-now': 'Weighed now',
  'read-from-scales': 'Read from the scales',
  'read-from-chart': 'Read from the chart',
} as const;

export const WORKED_OUT_WORDS = { hand: 'By hand', program: 'By Brimline, from my entries' } as const;

export const METHOD_WORDS: Readonly<Record<MaintenanceMethod, string>> = {
  'bands-daily': 'Weight bands, per day',
  'bands-hourly': 'Weight bands, per hour (4-2-1)',
  who: 'WHO',
  newborn: 'Term newborn, by hours',
};

export const FRACTION_WORDS: Readonly<Record<Fraction, string>> = {
  full: 'Full',
  'four-fifths': '80%',
  'two-thirds': 'Two thirds',
  half: 'Half',
};

export const potassiumWords = (mmolPerL: number): string =>
  mmolPerL === 0 ? 'No added potassium' : `Potassium chloride ${mmolPerL} mmol/L`;

/** What a checker returns an order for. */
export const RETURN_WORDS = {
  weight: 'Weight',
  fluid: 'Fluid',
  additives: 'Additives',
  fraction: 'Fraction',
  'rate-or-time': 'Rate or time',
  child: 'Child',
  'something-else': 'Something else',
} as const;
export type ReturnMatter = keyof typeof RETURN_WORDS;
