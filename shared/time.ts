/** Milliseconds since 1970-01-01T00:00:00Z. The only representation of a moment inside the program. */
export type Instant = number & { readonly __brand: 'Instant' };

export const instant = (ms: number): Instant => {
  if (!Number.isSafeInteger(ms)) throw new RangeError('instant wants whole milliseconds');
  return ms as Instant;
};

export const MINUTE = 60_000;
export const HOUR = 3_600_000;
export const DAY = 86_400_000;
