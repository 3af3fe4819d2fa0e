import {
  FRACTIONS,
  MAINTENANCE_METHODS,
  type Fraction,
  type Kind,
  type MaintenanceMethod,
} from '../calc/types';
import { readDecimal } from '../decimal-input';
import {
  hours,
  kilograms,
  millilitres,
  millilitresPerHour,
  minutes,
  type Hours,
  type Kilograms,
  type Millilitres,
  type MillilitresPerHour,
  type Minutes,
} from '../units';
import { AGE_UNITS, checkEntries, isAsked, REENTERED_SEXES, type AgeUnit, type CheckEntry } from './entries';
import { WEIGHT_SOURCES, WORKED_OUT_BY, type CheckForm, type CheckFormField } from './form';

export type ReenteredChild = {
  initials: string;
  sex: (typeof REENTERED_SEXES)[number];
  age: number;
  ageUnit: AgeUnit;
};

export type MaintenanceEntries = {
  kind: 'maintenance';
  feeds: Millilitres;
  drugs: Millilitres;
  method: MaintenanceMethod;
  temperatureC?: number;
  newbornMlPerKgPerDay?: number;
  fraction: Fraction;
  base: string;
  /** mmol/L in the ready-mixed bag. */
  addedPotassium: number;
  hours: Hours;
  rate: MillilitresPerHour;
  volume: Millilitres;
};
export type BolusEntries = {
  kind: 'bolus';
  base: string;
  volume: Millilitres;
  over: Minutes;
};

/** A checker's own figures, read and in units. */
export type CheckEntries = {
  child: ReenteredChild;
  kg: Kilograms;
  /** Not asked for by the short form. */
  weightSource?: (typeof WEIGHT_SOURCES)[number];
  workedOutBy?: (typeof WORKED_OUT_BY)[number];
  order: MaintenanceEntries | BolusEntries;
};

export type FieldFault = { field: CheckFormField; message: string };
export type CheckFormReading = { ok: true; entries: CheckEntries } | { ok: false; errors: FieldFault[] };

type Asked = { kind: Kind; shortForm: boolean };

/** Reads a checker's form; every entry that is missing or malformed is named, nothing is filled in. */
export function readCheckForm(form: CheckForm, { kind, shortForm }: Asked): CheckFormReading {
  const asked = checkEntries(kind, shortForm).filter((entry) => isAsked(entry, form));
  const errors = asked.flatMap((entry) => faultOf(entry, form[entry.field]));
  if (errors.length > 0) return { ok: false, errors };
  return { ok: true, entries: entriesOf(form, kind, new Set(asked.map(({ field }) => field))) };
}

/** Which entries the program's own work-out still lacks: all but the figures it would give. */
export function readForWorkOut(form: CheckForm, asked: Asked): CheckFormReading {
  const figures: CheckForm = { ...form, initials: 'x', sex: 'not-recorded', age: '1', ageUnit: 'years' };
  const given: Partial<CheckForm> =
    asked.kind === 'maintenance'
      ? { rate: '1', volumeMl: '1', workedOutBy: 'program', weightSource: 'read-from-chart' }
      : {};
  return readCheckForm({ ...figures, ...given }, asked);
}

function faultOf({ field, control }: CheckEntry, typed: string): FieldFault[] {
  const text = typed.trim();
  if (control.type === 'decimal') {
    const reading = readDecimal(text, control.spec);
    return reading.ok ? [] : [{ field, message: reading.message }];
  }
  if (control.type === 'options') {
    const known = control.options.some(({ value }) => value === text);
    return known ? [] : [{ field, message: 'Choose one.' }];
  }
  if (control.type === 'potassium') {
    const reading = readDecimal(text, { decimals: 1, min: 0, max: 200, unit: 'mmol/L' });
    if (reading.ok) return [];
    return [{ field, message: text === '' ? 'Choose one.' : reading.message }];
  }
  if (text === '') {
    return [{ field, message: control.type === 'base' ? 'Choose a fluid.' : 'Enter the initials.' }];
  }
  if (control.type === 'text' && text.length > control.maxLength) {
    return [{ field, message: `At most ${control.maxLength} characters.` }];
  }
  return [];
}

const pick = <const V extends string>(values: readonly V[], text: string): V => {
  const found = values.find((value) => value === text.trim());
  if (found === undefined) throw new RangeError(`not one of ${values.join(', ')}`);
  return found;
};

function entriesOf(form: CheckForm, kind: Kind, asked: ReadonlySet<CheckFormField>): CheckEntries {
  const { weightSource, workedOutBy } = form;
  return {
    child: {
      initials: form.initials.trim(),
      sex: pick(REENTERED_SEXES, form.sex),
      age: Number(form.age.trim()),
      ageUnit: pick(AGE_UNITS, form.ageUnit),
    },
    kg: kilograms(Number(form.weightKg.trim())),
    ...(asked.has('weightSource') ? { weightSource: pick(WEIGHT_SOURCES, weightSource) } : {}),
    ...(asked.has('workedOutBy') ? { workedOutBy: pick(WORKED_OUT_BY, workedOutBy) } : {}),
    order: kind === 'maintenance' ? maintenanceOf(form, asked) : bolusOf(form),
  };
}

function maintenanceOf(form: CheckForm, asked: ReadonlySet<CheckFormField>): MaintenanceEntries {
  const number = (field: CheckFormField) => Number(form[field].trim());
  return {
    kind: 'maintenance',
    feeds: millilitres(number('feedsMl')),
    drugs: millilitres(number('drugsMl')),
    method: pick(MAINTENANCE_METHODS, form.method),
    ...(asked.has('temperatureC') ? { temperatureC: number('temperatureC') } : {}),
    ...(asked.has('newbornMlPerKgPerDay') ? { newbornMlPerKgPerDay: number('newbornMlPerKgPerDay') } : {}),
    fraction: pick(FRACTIONS, form.fraction),
    base: form.base.trim(),
    addedPotassium: number('addedPotassium'),
    hours: hours(number('hours')),
    rate: millilitresPerHour(number('rate')),
    volume: millilitres(number('volumeMl')),
  };
}

const bolusOf = (form: CheckForm): BolusEntries => ({
  kind: 'bolus',
  base: form.base.trim(),
  volume: millilitres(Number(form.volumeMl.trim())),
  over: minutes(Number(form.overMinutes.trim())),
});
