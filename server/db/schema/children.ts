import { FLAGS, FRACTIONS, SEXES } from '@shared/calc/types';
import { sql } from 'drizzle-orm';
import {
  check,
  date,
  index,
  integer,
  pgTable,
  primaryKey,
  smallint,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import {
  codeUnitText,
  decimal,
  hospitalId,
  instant,
  oneOf,
  ownHospital,
  rowId,
  someOf,
  within,
} from '../columns';
import { accounts } from './accounts';
import { hospitals, wards } from './hospitals';

export const children = pgTable(
  'children',
  {
    hospitalId: hospitalId().references(() => hospitals.id),
    id: rowId(),
    /** The hospital's own number for the child. */
    number: text('number').notNull(),
    surname: text('surname').notNull(),
    given: text('given').notNull(),
    /** Civil date in the hospital's zone, YYYY-MM-DD. */
    bornOn: date('born_on', { mode: 'string' }).notNull(),
    /** Known for the newborn: bands by hours since birth need it. */
    bornAt: instant('born_at'),
    /** Absent means not recorded. */
    sex: text('sex', { enum: SEXES }),
    gestationWeeks: smallint('gestation_weeks'),
    gestationDays: smallint('gestation_days'),
    flags: text('flags', { enum: FLAGS }).array().notNull().default([]),
    /** In words; "Not asked" and "None known" are answers too. */
    allergies: text('allergies').notNull(),
    /** Prefix search is a range on this: under row-level security `like` and `lower()` cannot use an index. */
    surnameKey: codeUnitText('surname_key')
      .notNull()
      .generatedAlwaysAs(sql`lower(surname)`),
    registeredBy: uuid('registered_by').notNull(),
    registeredAt: instant('registered_at').notNull(),
    rev: integer('rev').notNull().default(1),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('children_number').on(t.hospitalId, t.number),
    index('children_surname_key').on(t.hospitalId, t.surnameKey),
    within('children_registered_by', t, t.registeredBy, accounts),
    oneOf('children_sex', t.sex, SEXES),
    someOf('children_flags', t.flags, FLAGS),
    check('children_gestation_weeks', sql`${t.gestationWeeks} between 20 and 45`),
    check(
      'children_gestation_days',
      sql`${t.gestationDays} is null or (${t.gestationDays} between 0 and 6 and ${t.gestationWeeks} is not null)`,
    ),
    ownHospital(),
  ],
);

export const stays = pgTable(
  'stays',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    childId: uuid('child_id').notNull(),
    wardId: uuid('ward_id').notNull(),
    bed: text('bed'),
    from: instant('from_at').notNull(),
    to: instant('to_at'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    uniqueIndex('stays_one_open')
      .on(t.hospitalId, t.childId)
      .where(sql`${t.to} is null`),
    index('stays_open_by_ward')
      .on(t.hospitalId, t.wardId)
      .where(sql`${t.to} is null`),
    index('stays_child').on(t.hospitalId, t.childId, t.from),
    within('stays_child', t, t.childId, children),
    within('stays_ward', t, t.wardId, wards),
    check('stays_order', sql`${t.to} >= ${t.from}`),
    ownHospital(),
  ],
);

export const INTAKE_KINDS = ['bolus', 'fluid', 'feed', 'drug', 'flush', 'other'] as const;

/** What a child received outside Brimline's own orders: ambulance, emergency department, feeds. */
export const intakes = pgTable(
  'intakes',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    childId: uuid('child_id').notNull(),
    what: text('what', { enum: INTAKE_KINDS }).notNull(),
    fluid: text('fluid'),
    ml: decimal('ml', 7, 1).notNull(),
    at: instant('at').notNull(),
    /** Where it was given, in words. */
    place: text('place'),
    by: uuid('by_id').notNull(),
    recordedAt: instant('recorded_at').notNull(),
    /** A correction is a new row. */
    supersededBy: uuid('superseded_by'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    index('intakes_child').on(t.hospitalId, t.childId, t.at),
    within('intakes_child', t, t.childId, children),
    within('intakes_by', t, t.by, accounts),
    within('intakes_superseded_by', t, t.supersededBy, t),
    oneOf('intakes_what', t.what, INTAKE_KINDS),
    check('intakes_ml', sql`${t.ml} > 0`),
    ownHospital(),
  ],
);

export const PLAN_KINDS = ['allowance', 'fraction'] as const;

/** A consultant's total allowance or fraction; the newest open one holds. */
export const fluidPlans = pgTable(
  'fluid_plans',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    childId: uuid('child_id').notNull(),
    what: text('what', { enum: PLAN_KINDS }).notNull(),
    allowanceMlPer24h: decimal('allowance_ml_per_24h', 7, 1),
    fraction: text('fraction', { enum: FRACTIONS }),
    reason: text('reason').notNull(),
    by: uuid('by_id').notNull(),
    at: instant('at').notNull(),
    endedAt: instant('ended_at'),
    endedBy: uuid('ended_by'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    uniqueIndex('fluid_plans_one_open')
      .on(t.hospitalId, t.childId)
      .where(sql`${t.endedAt} is null`),
    within('fluid_plans_child', t, t.childId, children),
    within('fluid_plans_by', t, t.by, accounts),
    within('fluid_plans_ended_by', t, t.endedBy, accounts),
    oneOf('fluid_plans_what', t.what, PLAN_KINDS),
    oneOf('fluid_plans_fraction', t.fraction, FRACTIONS),
    check(
      'fluid_plans_value',
      sql`(${t.what} = 'allowance') = (${t.allowanceMlPer24h} is not null) and (${t.what} = 'fraction') = (${t.fraction} is not null) and (${t.allowanceMlPer24h} is null or ${t.allowanceMlPer24h} >= 0)`,
    ),
    ownHospital(),
  ],
);

/** Blood results and observations. */
export const results = pgTable(
  'results',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    childId: uuid('child_id').notNull(),
    analyte: text('analyte').notNull(),
    value: decimal('value', 10, 3).notNull(),
    unit: text('unit').notNull(),
    at: instant('at').notNull(),
    by: uuid('by_id').notNull(),
    recordedAt: instant('recorded_at').notNull(),
    supersededBy: uuid('superseded_by'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    index('results_latest').on(t.hospitalId, t.childId, t.analyte, t.at),
    within('results_child', t, t.childId, children),
    within('results_by', t, t.by, accounts),
    within('results_superseded_by', t, t.supersededBy, t),
    ownHospital(),
  ],
);
