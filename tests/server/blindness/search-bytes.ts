import type { Response } from 'supertest';

/** Lists a reader may see whole: the shelf, the chart's weights as measured, the limits, colleagues. */
const CHART_KEYS = new Set(['products', 'weights', 'rulebook', 'people']);

const withoutChart = (value: unknown): unknown => {
  if (Array.isArray(value)) return value.map(withoutChart);
  if (typeof value !== 'object' || value === null) return value;
  const kept = Object.entries(value).filter(([key]) => !CHART_KEYS.has(key));
  return Object.fromEntries(kept.map(([key, inner]) => [key, withoutChart(inner)]));
};

export type Planted = {
  /** Never in any byte a checker can reach. */
  anywhere: readonly string[];
  /** Known to the chart or the shelf, so never outside those lists: it would tell the choice. */
  asChoice: readonly string[];
};

/** What of the planted is in an answer: its bytes, its headers, and its JSON less the lists everyone may read. */
export function leaksIn(answer: Pick<Response, 'text' | 'headers'>, planted: Planted): string[] {
  const bytes = `${answer.text ?? ''}\n${JSON.stringify(answer.headers)}`;
  const found = planted.anywhere.filter((secret) => bytes.includes(secret));
  return [
    ...found,
    ...planted.asChoice.filter((secret) => outsideChart(bytes, answer.text).includes(secret)),
  ];
}

function outsideChart(bytes: string, text: string | undefined): string {
  try {
    return JSON.stringify(withoutChart(JSON.parse(text ?? 'null')));
  } catch {
    return bytes;
  }
}

/** The same of plain values: mail rows, log lines. */
export const leaksInText = (text: string, planted: Planted): string[] =>
  [...planted.anywhere, ...planted.asChoice].filter((secret) => text.includes(secret));
