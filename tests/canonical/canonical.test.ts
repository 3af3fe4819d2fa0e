import { canonicalText, decimalText } from '@shared/canonical';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

describe('canonicalText', () => {
  it.each([
    [{ b: 1, a: [true, null, 'x'] }, '{"a":[true,null,"x"],"b":1}'],
    // code units, not the alphabet: capitals come first, é after z
    [{ é: 1, z: 2, Z: 3, '10': 4, '9': 5 }, '{"10":4,"9":5,"Z":3,"z":2,"é":1}'],
    // a quote sorts by itself, not by the backslash of its JSON form
    [{ '"': 1, '#': 2, A: 3, '\\': 4 }, '{"\\"":1,"#":2,"A":3,"\\\\":4}'],
    // an astral character is two units from d800 and sorts before U+FFFD
    [{ '\ufffd': 1, '\u{1f600}': 2 }, '{"\u{1f600}":2,"\ufffd":1}'],
    [{ name: 'Zoe\u0308' }, '{"name":"Zo\u00eb"}'],
    [-0, '0'],
    [{}, '{}'],
    ['line\nbreak', '"line\\nbreak"'],
  ])('%j', (value, text) => {
    expect(canonicalText(value)).toBe(text);
  });

  it.each([
    ['undefined', { a: undefined }],
    ['undefined in a list', [undefined]],
    ['a hole', new Array(1)],
    ['a decimal number', { rate: 44.1 }],
    ['NaN', NaN],
    ['Infinity', Infinity],
    ['an unsafe integer', 2 ** 53],
    ['a bigint', 1n],
    ['a date', new Date(0)],
    ['a map', new Map()],
    ['a function', { f: () => 1 }],
    ['a symbol', Symbol('s')],
    ['a lone surrogate', '\ud800'],
    ['a NUL', 'a\0b'],
    ['two keys that are one after NFC', { 'e\u0301': 1, é: 2 }],
  ])('refuses %s', (_name, value) => {
    expect(() => canonicalText(value)).toThrow(TypeError);
  });

  it('keeps a key named __proto__', () => {
    expect(canonicalText(JSON.parse('{"__proto__":1}'))).toBe('{"__proto__":1}');
  });

  it('says where the fault is', () => {
    expect(() => canonicalText({ a: [{ kg: 1.5 }] })).toThrow('$.a[0].kg');
  });

  it('is stable when read and written again, whatever the key order', () => {
    const leaf = fc.oneof(
      fc.string({ unit: 'grapheme' }),
      fc.maxSafeInteger(),
      fc.boolean(),
      fc.constant(null),
    );
    const tree = fc.letrec((tie) => ({
      node: fc.oneof(
        { depthSize: 'small' },
        leaf,
        fc.array(tie('node')),
        fc.dictionary(fc.string(), tie('node')),
      ),
    })).node;
    fc.assert(
      fc.property(tree, (value) => {
        let text: string;
        try {
          text = canonicalText(value);
        } catch {
          return; // a drawn NUL
        }
        expect(canonicalText(JSON.parse(text))).toBe(text);
        expect(canonicalText(reversed(value))).toBe(text);
      }),
    );
  });
});

function reversed(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(reversed);
  if (typeof value !== 'object' || value === null) return value;
  const entries = Object.entries(value).reverse();
  return Object.fromEntries(entries.map(([key, item]) => [key, reversed(item)]));
}

describe('decimalText', () => {
  it.each([
    [44, 1, '44.0'],
    [16.4, 3, '16.400'],
    [0, 0, '0'],
    [-0, 1, '0.0'],
    [-1.5, 2, '-1.50'],
    [104, 0, '104'],
    [0.001, 3, '0.001'],
  ])('%d at %d places is %s', (value, scale, text) => {
    expect(decimalText(value, scale)).toBe(text);
  });

  it.each([
    [0.1 + 0.2, 3],
    [44.05, 1],
    [0.5, 0],
    [1e-7, 6],
    [1e21, 0],
    [NaN, 1],
    [Infinity, 1],
  ])('refuses %d at %d places', (value, scale) => {
    expect(() => decimalText(value, scale)).toThrow(RangeError);
  });
});
