import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
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
import { hashMatches, hospitalId, instant, oneOf, ownHospital, rowId, sha256, within } from '../columns';
import { accounts } from './accounts';
import { orderVersions } from './orders';

/** A checker's unsent figures, readable by them alone. */
export const checkDrafts = pgTable(
  'check_drafts',
  {
    hospitalId: hospitalId(),
    versionId: uuid('version_id').notNull(),
    accountId: uuid('account_id').notNull(),
    form: jsonb('form').$type<Record<string, unknown>>().notNull(),
    rev: integer('rev').notNull().default(1),
    savedAt: instant('saved_at').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.versionId, t.accountId] }),
    within('check_drafts_version', t, t.versionId, orderVersions),
    within('check_drafts_account', t, t.accountId, accounts),
    ownHospital(),
  ],
);

export const CHECK_STATES = [
  'open',
  'locked-agreed',
  'agreed',
  'differed',
  'returned',
  'passed-on',
  'slip',
  'expired',
] as const;

export const CHECK_WAYS = ['by-hand', 'worked-out'] as const;

/** One person's independent check. The author travels in the key, so checker ≠ author needs no trigger. */
export const checks = pgTable(
  'checks',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    versionId: uuid('version_id').notNull(),
    authorId: uuid('author_id').notNull(),
    checkerId: uuid('checker_id').notNull(),
    state: text('state', { enum: CHECK_STATES }).notNull(),
    openedAt: instant('opened_at').notNull(),
    /** Canonical text of what the checker locked in; fixed from then on. */
    figures: text('figures'),
    figuresSha256: sha256('figures_sha256'),
    way: text('way', { enum: CHECK_WAYS }),
    lockedInAt: instant('locked_in_at'),
    /** Agreed and unsigned: kept for this checker until then. */
    reservedUntil: instant('reserved_until'),
    /** Canonical text of the comparison. */
    comparison: text('comparison'),
    choicesDiffer: boolean('choices_differ').notNull().default(false),
    /** Cannot verify: which entry. */
    returnedWhat: text('returned_what'),
    /** Cannot verify, passed on, choice accepted: in words. */
    reason: text('reason'),
    passedTo: uuid('passed_to'),
    isBeside: boolean('is_beside').notNull().default(false),
    /** Checked by someone who had seen the author's figures, after waiting. */
    hadSeenFigures: boolean('had_seen_figures').notNull().default(false),
    decidedAt: instant('decided_at'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('checks_once').on(t.hospitalId, t.versionId, t.checkerId),
    uniqueIndex('checks_one_agreed')
      .on(t.hospitalId, t.versionId)
      .where(sql`${t.state} in ('locked-agreed', 'agreed')`),
    index('checks_checker').on(t.hospitalId, t.checkerId, t.state),
    foreignKey({
      name: 'checks_version_author_fk',
      columns: [t.hospitalId, t.versionId, t.authorId],
      foreignColumns: [orderVersions.hospitalId, orderVersions.id, orderVersions.authorId],
    }),
    within('checks_checker', t, t.checkerId, accounts),
    within('checks_passed_to', t, t.passedTo, accounts),
    oneOf('checks_state', t.state, CHECK_STATES),
    oneOf('checks_way', t.way, CHECK_WAYS),
    check('checks_by_another', sql`${t.checkerId} <> ${t.authorId}`),
    hashMatches('checks_figures_sha256', t.figures, t.figuresSha256),
    check('checks_locked_in', sql`(${t.figures} is null) = (${t.lockedInAt} is null)`),
    check(
      'checks_figures_with_state',
      sql`${t.state} not in ('locked-agreed', 'agreed', 'differed', 'slip') or ${t.figures} is not null`,
    ),
    ownHospital(),
  ],
);

export const EXCEPTION_STATES = ['asked', 'granted', 'refused', 'void'] as const;
export const EXCEPTION_WAYS = ['here', 'telephone'] as const;

