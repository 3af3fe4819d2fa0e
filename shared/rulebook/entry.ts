import type { Certainty, ChoiceEntry, NumberEntry, RulebookEntry } from './document';

type Provenance = [source: string, certainty: Certainty];

export const HOLLIDAY: Provenance = ['Holliday & Segar 1957', 'read'];
export const WHO: Provenance = ['WHO Pocket Book 2013', 'read'];
export const NG29: Provenance = ['NICE NG29', 'read'];
export const PRACTICE: Provenance = ['common practice', 'common-practice'];
export const OURS: Provenance = ['ours', 'ours'];
export const MEMORY: Provenance = ['from memory', 'from-memory'];

/** A rulebook number: value, unit, the range a hospital may choose, what it means, where it is from. */
export const number = (
  value: number,
  unit: string,
  [min, max]: [min: number, max: number],
  label: string,
  [source, certainty]: Provenance,
): NumberEntry => ({ type: 'number', value, unit, min, max, source, certainty, label });

/** A rulebook choice among a few words. */
export const choice = <const Choice extends string>(
  value: Choice,
  choices: readonly Choice[],
  label: string,
  [source, certainty]: Provenance,
): ChoiceEntry<Choice> => ({
  type: 'choice',
  value,
  choices: [...choices],
  unit: '',
  source,
  certainty,
  label,
});

/** A section with the names of its entries kept in its type. */
export const section = <Entries extends Record<string, RulebookEntry>>(
  label: string,
  entries: Entries,
): { label: string; entries: Entries } => ({ label, entries });
