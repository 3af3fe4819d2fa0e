import { sql } from 'drizzle-orm';
import { check, integer, pgTable, primaryKey, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { hashMatches, hospitalId, instant, oneOf, ownHospital, rowId, sha256, within } from '../columns';
import { accounts } from './accounts';
import { hospitals } from './hospitals';

export const RULEBOOK_STATES = ['draft', 'in-force', 'retired', 'withdrawn'] as const;

/** The local limits, numbered; content is canonical text and never edited. */
export const rulebooks = pgTable(
  'rulebooks',
  {
    hospitalId: hospitalId().references(() => hospitals.id),
    id: rowId(),
    number: integer('number').notNull(),
    state: text('state', { enum: RULEBOOK_STATES }).notNull(),
    content: text('content').notNull(),
    contentSha256: sha256('content_sha256').notNull(),
    draftedBy: uuid('drafted_by').notNull(),
    draftedAt: instant('drafted_at').notNull(),
    approvedBy: uuid('approved_by'),
    approvedAt: instant('approved_at'),
    inForceFrom: instant('in_force_from'),
    retiredAt: instant('retired_at'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('rulebooks_number').on(t.hospitalId, t.number),
    uniqueIndex('rulebooks_one_in_force')
      .on(t.hospitalId)
      .where(sql`${t.state} = 'in-force'`),
    within('rulebooks_drafted_by', t, t.draftedBy, accounts),
    within('rulebooks_approved_by', t, t.approvedBy, accounts),
    oneOf('rulebooks_state', t.state, RULEBOOK_STATES),
    hashMatches('rulebooks_content_sha256', t.content, t.contentSha256),
    check('rulebooks_number_positive', sql`${t.number} >= 1`),
    check('rulebooks_approved_by_another', sql`${t.approvedBy} <> ${t.draftedBy}`),
    check(
      'rulebooks_in_force_approved',
      sql`${t.state} in ('draft', 'withdrawn') or (${t.approvedBy} is not null and ${t.approvedAt} is not null and ${t.inForceFrom} is not null)`,
    ),
    ownHospital(),
  ],
);
