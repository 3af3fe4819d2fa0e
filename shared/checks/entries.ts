import { FRACTIONS, MAINTENANCE_METHODS, SEXES, type Kind } from '../calc/types';
import type { DecimalSpec } from '../decimal-input';
import type { Urgency } from '../orders/form';
import { KG_FIELD } from '../weights/limits';
import { WEIGHT_SOURCES, WORKED_OUT_BY, type CheckForm, type CheckFormField } from './form';
import {
  AGE_UNIT_WORDS,
  FRACTION_WORDS,
  METHOD_WORDS,
  SEX_WORDS,
  SOURCE_WORDS,
  WORKED_OUT_WORDS,
} from './words';

/** Facts must match; choices are compared apart; `own` is kept and not compared. */
export type EntryNature = 'fact' | 'choice' | 'own';

export type Option = { value: string; label: string };
export type EntryControl =
  | { type: 'text'; maxLength: number }
  | { type: 'decimal'; spec: DecimalSpec }
  | { type: 'options'; options: readonly Option[] }
  /** A fluid of the shelf by its base, without its potassium. */
  | { type: 'base' }
  /** Potassium of the ready-mixed bag, mmol/L, out of those stocked with the base. */
  | { type: 'potassium' };

export type CheckEntry = {
  field: CheckFormField;
  label: string;
  nature: EntryNature;
  note: string;
  control: EntryControl;
  group: 'child' | 'weight' | 'intake' | 'order' | 'figures' | 'way';
  /** Only asked while another field holds this value. */
  askedWhen?: { field: CheckFormField; value: string };
};

export const AGE_UNITS = ['years', 'months', 'days', 'hours'] as const;
export type AgeUnit = (typeof AGE_UNITS)[number];
export const REENTERED_SEXES = [...SEXES, 'not-recorded'] as const;

const optionsOf = <V extends string>(
  values: readonly V[],
  words: Readonly<Record<V, string>>,
): EntryControl => ({
  type: 'options',
  options: values.map((value) => ({ value, label: words[value] })),
});
const decimal = (decimals: number, min: number, max: number, unit?: string): EntryControl => ({
  type: 'decimal',
  spec: { decimals, min, max, ...(unit === undefined ? {} : { unit }) },
});

const CHILD: readonly CheckEntry[] = [
  {
    field: 'initials',
    label: 'Initials',
    nature: 'fact',
    note: 'First name, then surname.',
    control: { type: 'text', maxLength: 12 },
    group: 'child',
  },
  {
    field: 'sex',
    label: 'Sex',
    nature: 'fact',
    note: 'As recorded.',
    control: optionsOf(REENTERED_SEXES, SEX_WORDS),
    group: 'child',
  },
  {
    field: 'age',
    label: 'Age',
    nature: 'fact',
    note: 'Completed years, or months under 2 years, or days under 2 months.',
    control: decimal(0, 0, 999),
    group: 'child',
  },
  {
    field: 'ageUnit',
    label: 'Age in',
    nature: 'fact',
    note: '',
    control: optionsOf(AGE_UNITS, AGE_UNIT_WORDS),
    group: 'child',
  },
];

const WEIGHT: CheckEntry = {
  field: 'weightKg',
  label: 'Dosing weight',
  nature: 'fact',
  note: 'Weigh, or read the scales or the chart yourself.',
  control: { type: 'decimal', spec: KG_FIELD },
  group: 'weight',
};
const WEIGHT_SOURCE: CheckEntry = {
  field: 'weightSource',
  label: 'Where it is from',
  nature: 'own',
  note: '',
  control: optionsOf(WEIGHT_SOURCES, SOURCE_WORDS),
  group: 'weight',
};
const BASE: CheckEntry = {
  field: 'base',
  label: 'Fluid',
  nature: 'choice',
  note: 'Another fluid is a choice within one class of sodium and glucose.',
  control: { type: 'base' },
  group: 'order',
};
const VOLUME: CheckEntry = {
  field: 'volumeMl',
  label: 'Total volume',
  nature: 'fact',
  note: '',
  control: decimal(1, 0.1, 9999, 'mL'),
  group: 'figures',
};
const WAY: CheckEntry = {
  field: 'workedOutBy',
  label: 'Worked out',
  nature: 'own',
  note: 'Which one is recorded.',
  control: optionsOf(WORKED_OUT_BY, WORKED_OUT_WORDS),
  group: 'way',
};

