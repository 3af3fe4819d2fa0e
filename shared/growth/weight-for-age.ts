import type { Sex } from '../calc/types';
import boys from './weight-for-age-boys.json';
import girls from './weight-for-age-girls.json';

/** Box–Cox power, median in kg and coefficient of variation of one sex at one age. */
export type Lms = { l: number; m: number; s: number };

type Row = readonly [ageDays: number, l: number, m: number, s: number];

/** WHO 2006 and 2007 to 120 months, CDC 2000 from 120.5 to 240.5; a month is 30.4375 days. SOURCES.md. */
const TABLES = { male: boys, female: girls } as unknown as Readonly<Record<Sex, readonly Row[]>>;

/** The reference at an age in days, straight between its rows; undefined before birth and beyond the table. */
export function lmsAt(sex: Sex, ageDays: number): Lms | undefined {
  const rows = TABLES[sex];
  let low = 0;
  let high = rows.length - 1;
  const first = rows[low];
  const last = rows[high];
  if (!first || !last || !(ageDays >= first[0] && ageDays <= last[0])) return undefined;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (rows[middle]![0] <= ageDays) low = middle;
    else high = middle;
  }
  return between(rows[low]!, rows[high]!, ageDays);
}

function between(before: Row, after: Row, ageDays: number): Lms {
  const share = (ageDays - before[0]) / (after[0] - before[0]);
  const blend = (i: 1 | 2 | 3) => before[i] + (after[i] - before[i]) * share;
  return { l: blend(1), m: blend(2), s: blend(3) };
}

/** Cole's weight at z, kg, as the reference gives it; meant for z from −3 to 3. */
const plainWeight = ({ l, m, s }: Lms, z: number): number =>
  l === 0 ? m * Math.exp(s * z) : m * Math.pow(1 + l * s * z, 1 / l);

/** z = ((W ÷ M)^L − 1) ÷ (L·S); beyond ±3, ±3 plus the distance in gaps between the weights at ±2 and ±3. WHO 2006. */
export function zScore(kg: number, reference: Lms): number {
  const { l, m, s } = reference;
  const plain = l === 0 ? Math.log(kg / m) / s : (Math.pow(kg / m, l) - 1) / (l * s);
  if (Math.abs(plain) <= 3) return plain;
  const edge = Math.sign(plain) * 3;
  return edge + (kg - plainWeight(reference, edge)) / edgeGap(reference, edge);
}

/** The distance in kg between the weights at 2 and 3 on one side, above 0. */
const edgeGap = (reference: Lms, edge: number): number =>
  Math.abs(plainWeight(reference, edge) - plainWeight(reference, edge - Math.sign(edge)));

/** The weight in kg at a z-score, restricted beyond ±3 as `zScore` is; undefined outside the table's ages. */
export function weightAtZ(z: number, sex: Sex, ageDays: number): number | undefined {
  const reference = lmsAt(sex, ageDays);
  if (reference === undefined) return undefined;
  if (Math.abs(z) <= 3) return plainWeight(reference, z);
  const edge = Math.sign(z) * 3;
  return plainWeight(reference, edge) + (z - edge) * edgeGap(reference, edge);
}

/** The z-score of a weight for age; with sex not recorded the one of both that lies further out. */
export function weightForAge(kg: number, sex: Sex | undefined, ageDays: number): number | undefined {
  const scores = zScores(kg, sex, ageDays);
  const [first, second] = scores;
  if (first === undefined || second === undefined) return first;
  return Math.abs(second) > Math.abs(first) ? second : first;
}

/** The z-scores that may apply: one for a recorded sex, both otherwise, none outside the table's ages. */
export function zScores(kg: number, sex: Sex | undefined, ageDays: number): number[] {
  const sexes: readonly Sex[] = sex === undefined ? ['female', 'male'] : [sex];
  return sexes.flatMap((one) => {
    const reference = lmsAt(one, ageDays);
    return reference === undefined ? [] : [zScore(kg, reference)];
  });
}
