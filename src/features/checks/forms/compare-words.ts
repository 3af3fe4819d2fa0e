import type { ComparedRow, Comparison } from '@shared/checks/form';

/** Rows that only say that a set's own arithmetic holds: told in one line while it does. */
const ARITHMETIC = new Set(['author-arithmetic', 'own-arithmetic']);
const isArithmetic = ({ field }: ComparedRow): boolean => ARITHMETIC.has(field);
const isQuiet = (row: ComparedRow): boolean => row.agrees && isArithmetic(row);

/** Whether each set was worked out again and follows from its own entries. */
export const arithmeticHolds = ({ rows }: Comparison): boolean =>
  rows.some(isArithmetic) && rows.filter(isArithmetic).every(({ agrees }) => agrees);

/** Agreeing rows first, then those that differ, each in the order of the page. */
export function shownRows({ rows }: Comparison): ComparedRow[] {
  const shown = rows.filter((row) => !isQuiet(row));
  return [...shown.filter(({ agrees }) => agrees), ...shown.filter(({ agrees }) => !agrees)];
}

const differing = ({ rows }: Comparison): ComparedRow[] => rows.filter(({ agrees }) => !agrees);

/** Another weight or intake moves the arithmetic with it: then that is not a difference of its own. */
function named(comparison: Comparison): ComparedRow[] {
  const differ = differing(comparison);
  const hasCause = differ.some(({ field }) => field === 'weightKg' || field === 'intake');
  return hasCause ? differ.filter((row) => !isArithmetic(row)) : differ;
}

/** The one choice or fact that everything else follows from, where there is just one. */
export function causeOf(comparison: Comparison): string | null {
  const causes = differing(comparison).filter(({ nature }) => nature !== 'follows');
  return causes.length === 1 && differing(comparison).length > 1 ? (causes[0]?.field ?? null) : null;
}

const listed = (words: readonly string[]): string =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;

const lower = (label: string): string => label.charAt(0).toLowerCase() + label.slice(1);

const HEADLINES: readonly [field: string, words: string][] = [
  ['weightKg', 'The weights do not agree'],
  ['base', 'The fluids do not agree'],
  ['rate', 'The rates do not agree'],
  ['volumeMl', 'The volumes do not agree'],
];

/** The page's first words. */
export function headline(comparison: Comparison): string {
  if (comparison.outcome === 'agreed') return 'Both sets agree';
  const differ = differing(comparison);
  if (comparison.outcome === 'choices-differ') {
    const choices = differ.filter(({ nature }) => nature === 'choice').length;
    return choices === 1 ? 'One choice differs' : `${choices} choices differ`;
  }
  const facts = differ.filter(({ nature }) => nature === 'fact').map(({ field }) => field);
  return HEADLINES.find(([field]) => facts.includes(field))?.[1] ?? 'The figures do not agree';
}

/** What differs, by name, and what follows from it. */
export function ledeOf(comparison: Comparison): string {
  if (comparison.outcome === 'agreed')
    return 'Every fact and every choice is the same, within the tolerance.';
  const differ = named(comparison);
  const names = (follows: boolean) =>
    listed(
      differ.filter(({ nature }) => (nature === 'follows') === follows).map(({ label }) => lower(label)),
    );
  const causes = names(false);
  const follow = names(true);
  const first = `What differs: ${causes}.`;
  const second = follow ? ` From it follows: ${follow}.` : '';
  return `${first}${second} The order is not in force, and no pump may start on it.`;
}

/** "44 mL/h" in its parts; null where it is not a figure with its unit. */
export function figureOf(text: string): { value: string; unit: string } | null {
  const match = /^(\d+(?:\.\d+)?) (mL\/h|mL|kg|h|min)$/.exec(text);
  return match?.[1] && match[2] ? { value: match[1], unit: match[2] } : null;
}
