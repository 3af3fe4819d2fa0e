/** Median of the middle: of an even count the mean of the two. */
export const median = (values: readonly number[]): number => {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = Math.floor(sorted.length / 2);
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
};

export const percentile = (values: readonly number[], p: number): number => {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor((p / 100) * sorted.length))]!;
};

export type Pair = { subject: number; baseline: number; ratio: number };

/**
 * Runs subject and baseline in turn, round by round, since this machine's speed drifts; returns the median of each
 * and the median of the ratios pair by pair (subject ÷ baseline).
 */
export async function interleave(
  rounds: number,
  subject: () => Promise<number> | number,
  baseline: () => Promise<number> | number,
): Promise<Pair> {
  await subject();
  await baseline();
  const pairs: [number, number][] = [];
  for (let round = 0; round < rounds; round += 1) {
    if (round % 2 === 0) pairs.push([await subject(), await baseline()]);
    else {
      const second = await baseline();
      pairs.push([await subject(), second]);
    }
  }
  return {
    subject: median(pairs.map(([a]) => a)),
    baseline: median(pairs.map(([, b]) => b)),
    ratio: median(pairs.map(([a, b]) => a / b)),
  };
}

/** Calls in a second, counted over about `ms`. */
export function perSecond(work: () => unknown, ms = 400): number {
  const started = performance.now();
  let count = 0;
  while (performance.now() - started < ms) {
    for (let i = 0; i < 100; i += 1) work();
    count += 100;
  }
  return (count * 1000) / (performance.now() - started);
}

export const round = (value: number, digits = 3): string => Number(value.toPrecision(digits)).toString();

/** One line of the report; `aim` says what was wanted. */
export function tell(what: string, words: string, aim = ''): void {
  console.log(`${what.padEnd(34)} ${words}${aim ? `   (aim ${aim})` : ''}`);
}
