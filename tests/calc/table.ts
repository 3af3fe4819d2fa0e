import { readFileSync } from 'node:fs';

export type Row = Record<string, string>;

/** Rows of a table of checked values; the last column is the source and may hold commas. */
export function readTable(name: string): Row[] {
  const path = new URL(`../../fixtures/calc/${name}.csv`, import.meta.url);
  const [head = '', ...lines] = readFileSync(path, 'utf8').trim().split('\n');
  const columns = head.split(',');
  return lines.map((line) => {
    const cells = line.split(',');
    const source = cells.slice(columns.length - 1).join(',');
    const row = Object.fromEntries<string>(columns.map((column, i) => [column, cells[i] ?? '']));
    if (!source) throw new Error(`a row of ${name} has no source: ${line}`);
    return { ...row, source };
  });
}

/** A cell that may be empty. */
export const optional = (cell: string | undefined): number | undefined =>
  cell === undefined || cell === '' ? undefined : Number(cell);
