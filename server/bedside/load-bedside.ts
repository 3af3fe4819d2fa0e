import type { BedsideContext } from '@shared/bedside/finding';
import { fluidOf } from '@shared/orders/chart-facts';
import type { OrderContent } from '@shared/orders/content';
import type { Product } from '@shared/routes/orders';
import type { Instant } from '@shared/time';
import { loadContent } from '../checks/load-content';
import type { Tx } from '../db/transaction';
import { loadZone } from '../orders/load-context';
import { rulebookInForce } from '../rulebook/in-force';
import { stockedProducts } from '../shelf/queries';
import { findInfusion, type Infusion } from './queries';

export type Bedside = {
  content: OrderContent;
  context: BedsideContext;
  infusion: Infusion | undefined;
  products: Product[];
};

/** What the bedside is held against: signed content, shelf, rulebook, and what has gone in. */
export async function loadBedside(
  tx: Tx,
  hospitalId: string,
  versionId: string,
  now: Instant,
): Promise<Bedside> {
  const content = await loadContent(tx, versionId);
  const infusion = await findInfusion(tx, versionId);
  const products = await stockedProducts(tx);
  const { rulebook } = await rulebookInForce(tx);
  const zone = await loadZone(tx, hospitalId);
  const infusedMl = infusion?.infusedMl ?? 0;
  return {
    content,
    infusion,
    products,
    context: { at: now, zone, rulebook, products: products.map(fluidOf), infusedMl },
  };
}
