import type { Rulebook } from '../rulebook/document';
import { exact } from './exact';
import type { Exact } from './exact';

/** Thrown within this folder where the rulebook is silent; `deriveAgain` turns it into a refusal. */
export class Silent extends Error {}

/** Reads a number of a rulebook as an exact fraction. */
export type Rule = (section: string, entry: string) => Exact;

export const rulesOf =
  ({ sections }: Rulebook): Rule =>
  (section, entry) => {
    const value = sections[section]?.entries[entry]?.value;
    if (typeof value !== 'number') throw new Silent(`${section}.${entry}`);
    return exact(value);
  };
