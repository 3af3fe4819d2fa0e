import type { DEFAULT_SECTIONS } from './default';
import { DEFAULT_SECTIONS as KNOWN } from './default';
import type { Rulebook } from './document';

type Known = typeof DEFAULT_SECTIONS;
export type SectionName = keyof Known;

/** The values of every section, by name; units stand in the rulebook's entries. */
export type RuleValues = {
  [S in SectionName]: {
    [E in keyof Known[S]['entries']]: Known[S]['entries'][E] extends { value: infer V } ? V : never;
  };
};

/** A rulebook opened for reading: plain values, and where each of them is from. */
export type OpenRulebook = {
  number: number;
  values: RuleValues;
  sources: { [S in SectionName]: { [E in keyof Known[S]['entries']]: string } };
  /** Sections that are absent or lack an entry this edition reads. */
  silent: ReadonlySet<SectionName>;
};

const opened = new WeakMap<Rulebook, OpenRulebook>();

/** Opens a rulebook once; later calls with the same object are a look-up. */
export function openRulebook(rulebook: Rulebook): OpenRulebook {
  const known = opened.get(rulebook);
  if (known) return known;
  const open = read(rulebook);
  opened.set(rulebook, open);
  return open;
}

/** The values of a rulebook that must hold the section; throws RangeError where it is silent. */
export function ruleValues<S extends SectionName>(rulebook: Rulebook, section: S): RuleValues[S] {
  const open = openRulebook(rulebook);
  if (open.silent.has(section))
    throw new RangeError(`rulebook ${rulebook.number} says nothing of ${section}`);
  return open.values[section];
}

/** The first of the sections a kind needs that this rulebook lacks. */
export const silentOn = (open: OpenRulebook, needed: readonly SectionName[]): SectionName | undefined =>
  open.silent.size === 0 ? undefined : needed.find((section) => open.silent.has(section));

function read(rulebook: Rulebook): OpenRulebook {
  const values: Record<string, Record<string, number | string>> = {};
  const sources: Record<string, Record<string, string>> = {};
  const silent = new Set<SectionName>();
  for (const name of Object.keys(KNOWN) as SectionName[]) {
    const entries = rulebook.sections[name]?.entries ?? {};
    const wanted = Object.entries(KNOWN[name].entries) as [string, { type: string }][];
    if (wanted.some(([key, { type }]) => entries[key]?.type !== type)) silent.add(name);
    const present = wanted.flatMap(([key]) => (entries[key] ? [[key, entries[key]] as const] : []));
    values[name] = Object.fromEntries(present.map(([key, entry]) => [key, entry.value]));
    sources[name] = Object.fromEntries(present.map(([key, entry]) => [key, entry.source]));
  }
  return {
    number: rulebook.number,
    values: values as RuleValues,
    sources: sources as OpenRulebook['sources'],
    silent,
  };
}