const MAINTENANCE: readonly CheckEntry[] = [
  ...CHILD,
  WEIGHT,
  WEIGHT_SOURCE,
  {
    field: 'feedsMl',
    label: 'Feeds and drinks in 24 h',
    nature: 'fact',
    note: '0 when there are none.',
    control: decimal(1, 0, 5000, 'mL'),
    group: 'intake',
  },
  {
    field: 'drugsMl',
    label: 'Drugs and other lines in 24 h',
    nature: 'fact',
    note: '0 when there are none.',
    control: decimal(1, 0, 5000, 'mL'),
    group: 'intake',
  },
  {
    field: 'method',
    label: 'Method',
    nature: 'choice',
    note: '',
    control: optionsOf(MAINTENANCE_METHODS, METHOD_WORDS),
    group: 'order',
  },
  {
    field: 'temperatureC',
    label: 'Temperature',
    nature: 'choice',
    note: '',
    control: decimal(1, 30, 43, '°C'),
    group: 'order',
    askedWhen: { field: 'method', value: 'who' },
  },
  {
    field: 'newbornMlPerKgPerDay',
    label: 'Volume for a day',
    nature: 'choice',
    note: 'By hours since birth.',
    control: decimal(1, 1, 250, 'mL/kg/24 h'),
    group: 'order',
    askedWhen: { field: 'method', value: 'newborn' },
  },
  {
    field: 'fraction',
    label: 'Fraction of full maintenance',
    nature: 'choice',
    note: '',
    control: optionsOf(FRACTIONS, FRACTION_WORDS),
    group: 'order',
  },
  BASE,
  {
    field: 'addedPotassium',
    label: 'Potassium in the bag',
    nature: 'choice',
    note: 'Ready-mixed potassium chloride.',
    control: { type: 'potassium' },
    group: 'order',
  },
  {
    field: 'hours',
    label: 'Over',
    nature: 'choice',
    note: '24 h at most.',
    control: decimal(0, 1, 24, 'h'),
    group: 'order',
  },
  WAY,
  {
    field: 'rate',
    label: 'Rate on the pump',
    nature: 'fact',
    note: 'Has to follow from your own entries.',
    control: decimal(1, 0.1, 999, 'mL/h'),
    group: 'figures',
  },
  VOLUME,
];

const OVER_MINUTES: CheckEntry = {
  field: 'overMinutes',
  label: 'Over',
  nature: 'choice',
  note: '',
  control: decimal(0, 1, 240, 'min'),
  group: 'figures',
};

const BOLUS_SHORT: readonly CheckEntry[] = [...CHILD, WEIGHT, BASE, VOLUME, OVER_MINUTES];
const BOLUS: readonly CheckEntry[] = [...CHILD, WEIGHT, WEIGHT_SOURCE, BASE, WAY, VOLUME, OVER_MINUTES];

/** Emergency kinds are checked by the short form: child, weight, fluid, volume and time. */
export const isShortForm = (kind: Kind, urgency: Urgency): boolean =>
  kind === 'bolus' && urgency === 'emergency';

/** What a checker is asked for, in the order of the page. */
export function checkEntries(kind: Kind, shortForm: boolean): readonly CheckEntry[] {
  if (kind === 'maintenance') return MAINTENANCE;
  return shortForm ? BOLUS_SHORT : BOLUS;
}

/** Whether an entry is asked for as the form stands. */
export const isAsked = (entry: CheckEntry, form: CheckForm): boolean =>
  entry.askedWhen === undefined || form[entry.askedWhen.field].trim() === entry.askedWhen.value;
