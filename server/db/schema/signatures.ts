import { SIGNATURE_MEANINGS } from '@shared/orders/transitions';
import { sql } from 'drizzle-orm';
import { check, index, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { hospitalId, instant, oneOf, ownHospital, rowId, sha256, within } from '../columns';
import { accounts } from './accounts';
import { exceptions } from './checks';
import { orderVersions } from './orders';
import { rulebooks } from './rulebook';

export const SIGNATURE_HOWS = ['password', 'session'] as const;

/** Insert only. The signer as printed at that time, and the hash of exactly what was signed. */
export const signatures = pgTable(
  'signatures',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    versionId: uuid('version_id'),
    rulebookId: uuid('rulebook_id'),
    /** The senior matter, for the meanings exception and countersignature. */
    exceptionId: uuid('exception_id'),
    meaning: text('meaning', { enum: SIGNATURE_MEANINGS }).notNull(),
    by: uuid('by_id').notNull(),
    printedName: text('printed_name').notNull(),
    printedTitle: text('printed_title').notNull(),
    printedRegistrationNumber: text('printed_registration_no'),
    at: instant('at').notNull(),
    how: text('how', { enum: SIGNATURE_HOWS }).notNull(),
    contentSha256: sha256('content_sha256').notNull(),
    /** Said with the signature: a choice accepted, the words of a settlement. */
    note: text('note'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    uniqueIndex('signatures_once')
      .on(t.hospitalId, t.versionId, t.meaning)
      .where(sql`${t.versionId} is not null and ${t.exceptionId} is null and ${t.meaning} <> 'witness'`),
    uniqueIndex('signatures_rulebook_once')
      .on(t.hospitalId, t.rulebookId, t.by)
      .where(sql`${t.rulebookId} is not null`),
    index('signatures_by').on(t.hospitalId, t.by, t.at),
    within('signatures_version', t, t.versionId, orderVersions),
    within('signatures_rulebook', t, t.rulebookId, rulebooks),
    within('signatures_exception', t, t.exceptionId, exceptions),
    within('signatures_by', t, t.by, accounts),
    oneOf('signatures_meaning', t.meaning, SIGNATURE_MEANINGS),
    oneOf('signatures_how', t.how, SIGNATURE_HOWS),
    check('signatures_subject', sql`num_nonnulls(${t.versionId}, ${t.rulebookId}) = 1`),
    ownHospital(),
  ],
);
