import { WEIGHT_METHODS } from '@shared/calc/types';
import { ABSOLUTE } from '@shared/rulebook/absolute';
import type { Kilograms } from '@shared/units';
import { sql } from 'drizzle-orm';
import { check, index, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { decimal, hospitalId, instant, literal, oneOf, ownHospital, rowId, within } from '../columns';
import { accounts } from './accounts';
import { children } from './children';

/** What a weight needs before an order may use it. */
export const WEIGHT_NEEDS = ['nothing', 'second-measurement', 'second-person'] as const;

/** A weight as it was entered. kg, method, time and author never change: a correction is a new row. */
export const weights = pgTable(
  'weights',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    childId: uuid('child_id').notNull(),
    kg: decimal<Kilograms>('kg', 6, 3).notNull(),
    method: text('method', { enum: WEIGHT_METHODS }).notNull(),
    at: instant('at').notNull(),
    by: uuid('by_id').notNull(),
    recordedAt: instant('recorded_at').notNull(),
    /** Against the growth reference, two decimals; absent where there is none. */
    z: decimal('z', 5, 2),
    /** Code of what looked wrong when it was entered. */
    finding: text('finding'),
    needs: text('needs', { enum: WEIGHT_NEEDS }).notNull().default('nothing'),
    secondKg: decimal<Kilograms>('second_kg', 6, 3),
    secondMethod: text('second_method', { enum: WEIGHT_METHODS }),
    secondAt: instant('second_at'),
    secondBy: uuid('second_by'),
    confirmedBy: uuid('confirmed_by'),
    confirmedAt: instant('confirmed_at'),
    supersededBy: uuid('superseded_by'),
    supersededReason: text('superseded_reason'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    index('weights_latest').on(t.hospitalId, t.childId, t.at),
    within('weights_child', t, t.childId, children),
    within('weights_by', t, t.by, accounts),
    within('weights_second_by', t, t.secondBy, accounts),
    within('weights_confirmed_by', t, t.confirmedBy, accounts),
    within('weights_superseded_by', t, t.supersededBy, t),
    oneOf('weights_method', t.method, WEIGHT_METHODS),
    oneOf('weights_second_method', t.secondMethod, WEIGHT_METHODS),
    oneOf('weights_needs', t.needs, WEIGHT_NEEDS),
    check('last_resort_weight', sql`${t.kg} > 0 and ${t.kg} <= ${literal(ABSOLUTE.weightKgMax)}`),
    check('weights_second_kg', sql`${t.secondKg} > 0 and ${t.secondKg} <= ${literal(ABSOLUTE.weightKgMax)}`),
    check(
      'weights_second',
      sql`num_nonnulls(${t.secondKg}, ${t.secondMethod}, ${t.secondAt}, ${t.secondBy}) in (0, 4)`,
    ),
    check('weights_confirmed_by_another', sql`${t.confirmedBy} <> ${t.by}`),
    check('weights_confirmed', sql`(${t.confirmedBy} is null) = (${t.confirmedAt} is null)`),
    ownHospital(),
  ],
);

export const HEIGHT_METHODS = ['measured', 'estimated', 'stated'] as const;

export const heights = pgTable(
  'heights',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    childId: uuid('child_id').notNull(),
    cm: decimal('cm', 4, 1).notNull(),
    method: text('method', { enum: HEIGHT_METHODS }).notNull(),
    at: instant('at').notNull(),
    by: uuid('by_id').notNull(),
    recordedAt: instant('recorded_at').notNull(),
    supersededBy: uuid('superseded_by'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    index('heights_latest').on(t.hospitalId, t.childId, t.at),
    within('heights_child', t, t.childId, children),
    within('heights_by', t, t.by, accounts),
    within('heights_superseded_by', t, t.supersededBy, t),
    oneOf('heights_method', t.method, HEIGHT_METHODS),
    check('heights_cm', sql`${t.cm} > 20 and ${t.cm} < 250`),
    ownHospital(),
  ],
);
