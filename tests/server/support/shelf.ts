import type { products } from '../../../server/db/schema/shelf';

type Row = Omit<typeof products.$inferInsert, 'addedAt'>;

/** Product rows of a test hospital: generic fluids, label values of common practice. */
export const SHELF: readonly Row[] = [
  row('Sodium chloride 0.9 %', { sodium: 154, chloride: 154, osmolarity: 308 }),
  row('Sodium chloride 0.9 % + glucose 5 %', { sodium: 154, chloride: 154, glucose: 50, osmolarity: 586 }),
];

function row(name: string, composition: Omit<Row, 'name' | 'base' | 'bagSizes' | 'kinds'>): Row {
  return { name, base: name, bagSizes: [500, 1000], kinds: ['maintenance', 'bolus'], ...composition };
}
