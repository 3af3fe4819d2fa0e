import type { Kind } from '@shared/calc/types';
import type { CheckPage } from '@shared/routes/checks';
import { potassiumWords } from '@shared/checks/words';

type Option = { value: string; label: string };

const unique = <T>(values: readonly T[]): T[] => [...new Set(values)];

/** Fluids of the shelf for a kind of order, by their base; a bolus has no potassium added. */
export function baseOptions(products: CheckPage['products'], kind: Kind): Option[] {
  const fitting = products.filter(
    ({ kinds, addedPotassium }) => kinds.includes(kind) && (kind !== 'bolus' || Number(addedPotassium) === 0),
  );
  return unique(fitting.map(({ base }) => base)).map((base) => ({ value: base, label: base }));
}

/** The ready-mixed strengths that are stocked of a base. */
export function potassiumOptions(products: CheckPage['products'], kind: Kind, base: string): Option[] {
  const strengths = products
    .filter((product) => product.base === base && product.kinds.includes(kind))
    .map(({ addedPotassium }) => Number(addedPotassium));
  return unique(strengths)
    .sort((a, b) => a - b)
    .map((mmol) => ({ value: String(mmol), label: potassiumWords(mmol) }));
}
