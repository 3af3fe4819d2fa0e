import { DEFAULT_SHELF } from '@shared/shelf/default';
import type { products } from '../../../server/db/schema/shelf';

/** Product rows of a hospital that starts with the default shelf. */
export const SHELF: readonly Omit<typeof products.$inferInsert, 'addedAt'>[] = DEFAULT_SHELF.map(
  (fluid, position) => ({
    name: fluid.name,
    base: fluid.base,
    addedPotassium: fluid.addedPotassium,
    sodium: fluid.sodium,
    potassium: fluid.potassium,
    chloride: fluid.chloride,
    calcium: fluid.calcium,
    magnesium: fluid.magnesium,
    lactate: fluid.lactate,
    acetate: fluid.acetate,
    gluconate: fluid.gluconate,
    glucose: fluid.glucoseGPerL,
    osmolarity: fluid.osmolarity,
    bagSizes: [...fluid.bagSizes],
    isReadyMixed: fluid.readyMixed,
    isHighRisk: fluid.highRisk,
    kinds: [...fluid.permittedKinds],
    isNewbornOnly: fluid.newbornOnly,
    position,
  }),
);
