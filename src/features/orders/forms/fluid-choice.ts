import { ageAt } from '@shared/children/age';
import type { DraftContext, Product } from '@shared/routes/orders';
import { instant, parseInstant } from '@shared/time';

/** Ready-mixed strengths the form has room for, mmol/L as the shelf writes them. */
export type PotassiumStep = { productId: string; mmolPerL: number };

const isNewborn = ({ child, now, zone }: DraftContext): boolean => {
  const bornAt = child.bornAt === null ? undefined : parseInstant(child.bornAt);
  return ageAt({ bornOn: child.bornOn, bornAt }, parseInstant(now) ?? instant(0), zone).isNewborn;
};

/** The products this kind of order and this child may have, in shelf order. */
export function permittedProducts(context: DraftContext, kind: string): Product[] {
  const newborn = isNewborn(context);
  return context.products.filter(
    ({ kinds, newbornOnly }) => kinds.some((each) => each === kind) && (newborn || !newbornOnly),
  );
}

/** Base fluids to choose from; the one in the form stays listed even where it is not permitted. */
export function baseFluids(context: DraftContext, kind: string, chosenId: string): string[] {
  const chosen = context.products.find(({ id }) => id === chosenId);
  const listed = permittedProducts(context, kind);
  const bases = [...listed, ...(chosen && !listed.includes(chosen) ? [chosen] : [])].map(({ base }) => base);
  return [...new Set(bases)];
}

/** The ready-mixed bags of one base, by added potassium. */
export function potassiumSteps(context: DraftContext, kind: string, base: string): PotassiumStep[] {
  return permittedProducts(context, kind)
    .filter((product) => product.base === base)
    .map(({ id, addedPotassium }) => ({ productId: id, mmolPerL: Number(addedPotassium) }))
    .sort((a, b) => a.mmolPerL - b.mmolPerL);
}

/**
 * The product when another base is chosen: the same added potassium where it is stocked, the only bag where there
 * is one; empty otherwise, since added potassium is never assumed.
 */
export function productOfBase(context: DraftContext, kind: string, base: string, formerId: string): string {
  const steps = potassiumSteps(context, kind, base);
  const former = context.products.find(({ id }) => id === formerId);
  const same = former && steps.find(({ mmolPerL }) => mmolPerL === Number(former.addedPotassium));
  return (same ?? (steps.length === 1 ? steps[0] : undefined))?.productId ?? '';
}
