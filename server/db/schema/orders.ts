import { KINDS, LINE_CLASSES } from '@shared/calc/types';
import { URGENCIES } from '@shared/orders/form';
import { isLive, VERSION_STATES } from '@shared/orders/states';
import { ABSOLUTE } from '@shared/rulebook/absolute';
import type { Kilograms, Millilitres, MillilitresPerHour, Minutes } from '@shared/units';
import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  date,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import {
  decimal,
  hashMatches,
  hospitalId,
  inList,
  instant,
  literal,
  oneOf,
  ownHospital,
  rowId,
  sha256,
  within,
} from '../columns';
import { accounts } from './accounts';
import { children } from './children';
import { products } from './shelf';
import { weights } from './weights';

/** The code and the child; everything that changes is a version's. */
export const orders = pgTable(
  'orders',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    /** BL-YYMMDD-NNN. */
    code: text('code').notNull(),
    childId: uuid('child_id').notNull(),
    kind: text('kind', { enum: KINDS }).notNull(),
    /** The ended order this one was copied from. */
    follows: uuid('follows'),
    madeBy: uuid('made_by').notNull(),
    madeAt: instant('made_at').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('orders_code').on(t.hospitalId, t.code),
    unique('orders_child_kind').on(t.hospitalId, t.id, t.childId, t.kind),
    index('orders_child').on(t.hospitalId, t.childId, t.madeAt),
    within('orders_child', t, t.childId, children),
    within('orders_follows', t, t.follows, t),
    within('orders_made_by', t, t.madeBy, accounts),
    oneOf('orders_kind', t.kind, KINDS),
    check('orders_code_form', sql`${t.code} ~ '^BL-[0-9]{6}-[0-9]{3,}$'`),
    ownHospital(),
  ],
);

const LIVE_STATES = VERSION_STATES.filter(isLive);

