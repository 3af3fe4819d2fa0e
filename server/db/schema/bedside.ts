import { BOLUS_ROUTES, LINE_CLASSES } from '@shared/calc/types';
import type { Millilitres, MillilitresPerHour } from '@shared/units';
import { sql } from 'drizzle-orm';
import {
  bigint,
  check,
  date,
  foreignKey,
  index,
  pgPolicy,
  pgTable,
  primaryKey,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { decimal, hospitalId, instant, oneOf, ownHospital, rowId, within } from '../columns';
import { accounts } from './accounts';
import { orderVersions } from './orders';
import { products } from './shelf';

export const DELIVERY_WAYS = [...BOLUS_ROUTES, 'hand'] as const;
export const INFUSION_ENDS = ['stopped', 'finished', 'replaced'] as const;

/** A started order: what hangs, through which line and pump, as the nurse read it. */
export const infusions = pgTable(
  'infusions',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    versionId: uuid('version_id').notNull(),
    authorId: uuid('author_id').notNull(),
    childId: uuid('child_id').notNull(),
    startedBy: uuid('started_by').notNull(),
    witnessId: uuid('witness_id'),
    startedAt: instant('started_at').notNull(),
    endedAt: instant('ended_at'),
    endedBy: uuid('ended_by'),
    endedHow: text('ended_how', { enum: INFUSION_ENDS }),
    endReason: text('end_reason'),
    infusedMl: decimal<Millilitres>('infused_ml', 7, 1),
    bagProductId: uuid('bag_product_id').notNull(),
    bagVolumeMl: decimal<Millilitres>('bag_volume_ml', 7, 1),
    bagNumber: text('bag_number'),
    bagBatch: text('bag_batch'),
    bagExpiresOn: date('bag_expires_on', { mode: 'string' }),
    way: text('way', { enum: DELIVERY_WAYS }).notNull(),
    pump: text('pump'),
    channel: text('channel'),
    line: text('line').notNull(),
    lineClass: text('line_class', { enum: LINE_CLASSES }).notNull(),
    pumpRateMlH: decimal<MillilitresPerHour>('pump_rate_ml_h', 7, 2),
    pumpVolumeMl: decimal<Millilitres>('pump_volume_ml', 7, 1),
    /** Canonical text of the comparisons: child, bag, pump, line. */
    comparisons: text('comparisons').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('infusions_version').on(t.hospitalId, t.versionId),
    uniqueIndex('infusions_one_per_line')
      .on(t.hospitalId, t.childId, t.line)
      .where(sql`${t.endedAt} is null`),
    index('infusions_child').on(t.hospitalId, t.childId, t.startedAt),
    foreignKey({
      name: 'infusions_version_author_fk',
      columns: [t.hospitalId, t.versionId, t.authorId],
      foreignColumns: [orderVersions.hospitalId, orderVersions.id, orderVersions.authorId],
    }),
    foreignKey({
      name: 'infusions_version_child_fk',
      columns: [t.hospitalId, t.versionId, t.childId],
      foreignColumns: [orderVersions.hospitalId, orderVersions.id, orderVersions.childId],
    }),
    within('infusions_started_by', t, t.startedBy, accounts),
    within('infusions_witness', t, t.witnessId, accounts),
    within('infusions_ended_by', t, t.endedBy, accounts),
    within('infusions_bag_product', t, t.bagProductId, products),
    oneOf('infusions_way', t.way, DELIVERY_WAYS),
    oneOf('infusions_ended_how', t.endedHow, INFUSION_ENDS),
    oneOf('infusions_line_class', t.lineClass, LINE_CLASSES),
    check('infusions_by_another', sql`${t.startedBy} <> ${t.authorId}`),
    check('infusions_witness_another', sql`${t.witnessId} <> ${t.startedBy}`),
    check(
      'infusions_ended',
      sql`(${t.endedAt} is null) = (${t.endedBy} is null) and (${t.endedAt} is null) = (${t.endedHow} is null)`,
    ),
    check(
      'infusions_pump_figures',
      sql`(${t.way} <> 'pump' or (${t.pumpRateMlH} is not null and ${t.pumpVolumeMl} is not null)) and (${t.pumpRateMlH} is null or ${t.pumpRateMlH} > 0) and (${t.pumpVolumeMl} is null or ${t.pumpVolumeMl} > 0) and (${t.infusedMl} is null or ${t.infusedMl} >= 0)`,
    ),
    ownHospital(),
  ],
);

export const INFUSION_EVENT_KINDS = [
  'started',
  'infusing-confirmed',
  'held',
  'resumed',
  'rate-lowered',
  'rate-raised',
  'next-volume',
  'bag-changed',
  'line-changed',
  'handed-over',
  'away',
  'back',
  'stopped',
  'finished',
  'replaced',
  'reason-added',
] as const;

/** Insert only: what happened at the pump, in order. */
export const infusionEvents = pgTable(
  'infusion_events',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    infusionId: uuid('infusion_id').notNull(),
    kind: text('kind', { enum: INFUSION_EVENT_KINDS }).notNull(),
    at: instant('at').notNull(),
    by: uuid('by_id').notNull(),
    rateMlH: decimal<MillilitresPerHour>('rate_ml_h', 7, 2),
    volumeMl: decimal<Millilitres>('volume_ml', 7, 1),
    reason: text('reason'),
    /** Canonical text of whatever else the act compared. */
    detail: text('detail'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    index('infusion_events_infusion').on(t.hospitalId, t.infusionId, t.at),
    within('infusion_events_infusion', t, t.infusionId, infusions),
    within('infusion_events_by', t, t.by, accounts),
    oneOf('infusion_events_kind', t.kind, INFUSION_EVENT_KINDS),
    ownHospital(),
  ],
);

/** One paper: 100 random bits lead from it to what is current. */
export const prints = pgTable(
  'prints',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    code: text('code').notNull(),
    versionId: uuid('version_id').notNull(),
    ledgerSeq: bigint('ledger_seq', { mode: 'number' }).notNull(),
    by: uuid('by_id').notNull(),
    at: instant('at').notNull(),
    /** Absent on a valid order; otherwise the word across the page. */
    watermark: text('watermark'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('prints_code').on(t.code),
    index('prints_version').on(t.hospitalId, t.versionId),
    within('prints_version', t, t.versionId, orderVersions),
    within('prints_by', t, t.by, accounts),
    check('prints_code_form', sql`${t.code} ~ '^[A-Z2-7]{20}$'`),
    ownHospital(),
    // the page behind the code is read without sign-in, before a hospital is known
    pgPolicy('by_code', {
      for: 'select',
      using: sql`code = nullif(current_setting('app.print_code', true), '')`,
    }),
  ],
);
