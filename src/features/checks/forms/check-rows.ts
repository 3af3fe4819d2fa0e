import type { Kind } from '@shared/calc/types';
import { checkEntries, isAsked, type CheckEntry } from '@shared/checks/entries';
import type { CheckForm, CheckFormField } from '@shared/checks/form';

/** One line of the page: its head in the margin, its fields beside it. */
export type CheckRow = {
  key: string;
  head: string;
  note: string;
  entries: readonly CheckEntry[];
  /** The one large figure, which the cover keeps the height of too. */
  isTall: boolean;
};

type Head = { head: string; note: string };

const GROUP_HEADS: Partial<Record<CheckEntry['group'], Head>> = {
  child: { head: 'Child', note: 'enter again' },
  weight: { head: 'Weight', note: 'you confirmed' },
  intake: { head: 'Other intake', note: 'in 24 h, 0 if none' },
};
const FIELD_HEADS: Partial<Record<CheckFormField, Head>> = {
  method: { head: 'Method', note: '' },
  fraction: { head: 'Fraction', note: 'of full maintenance' },
  base: { head: 'Fluid', note: '' },
  addedPotassium: { head: 'Potassium', note: 'in the ready bag' },
  hours: { head: 'Over', note: '24 h at most' },
  workedOutBy: { head: 'Worked out', note: 'is recorded' },
  rate: { head: 'Rate', note: 'on the pump' },
  volumeMl: { head: 'Total volume', note: '' },
  overMinutes: { head: 'Over', note: '' },
};

/** Entries that stand on one line: a group, or a field with what is asked only because of it. */
const lineOf = ({ group, field, askedWhen }: CheckEntry): string =>
  GROUP_HEADS[group] ? group : (askedWhen?.field ?? field);

/** The lines of a check as the form stands. */
export function checkRows(kind: Kind, shortForm: boolean, form: CheckForm): CheckRow[] {
  const rows = new Map<string, CheckEntry[]>();
  for (const entry of checkEntries(kind, shortForm).filter((each) => isAsked(each, form))) {
    const line = lineOf(entry);
    rows.set(line, [...(rows.get(line) ?? []), entry]);
  }
  const large: CheckFormField = kind === 'maintenance' ? 'rate' : 'volumeMl';
  return [...rows].map(([key, entries]) => {
    const [first] = entries;
    const head = (first && (GROUP_HEADS[first.group] ?? FIELD_HEADS[first.field])) ?? {
      head: first?.label ?? '',
      note: '',
    };
    return {
      key,
      ...head,
      entries,
      isTall: key === large || (key === 'workedOutBy' && form.workedOutBy === 'program'),
    };
  });
}
