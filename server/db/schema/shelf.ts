import { KINDS } from '@shared/calc/types';
import { sql } from 'drizzle-orm';
import { boolean, check, integer, pgTable, primaryKey, text, unique } from 'drizzle-orm/pg-core';
import { decimal, hospitalId, instant, ownHospital, rowId, someOf } from '../columns';
import { hospitals } from './hospitals';

const perLitre = (name: string) => decimal(name, 7, 2).notNull().default(0);

/** A stocked fluid. Composition per litre of the ready bag: mmol, glucose in g; osmolarity by its label. */
export const products = pgTable(
  'products',
  {
    hospitalId: hospitalId().references(() => hospitals.id),
    id: rowId(),
    name: text('name').notNull(),
    /** The fluid without its ready-mixed potassium: products of one base differ in potassium only. */
    base: text('base').notNull(),
    addedPotassium: perLitre('added_potassium_mmol_l'),
    sodium: perLitre('sodium_mmol_l'),
    potassium: perLitre('potassium_mmol_l'),
    chloride: perLitre('chloride_mmol_l'),
    calcium: perLitre('calcium_mmol_l'),
    magnesium: perLitre('magnesium_mmol_l'),
    lactate: perLitre('lactate_mmol_l'),
    acetate: perLitre('acetate_mmol_l'),
    gluconate: perLitre('gluconate_mmol_l'),
    glucose: perLitre('glucose_g_l'),
    albumin: perLitre('albumin_g_l'),
    osmolarity: perLitre('osmolarity_mosm_l'),
    /** mL. */
    bagSizes: integer('bag_sizes_ml').array().notNull(),
    isReadyMixed: boolean('is_ready_mixed').notNull().default(true),
    isHighRisk: boolean('is_high_risk').notNull().default(false),
    /** Order kinds it is stocked for. */
    kinds: text('kinds', { enum: KINDS }).array().notNull(),
    isNewbornOnly: boolean('is_newborn_only').notNull().default(false),
    gtins: text('gtins').array().notNull().default([]),
    position: integer('position').notNull().default(0),
    addedAt: instant('added_at').notNull(),
    retiredAt: instant('retired_at'),
    rev: integer('rev').notNull().default(1),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('products_name').on(t.hospitalId, t.name),
    someOf('products_kinds', t.kinds, KINDS),
    check('products_bag_sizes', sql`0 < all (${t.bagSizes})`),
    ownHospital(),
  ],
);
