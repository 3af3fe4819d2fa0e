import { decimalText } from '@shared/canonical';
import type { Product } from '@shared/routes/orders';
import { asc, isNull } from 'drizzle-orm';
import { products } from '../db/schema/shelf';
import type { Tx } from '../db/transaction';

type ProductRow = typeof products.$inferSelect;

const perLitre = (value: number): string => decimalText(value, 2);

/** A shelf row as the forms list it. */
export const presentProduct = (row: ProductRow): Product => ({
  id: row.id,
  name: row.name,
  base: row.base,
  addedPotassium: perLitre(row.addedPotassium),
  sodium: perLitre(row.sodium),
  potassium: perLitre(row.potassium),
  chloride: perLitre(row.chloride),
  calcium: perLitre(row.calcium),
  magnesium: perLitre(row.magnesium),
  lactate: perLitre(row.lactate),
  acetate: perLitre(row.acetate),
  gluconate: perLitre(row.gluconate),
  glucoseGPerL: perLitre(row.glucose),
  osmolarity: perLitre(row.osmolarity),
  readyMixed: row.isReadyMixed,
  highRisk: row.isHighRisk,
  bagSizesMl: row.bagSizes.map(String),
  kinds: row.kinds,
  newbornOnly: row.isNewbornOnly,
  rev: row.rev,
});

/** The fluids stocked now, in the pharmacist's order. */
export async function stockedProducts(tx: Tx): Promise<Product[]> {
  const rows = await tx
    .select()
    .from(products)
    .where(isNull(products.retiredAt))
    .orderBy(asc(products.position), asc(products.name));
  return rows.map(presentProduct);
}
