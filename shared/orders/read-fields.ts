import { readDecimal, type DecimalSpec } from '../decimal-input';
import { localDateTimeToInstant, type Instant } from '../time';
import type { OrderForm, OrderFormField } from './form';

type NumberField = { spec: DecimalSpec; missing: string };

/** What each number field takes, and what it says while it is empty. */
export const NUMBER_FIELDS = {
  temperatureC: {
    spec: { decimals: 1, min: 25, max: 45, unit: '°C' },
    missing: 'Type the temperature in °C, for example 38.2.',
  },
  newbornMlPerKgPerDay: {
    spec: { decimals: 1, min: 1, max: 300, unit: 'mL/kg/day' },
    missing: 'Type the volume in mL/kg/day, for example 60.',
  },
  feedsMl: {
    spec: { decimals: 1, min: 0, max: 9999, unit: 'mL' },
    missing: 'Type feeds and drinks in mL for 24 h; 0 when there are none.',
  },
  drugsMl: {
    spec: { decimals: 1, min: 0, max: 9999, unit: 'mL' },
    missing: 'Type drugs, flushes and other lines in mL for 24 h; 0 when there are none.',
  },
  typedRate: {
    spec: { decimals: 1, min: 0.1, max: 999, unit: 'mL/h' },
    missing: 'Type the rate in mL/h, for example 44.',
  },
  mlPerKg: {
    spec: { decimals: 1, min: 0.1, max: 100, unit: 'mL/kg' },
    missing: 'Type the dose in mL/kg, for example 10.',
  },
  volumeMl: {
    spec: { decimals: 1, min: 0.1, max: 9999, unit: 'mL' },
    missing: 'Type the volume in mL, for example 160.',
  },
  overMinutes: {
    spec: { decimals: 0, min: 1, max: 720, unit: 'min' },
    missing: 'Type over how many minutes, for example 10.',
  },
  hours: {
    spec: { decimals: 0, min: 1, max: 72, unit: 'h' },
    missing: 'Type for how many hours, for example 24.',
  },
} as const satisfies Partial<Record<OrderFormField, NumberField>>;
export type NumberFormField = keyof typeof NUMBER_FIELDS;

/** Collects what is wrong with a form, so that one pass names every field. */
export class FieldReader {
  readonly missing: OrderFormField[] = [];
  readonly fields: Partial<Record<OrderFormField, string>> = {};

  constructor(
    private readonly form: OrderForm,
    private readonly zone: string,
  ) {}

  get isClean(): boolean {
    return Object.keys(this.fields).length === 0;
  }

  wrong(field: OrderFormField, message: string): undefined {
    this.fields[field] ??= message;
    return undefined;
  }

  empty(field: OrderFormField, message: string): undefined {
    this.missing.push(field);
    return this.wrong(field, message);
  }

  /** Trimmed text, empty or not. */
  text(field: OrderFormField): string {
    return this.form[field].trim();
  }

  required(field: OrderFormField, message: string): string | undefined {
    return this.text(field) === '' ? this.empty(field, message) : this.text(field);
  }

  oneOf<const Choice extends string>(
    field: OrderFormField,
    choices: readonly Choice[],
    message: string,
  ): Choice | undefined {
    const text = this.required(field, message);
    if (text === undefined) return undefined;
    return choices.find((choice) => choice === text) ?? this.wrong(field, message);
  }

  /** A number that must be stated. */
  number(field: NumberFormField): number | undefined {
    return this.text(field) === ''
      ? this.empty(field, NUMBER_FIELDS[field].missing)
      : this.optionalNumber(field);
  }

  /** A number that may be left out; undefined when it is, or when it cannot be read. */
  optionalNumber(field: NumberFormField): number | undefined {
    if (this.text(field) === '') return undefined;
    const reading = readDecimal(this.form[field], NUMBER_FIELDS[field].spec);
    return reading.ok ? reading.value : this.wrong(field, reading.message);
  }

  moment(field: OrderFormField, message: string): Instant | undefined {
    return this.text(field) === '' ? this.empty(field, message) : this.optionalMoment(field);
  }

  optionalMoment(field: OrderFormField): Instant | undefined {
    if (this.text(field) === '') return undefined;
    const reading = localDateTimeToInstant(this.text(field), this.zone);
    return reading.ok ? reading.instant : this.wrong(field, reading.message);
  }
}
