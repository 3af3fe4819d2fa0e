/** An exact fraction; the denominator is above 0. Not reduced: the numbers of one order stay short. */
export type Exact = { n: bigint; d: bigint };

/** A decimal as it is written, without its binary error: 16.4 is 164/10; throws RangeError on any other form. */
export function exact(decimal: number): Exact {
  const text = String(decimal);
  const point = text.indexOf('.');
  const places = point < 0 ? 0 : text.length - point - 1;
  const digits = point < 0 ? text : text.slice(0, point) + text.slice(point + 1);
  if (!/^-?\d+$/.test(digits)) throw new RangeError(`not a plain decimal: ${text}`);
  return { n: BigInt(digits), d: 10n ** BigInt(places) };
}

export const whole = (n: number): Exact => ({ n: BigInt(n), d: 1n });
export const ZERO = whole(0);

export const plus = (a: Exact, b: Exact): Exact => ({ n: a.n * b.d + b.n * a.d, d: a.d * b.d });
export const minus = (a: Exact, b: Exact): Exact => ({ n: a.n * b.d - b.n * a.d, d: a.d * b.d });
export const times = (a: Exact, b: Exact): Exact => ({ n: a.n * b.n, d: a.d * b.d });

/** a ÷ b for b above 0. */
export function over(a: Exact, b: Exact): Exact {
  if (b.n <= 0n) throw new RangeError('divides by a number above 0 only');
  return { n: a.n * b.d, d: a.d * b.n };
}

/** −1, 0 or 1 as a is less than, equal to or more than b. */
export function compare(a: Exact, b: Exact): -1 | 0 | 1 {
  const left = a.n * b.d;
  const right = b.n * a.d;
  return left < right ? -1 : left > right ? 1 : 0;
}

export const lesser = (a: Exact, b: Exact): Exact => (compare(a, b) <= 0 ? a : b);

/** a where it is above 0, else 0. */
export const positivePart = (a: Exact): Exact => (a.n > 0n ? a : ZERO);

/** The nearest multiple of a step for a value of at least 0, halves upwards. */
export function nearestMultiple(value: Exact, step: Exact): Exact {
  const steps = over(value, step);
  return times({ n: (2n * steps.n + steps.d) / (2n * steps.d), d: 1n }, step);
}

/** The double nearest to a fraction of few digits. */
export function toNumber({ n, d }: Exact): number {
  const places = 10n ** 6n;
  const scaled = (n * places) / d;
  return scaled * d === n * places ? Number(scaled) / Number(places) : Number(n) / Number(d);
}
