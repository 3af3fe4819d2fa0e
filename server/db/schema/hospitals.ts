import { boolean, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { hospitalId, instant, ownHospital, rowId } from '../columns';

/** The installation's hospitals: the one clinical table without row-level security, read before one is chosen. */
export const hospitals = pgTable('hospitals', {
  id: uuid('id').primaryKey().defaultRandom(),
  name: text('name').notNull().unique(),
  /** IANA time zone, for instance Europe/London. */
  zone: text('zone').notNull(),
});

export const wards = pgTable(
  'wards',
  {
    hospitalId: hospitalId().references(() => hospitals.id),
    id: rowId(),
    name: text('name').notNull(),
    /** High-dependency and other specialist areas: some ceilings are higher there. */
    isHighDependency: boolean('is_high_dependency').notNull().default(false),
    closedAt: instant('closed_at'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('wards_name').on(t.hospitalId, t.name),
    ownHospital(),
  ],
);
