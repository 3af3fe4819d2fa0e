import type { WardRow } from '@shared/routes/children';
import { isIn, STATE_WORDS, type VersionState } from '@shared/orders/states';

/** States that the filter offers, in the order of the day; those without a row are not shown. */
export const FILTER_STATES: readonly VersionState[] = [
  'draft',
  'awaiting-check',
  'disputed',
  'returned',
  'awaiting-pharmacist',
  'signed',
  'running',
  'held',
  'away',
  'stopped',
  'lapsed',
  'finished',
  'given',
];

export const countStates = (
  rows: readonly WardRow[],
): { state: VersionState; count: number; word: string }[] =>
  FILTER_STATES.map((state) => ({
    state,
    word: STATE_WORDS[state],
    count: rows.filter(({ orders }) => orders.some((order) => isIn(order.state, state))).length,
  })).filter(({ count }) => count > 0);

const plain = (text: string): string => text.toLowerCase().replace(/\s+/g, '');

/** Rows whose child, bed or number holds the text, and that have an order in the state, if one is chosen. */
export function filterRows(rows: readonly WardRow[], text: string, state: VersionState | null): WardRow[] {
  const wanted = plain(text);
  return rows.filter(
    ({ child, orders }) =>
      (wanted === '' ||
        [child.surname + child.given, child.given + child.surname, child.number, child.bed ?? ''].some(
          (part) => plain(part).includes(wanted),
        )) &&
      (state === null || orders.some((order) => isIn(order.state, state))),
  );
}