/** The content and the state. What is signed is `content`; the figures beside it are for queries and last resorts. */
export const orderVersions = pgTable(
  'order_versions',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    orderId: uuid('order_id').notNull(),
    version: integer('version').notNull(),
    childId: uuid('child_id').notNull(),
    kind: text('kind', { enum: KINDS }).notNull(),
    state: text('state', { enum: VERSION_STATES }).notNull(),
    stateSince: instant('state_since').notNull(),
    live: boolean('live')
      .notNull()
      .generatedAlwaysAs(inList(sql.identifier('state') as never, LIVE_STATES)),
    authorId: uuid('author_id').notNull(),
    urgency: text('urgency', { enum: URGENCIES }).notNull().default('routine'),
    /** The indication, in words; the checker reads it, so it holds no figure of the order. */
    reason: text('reason'),
    askedStart: instant('asked_start'),
    /** The checker asked by name; absent means anyone on the ward. */
    askedChecker: uuid('asked_checker'),
    checkDueAt: instant('check_due_at'),
    content: text('content'),
    contentSha256: sha256('content_sha256'),
    rulebookNumber: integer('rulebook_number'),
    productId: uuid('product_id'),
    isHighRisk: boolean('is_high_risk').notNull().default(false),
    lineClass: text('line_class', { enum: LINE_CLASSES }),
    weightId: uuid('weight_id'),
    weightKg: decimal<Kilograms>('weight_kg', 6, 3),
    rateMlH: decimal<MillilitresPerHour>('rate_ml_h', 7, 2),
    volumeMl: decimal<Millilitres>('volume_ml', 7, 1),
    overMin: integer('over_min').$type<Minutes>(),
    plannedStart: instant('planned_start'),
    startBy: instant('start_by'),
    lapsesAt: instant('lapses_at'),
    /** When its author signed and asked for a check (or, given in an emergency, recorded it). */
    signedAt: instant('signed_at'),
    /** When its checker signed it first; from then on it is open to the ward. */
    checkedAt: instant('checked_at'),
    /** Given in an emergency and written down afterwards: when it was given. It stays a fact whatever follows. */
    givenAt: instant('given_at'),
    /** How many of the waiting check's reminders went out, 0 to 4. */
    reminderStage: integer('reminder_stage').notNull().default(0),
    /** When its author was told that it lapses soon. */
    lapsingToldAt: instant('lapsing_told_at'),
    endedAt: instant('ended_at'),
    endReason: text('end_reason'),
    rev: integer('rev').notNull().default(1),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('order_versions_number').on(t.hospitalId, t.orderId, t.version),
    unique('order_versions_author').on(t.hospitalId, t.id, t.authorId),
    unique('order_versions_child').on(t.hospitalId, t.id, t.childId),
    uniqueIndex('order_versions_one_live')
      .on(t.hospitalId, t.orderId)
      .where(sql`live`),
    index('order_versions_live_by_child')
      .on(t.hospitalId, t.childId, t.state)
      .where(sql`live`),
    index('order_versions_queue')
      .on(t.hospitalId, t.state, t.checkDueAt)
      .where(sql`live`),
    index('order_versions_by_child').on(t.hospitalId, t.childId, t.signedAt),
    foreignKey({
      name: 'order_versions_order_fk',
      columns: [t.hospitalId, t.orderId, t.childId, t.kind],
      foreignColumns: [orders.hospitalId, orders.id, orders.childId, orders.kind],
    }),
    within('order_versions_author', t, t.authorId, accounts),
    within('order_versions_asked_checker', t, t.askedChecker, accounts),
    within('order_versions_product', t, t.productId, products),
    within('order_versions_weight', t, t.weightId, weights),
    oneOf('order_versions_state', t.state, VERSION_STATES),
    oneOf('order_versions_urgency', t.urgency, URGENCIES),
    oneOf('order_versions_line_class', t.lineClass, LINE_CLASSES),
    check('order_versions_version', sql`${t.version} >= 1`),
    check('order_versions_asked_another', sql`${t.askedChecker} <> ${t.authorId}`),
    hashMatches('order_versions_content_sha256', t.content, t.contentSha256),
    check(
      'order_versions_content_with_state',
      sql`(${t.content} is null) = (${t.state} in ('draft', 'discarded')) and (${t.content} is null) = (${t.signedAt} is null)`,
    ),
    // a kind enters these three together with its brim
    check('order_versions_kind', inList(t.kind, KINDS)),
    check(
      'last_resort_maintenance',
      sql`${t.kind} <> 'maintenance' or (${t.rateMlH} is null and ${t.content} is null) or (${t.rateMlH} is not null and ${t.weightKg} is not null and ${t.rateMlH} * 24 <= ${literal(ABSOLUTE.maintenanceMlPer24h)})`,
    ),
    check(
      'last_resort_bolus',
      sql`${t.kind} <> 'bolus' or (${t.volumeMl} is null and ${t.content} is null) or (${t.volumeMl} is not null and ${t.volumeMl} <= ${literal(ABSOLUTE.bolusMl)} and case when ${t.weightKg} is null then ${t.urgency} = 'emergency' else ${t.volumeMl} <= ${literal(ABSOLUTE.bolusMlPerKg)} * ${t.weightKg} end)`,
    ),
    check(
      'last_resort_positive',
      sql`(${t.weightKg} is null or ${t.weightKg} > 0) and (${t.rateMlH} is null or ${t.rateMlH} > 0) and (${t.volumeMl} is null or ${t.volumeMl} > 0) and (${t.overMin} is null or ${t.overMin} > 0)`,
    ),
    ownHospital(),
  ],
);

/** Where-clause for the partial indexes: a bound parameter would not let the planner use them. */
export const versionIsLive = sql<boolean>`${orderVersions.live}`;

/** The order form as it was typed: strings only, half-finished and wrong input included. */
export const drafts = pgTable(
  'drafts',
  {
    hospitalId: hospitalId(),
    versionId: uuid('version_id').notNull(),
    form: jsonb('form').$type<Record<string, unknown>>().notNull(),
    rev: integer('rev').notNull().default(1),
    savedAt: instant('saved_at').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.versionId] }),
    within('drafts_version', t, t.versionId, orderVersions),
    ownHospital(),
  ],
);

/** The day's last order number, in the hospital's zone. */
export const orderCounters = pgTable(
  'order_counters',
  {
    hospitalId: hospitalId(),
    day: date('day', { mode: 'string' }).notNull(),
    last: integer('last').notNull(),
  },
  (t) => [primaryKey({ columns: [t.hospitalId, t.day] }), ownHospital()],
);
