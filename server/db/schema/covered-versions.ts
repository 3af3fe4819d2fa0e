import { KINDS } from '@shared/calc/types';
import { URGENCIES } from '@shared/orders/form';
import { VERSION_STATES } from '@shared/orders/states';
import { sql } from 'drizzle-orm';
import { boolean, integer, pgView, text, uuid } from 'drizzle-orm/pg-core';
import { instant } from '../columns';

/**
 * What may be read of a version its checker has not signed: no content, no figure, no fluid, no author. The view
 * lacks the columns, so a covered query cannot select them by mistake.
 */
export const coveredVersions = pgView('covered_versions', {
  hospitalId: uuid('hospital_id').notNull(),
  versionId: uuid('version_id').notNull(),
  orderId: uuid('order_id').notNull(),
  code: text('code').notNull(),
  version: integer('version').notNull(),
  childId: uuid('child_id').notNull(),
  kind: text('kind', { enum: KINDS }).notNull(),
  urgency: text('urgency', { enum: URGENCIES }).notNull(),
  state: text('state', { enum: VERSION_STATES }).notNull(),
  stateSince: instant('state_since').notNull(),
  reason: text('reason'),
  askedStart: instant('asked_start'),
  checkDueAt: instant('check_due_at'),
  askedChecker: uuid('asked_checker'),
  signedAt: instant('signed_at'),
  isHighRisk: boolean('is_high_risk').notNull(),
  live: boolean('live').notNull(),
}).existing();

/** Where-clause for the partial indexes; a list without it reads every version there ever was. */
export const coveredIsLive = sql<boolean>`${coveredVersions.live}`;
