import { decimalInput, readDecimal, type DecimalFault, type DecimalSpec } from '@shared/decimal-input';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

const KG: DecimalSpec = { decimals: 3, min: 0.3, max: 200, unit: 'kg' };
const PLAIN: DecimalSpec = { decimals: 3 };
const SIGNED: DecimalSpec = { decimals: 1, min: -20, max: 20 };

describe('readDecimal', () => {
  it.each([
    ['44', PLAIN, 44],
    ['44.0', PLAIN, 44],
    ['  16.4 ', PLAIN, 16.4],
    ['\t0.5\n', PLAIN, 0.5],
    ['0', PLAIN, 0],
    ['0.000', PLAIN, 0],
    ['200', KG, 200],
    ['200.000', KG, 200],
    ['0.3', KG, 0.3],
    ['-5.5', SIGNED, -5.5],
    ['-20', SIGNED, -20],
  ])('takes %j', (text, spec, value) => {
    expect(readDecimal(text, spec)).toEqual({ ok: true, value });
  });

  const refused: [string, DecimalFault, DecimalSpec?][] = [
    ['', 'empty'],
    ['   ', 'empty'],
    ['.', 'unfinished'],
    ['44.', 'unfinished'],
    ['-', 'unfinished', SIGNED],
    ['-3.', 'unfinished', SIGNED],
    ['16,4', 'comma'],
    ['16,', 'comma'],
    [',5', 'comma'],
    ['1,000', 'thousands'],
    ['1,000.5', 'thousands'],
    ['1.000,5', 'thousands'],
    ['1 000', 'thousands'],
    ['1\u00a0000', 'thousands'],
    ['1\u202f000', 'thousands'],
    ["1'000", 'thousands'],
    ['1_000', 'thousands'],
    ['1.2.3', 'two-points'],
    ['1..2', 'two-points'],
    ['1.000.000', 'two-points'],
    ['..', 'two-points'],
    ['.5', 'naked-point'],
    ['-.5', 'naked-point', SIGNED],
    ['05', 'leading-zero'],
    ['00.5', 'leading-zero'],
    ['+5', 'plus'],
    ['+', 'plus'],
    ['-5', 'negative'],
    ['-0.1', 'negative', KG],
    ['4.4e1', 'exponent'],
    ['1e3', 'exponent'],
    ['1E-3', 'exponent'],
    ['5e', 'exponent'],
    ['１６.４', 'other-digits'],
    ['١٦', 'other-digits'],
    ['16²', 'other-digits'],
    ['1½', 'other-digits'],
    ['16.4 kg', 'trailing-text'],
    ['16kg', 'trailing-text'],
    ['44.0;', 'trailing-text'],
    ['3-4', 'trailing-text'],
    ['0x10', 'trailing-text'],
    ['10%', 'trailing-text'],
    ['16·4', 'trailing-text'],
    ['16\u200b', 'trailing-text'],
    ['l6', 'stray-character'],
    ['O.5', 'stray-character'],
    ['NaN', 'stray-character'],
    ['Infinity', 'stray-character'],
    ['null', 'stray-character'],
    ['4 4', 'stray-character'],
    ['- 5', 'stray-character', SIGNED],
    ['--5', 'stray-character', SIGNED],
    ['−5', 'stray-character', SIGNED],
    ['<5', 'stray-character'],
    ['12345678901234.567', 'too-long'],
    ['16.4001', 'too-many-decimals', KG],
    ['16.4000', 'too-many-decimals', KG],
    ['4.5', 'too-many-decimals', { decimals: 0 }],
    ['0.299', 'too-small', KG],
    ['0', 'too-small', KG],
    ['-20.1', 'too-small', SIGNED],
    ['200.001', 'too-large', KG],
    ['1000', 'too-large', KG],
  ];
  it.each(refused)('refuses %j as %s', (text, code, spec = PLAIN) => {
    expect(readDecimal(text, spec)).toMatchObject({ ok: false, code });
  });

  it.each([
    ['16,4', PLAIN, 'Use a point, not a comma: 16.4'],
    ['.5', PLAIN, 'Write a 0 before the point: 0.5'],
    ['16.4 kg', KG, 'Enter the number alone; the unit is kg.'],
    ['0.2', KG, 'At least 0.3 kg.'],
    ['201', KG, 'At most 200 kg.'],
    ['1.25', SIGNED, 'At most 1 digit after the point.'],
    ['1.5', { decimals: 0 }, 'Enter a whole number.'],
  ])('says what to do about %j', (text, spec, message) => {
    expect(readDecimal(text, spec)).toMatchObject({ message });
  });

  it('never takes a text that is not the plain decimal of its value', () => {
    const alphabet = fc.constantFrom(..."0123456789.,-+eE _x'kg٤４");
    fc.assert(
      fc.property(fc.string({ unit: alphabet, maxLength: 8 }), (text) => {
        const read = readDecimal(text, { decimals: 3, min: -1e9 });
        if (read.ok) expect(text.trim()).toMatch(/^-?(0|[1-9]\d*)(\.\d{1,3})?$/);
      }),
      { numRuns: 3000 },
    );
  });
});

describe('decimalInput', () => {
  const schema = decimalInput(KG);

  it('gives the number of a text', () => {
    expect(schema.parse('16.400')).toBe(16.4);
  });

  it.each([[16.4], [null], [undefined], [true], [['16.4']]])('refuses %j, which is no text', (value) => {
    expect(schema.safeParse(value).success).toBe(false);
  });

  it('carries the words and the code of the fault', () => {
    const result = schema.safeParse('16,4');
    expect(result.error?.issues[0]).toMatchObject({
      message: 'Use a point, not a comma: 16.4',
      params: { code: 'comma' },
    });
  });
});