/** A senior matter put to a senior: neither author nor checker, bound to the would-be content by its hash. */
export const exceptions = pgTable(
  'exceptions',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    versionId: uuid('version_id').notNull(),
    authorId: uuid('author_id').notNull(),
    limitCode: text('limit_code').notNull(),
    contentSha256: sha256('content_sha256').notNull(),
    state: text('state', { enum: EXCEPTION_STATES }).notNull(),
    askedAt: instant('asked_at').notNull(),
    askedReason: text('asked_reason'),
    /** The senior asked by name. */
    askedOf: uuid('asked_of'),
    /** The senior who decided; by telephone, the one named. */
    by: uuid('by_id'),
    decidedAt: instant('decided_at'),
    reason: text('reason'),
    how: text('how', { enum: EXCEPTION_WAYS }),
    /** By telephone: who wrote it down and the second person who heard it read back. */
    recordedBy: uuid('recorded_by'),
    readBackTo: uuid('read_back_to'),
    countersignDueAt: instant('countersign_due_at'),
    countersignedAt: instant('countersigned_at'),
    /** By whom: by telephone the senior named, after an emergency any senior of the ward. */
    countersignedBy: uuid('countersigned_by'),
    overdueToldAt: instant('overdue_told_at'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    uniqueIndex('exceptions_one_open')
      .on(t.hospitalId, t.versionId, t.limitCode, t.contentSha256)
      .where(sql`${t.state} in ('asked', 'granted')`),
    index('exceptions_asked')
      .on(t.hospitalId, t.askedAt)
      .where(sql`${t.state} = 'asked'`),
    index('exceptions_countersign')
      .on(t.hospitalId, t.countersignDueAt)
      .where(sql`${t.countersignDueAt} is not null and ${t.countersignedAt} is null`),
    foreignKey({
      name: 'exceptions_version_author_fk',
      columns: [t.hospitalId, t.versionId, t.authorId],
      foreignColumns: [orderVersions.hospitalId, orderVersions.id, orderVersions.authorId],
    }),
    within('exceptions_by', t, t.by, accounts),
    within('exceptions_asked_of', t, t.askedOf, accounts),
    within('exceptions_recorded_by', t, t.recordedBy, accounts),
    within('exceptions_read_back_to', t, t.readBackTo, accounts),
    within('exceptions_countersigned_by', t, t.countersignedBy, accounts),
    oneOf('exceptions_state', t.state, EXCEPTION_STATES),
    oneOf('exceptions_how', t.how, EXCEPTION_WAYS),
    check('exceptions_by_another', sql`${t.by} <> ${t.authorId}`),
    check(
      'exceptions_decided',
      sql`${t.state} not in ('granted', 'refused') or (${t.by} is not null and ${t.decidedAt} is not null and ${t.reason} is not null and ${t.how} is not null)`,
    ),
    check(
      'exceptions_telephone',
      sql`${t.how} is distinct from 'telephone' or (${t.recordedBy} is not null and ${t.readBackTo} is not null and ${t.readBackTo} <> ${t.recordedBy} and ${t.readBackTo} <> ${t.by} and ${t.countersignDueAt} is not null)`,
    ),
    ownHospital(),
  ],
);

export const SEEN_HOWS = [
  'read',
  'advised',
  'beside-cancelled',
  'locked-in',
  'exception',
  'settlement',
  'print',
] as const;

/** Who has seen an unsigned version's figures; check guards read it. */
export const seenFigures = pgTable(
  'seen_figures',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    versionId: uuid('version_id').notNull(),
    accountId: uuid('account_id').notNull(),
    how: text('how', { enum: SEEN_HOWS }).notNull(),
    at: instant('at').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('seen_figures_once').on(t.hospitalId, t.versionId, t.accountId, t.how),
    within('seen_figures_version', t, t.versionId, orderVersions),
    within('seen_figures_account', t, t.accountId, accounts),
    oneOf('seen_figures_how', t.how, SEEN_HOWS),
    ownHospital(),
  ],
);
