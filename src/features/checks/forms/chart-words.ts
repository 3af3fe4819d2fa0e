import type { CheckPage } from '@shared/routes/checks';
import { formatDayTime, parseInstant } from '@shared/time';
import { kgText, METHOD_WORDS } from '@shared/weights/chart-weight';

export const dayTime = (at: string, zone: string): string => {
  const moment = parseInstant(at);
  return moment === undefined ? '' : formatDayTime(moment, zone);
};

type Result = CheckPage['results'][number];

/** Results of one moment on one line, the unit once where they share it: "Sodium 136, potassium 3.9 mmol/L". */
function resultLine(results: readonly Result[]): string {
  const isOneUnit = results.every(({ unit }) => unit === results[0]?.unit);
  const parts = results.map(
    ({ analyte, value, unit }) => `${analyte} ${String(Number(value))}${isOneUnit ? '' : ` ${unit}`}`,
  );
  const text = `${parts.join(', ')}${isOneUnit && results[0] ? ` ${results[0].unit}` : ''}`;
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/** Blood results by the moment they were taken, the newest first; those older than the newest few are on the chart. */
export function resultLines({ results, zone }: CheckPage): { when: string; text: string }[] {
  const moments = [...new Set(results.map(({ at }) => at))].sort().reverse().slice(0, 3);
  return moments.map((at) => ({
    when: dayTime(at, zone),
    text: resultLine(results.filter((result) => result.at === at)),
  }));
}

/** Chart weights as measured, in chart order; none of them is marked. */
export const weightLines = ({ weights, zone }: CheckPage) =>
  weights.map(({ id, kg, method, at, usable, stale }) => ({
    id,
    text: kgText(Number(kg)),
    how: [
      `${dayTime(at, zone)}, ${METHOD_WORDS[method]}`,
      stale,
      usable ? '' : 'a second measurement is owed',
    ]
      .filter(Boolean)
      .join('; '),
  }));
