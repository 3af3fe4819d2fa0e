import { KINDS } from '@shared/calc/types';
import { index, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { hospitalId, instant, oneOf, ownHospital, rowId, within } from '../columns';
import { accounts } from './accounts';
import { children } from './children';
import { orderVersions } from './orders';

export const NEAR_MISS_CLASSES = [
  'brim',
  'senior',
  'weight',
  'wrong-child',
  'check-differed',
  'check-returned',
  'choice-accepted',
  'pharmacist',
  'bedside',
  'given-differed',
  'our-fault',
] as const;

/** Everything that was stopped. One row per class, limit and draft, however often it is typed. */
export const nearMisses = pgTable(
  'near_misses',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    class: text('class', { enum: NEAR_MISS_CLASSES }).notNull(),
    limitCode: text('limit_code').notNull(),
    childId: uuid('child_id'),
    versionId: uuid('version_id'),
    kind: text('kind', { enum: KINDS }),
    by: uuid('by_id'),
    at: instant('at').notNull(),
    /** As typed or read, and as allowed, both with their unit. */
    value: text('value'),
    limit: text('limit_text'),
    detail: text('detail'),
    dedupe: text('dedupe').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('near_misses_dedupe').on(t.hospitalId, t.dedupe),
    index('near_misses_at').on(t.hospitalId, t.at),
    within('near_misses_child', t, t.childId, children),
    within('near_misses_version', t, t.versionId, orderVersions),
    within('near_misses_by', t, t.by, accounts),
    oneOf('near_misses_class', t.class, NEAR_MISS_CLASSES),
    ownHospital(),
  ],
);
