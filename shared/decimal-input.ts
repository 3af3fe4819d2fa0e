import { z } from 'zod';

/** What a number field takes: places after the point, inclusive bounds, and the unit its messages name. */
export type DecimalSpec = {
  decimals: number;
  /** Inclusive; a minus sign is accepted only where this is below 0. */
  min?: number;
  max?: number;
  unit?: string;
};

export type DecimalFault =
  | 'empty'
  | 'unfinished'
  | 'comma'
  | 'thousands'
  | 'two-points'
  | 'naked-point'
  | 'leading-zero'
  | 'plus'
  | 'negative'
  | 'exponent'
  | 'other-digits'
  | 'trailing-text'
  | 'stray-character'
  | 'too-long'
  | 'too-many-decimals'
  | 'too-small'
  | 'too-large';

export type DecimalReading = { ok: true; value: number } | { ok: false; code: DecimalFault; message: string };

type Rule = { code: DecimalFault; test: RegExp; message: (text: string, spec: DecimalSpec) => string };

/** The first rule that fits names the fault; the order goes from the most telling to the least. */
const FAULTS: readonly Rule[] = [
  { code: 'empty', test: /^$/, message: () => 'Enter a number.' },
  {
    code: 'other-digits',
    // digits of other scripts, full-width ones, ², ½
    test: /(?![0-9])[\p{N}]/u,
    message: () => 'Use the digits 0 to 9.',
  },
  { code: 'plus', test: /^\+/, message: () => 'Write the number without a plus sign.' },
  {
    code: 'thousands',
    test: /^-?(?:\d{1,3}(?:[,'’_\s]\d{3})+(?:[.,]\d*)?|\d{1,3}(?:\.\d{3})+,\d*)$/,
    message: () =>
      'Write the number without marks or spaces between thousands, and with a point for decimals.',
  },
  {
    code: 'comma',
    test: /^-?\d*,\d*$/,
    message: (text) => `Use a point, not a comma: ${text.replace(',', '.')}`,
  },
  { code: 'two-points', test: /\..*\./, message: () => 'There are two points in the number.' },
  {
    code: 'exponent',
    test: /^-?\d+\.?\d*e[+-]?\d*$/i,
    message: () => 'Write the number out in full, without an exponent.',
  },
  {
    code: 'trailing-text',
    test: /^-?\d+(?:\.\d+)?\s*[^\d.,\s]/u,
    message: (_text, { unit }) =>
      `Enter the number alone${unit === undefined ? '' : `; the unit is ${unit}`}.`,
  },
  { code: 'unfinished', test: /^-?(?:\d+\.|\.)?$/, message: () => 'The number is not finished.' },
  {
    code: 'naked-point',
    test: /^-?\.\d+$/,
    message: (text) => `Write a 0 before the point: ${text.replace('.', '0.')}`,
  },
  {
    code: 'leading-zero',
    test: /^-?0\d+(?:\.\d+)?$/,
    message: () => 'The number begins with a 0: is a point missing after it?',
  },
  { code: 'stray-character', test: /^(?!-?\d+(?:\.\d+)?$)/, message: () => 'This is not a number.' },
  // beyond 15 digits the machine's number is no longer the one typed
  { code: 'too-long', test: /^(?=(?:\D*\d){16})/, message: () => 'The number has too many digits.' },
];

/** Reads a typed decimal: spaces around it are ignored, everything else out of place is refused with its reason. */
export function readDecimal(text: string, spec: DecimalSpec): DecimalReading {
  const typed = text.trim();
  const fault = FAULTS.find(({ test }) => test.test(typed));
  if (fault !== undefined) return { ok: false, code: fault.code, message: fault.message(typed, spec) };
  if (typed.startsWith('-') && !(spec.min !== undefined && spec.min < 0)) {
    return { ok: false, code: 'negative', message: 'The number cannot be below 0.' };
  }
  const places = typed.split('.')[1]?.length ?? 0;
  if (places > spec.decimals)
    return { ok: false, code: 'too-many-decimals', message: placesMessage(spec.decimals) };
  return withinBounds(Number(typed), spec);
}

function placesMessage(decimals: number): string {
  if (decimals === 0) return 'Enter a whole number.';
  return `At most ${decimals} ${decimals === 1 ? 'digit' : 'digits'} after the point.`;
}

function withinBounds(value: number, { min, max, unit }: DecimalSpec): DecimalReading {
  const named = (bound: number) => (unit === undefined ? String(bound) : `${bound} ${unit}`);
  if (min !== undefined && value < min)
    return { ok: false, code: 'too-small', message: `At least ${named(min)}.` };
  if (max !== undefined && value > max)
    return { ok: false, code: 'too-large', message: `At most ${named(max)}.` };
  return { ok: true, value };
}

/** Schema of a decimal that travels as text; a JSON number is refused, as it cannot show what was typed. */
export function decimalInput(spec: DecimalSpec) {
  return z.string('Send the number as text.').transform((text, context): number => {
    const read = readDecimal(text, spec);
    if (read.ok) return read.value;
    context.addIssue({ code: 'custom', message: read.message, params: { code: read.code } });
    return z.NEVER;
  });
}
