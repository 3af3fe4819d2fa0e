import { sql, type SQL } from 'drizzle-orm';
import { bigint, check, index, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { codeUnitText, hospitalId, ownHospital, sha256 } from '../columns';

const fromEntry = (path: string): SQL => sql.raw(`(entry::jsonb #>> '${path}')`);

/**
 * One hash chain per hospital, and one for the installation under the nil uuid. Rows come from ledger_append
 * only; the search columns are generated from `entry`, so they cannot say anything else than it does.
 */
export const ledger = pgTable(
  'ledger',
  {
    hospitalId: hospitalId(),
    seq: bigint('seq', { mode: 'number' }).notNull(),
    prev: sha256('prev').notNull(),
    hash: sha256('hash').notNull(),
    /** Canonical text. */
    entry: text('entry').notNull(),
    act: text('act').generatedAlwaysAs(fromEntry('{act}')),
    outcome: text('outcome').generatedAlwaysAs(fromEntry('{outcome}')),
    subjectKind: text('subject_kind').generatedAlwaysAs(fromEntry('{subject,kind}')),
    subjectId: text('subject_id').generatedAlwaysAs(fromEntry('{subject,id}')),
    childId: text('child_id').generatedAlwaysAs(fromEntry('{child}')),
    actorId: text('actor_id').generatedAlwaysAs(fromEntry('{actor,id}')),
    code: text('code').generatedAlwaysAs(fromEntry('{code}')),
    /** RFC 3339 in UTC with milliseconds: sorts as text. */
    at: codeUnitText('at').generatedAlwaysAs(fromEntry('{at}')),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.seq] }),
    index('ledger_subject').on(t.hospitalId, t.subjectId, t.seq),
    index('ledger_child').on(t.hospitalId, t.childId, t.seq),
    index('ledger_actor').on(t.hospitalId, t.actorId, t.seq),
    index('ledger_act').on(t.hospitalId, t.act, t.seq),
    index('ledger_code').on(t.hospitalId, t.code, t.seq),
    index('ledger_at').on(t.hospitalId, t.at),
    check(
      'ledger_hash',
      sql`${t.hash} = sha256(${t.prev} || int8send(${t.seq}) || convert_to(${t.entry}, 'UTF8'))`,
    ),
    check('ledger_entry', sql`act is not null and at ~ '^[0-9]{4}-[0-9]{2}-[0-9]{2}T[0-9:]{8}[.][0-9]{3}Z$'`),
    check('ledger_seq', sql`${t.seq} >= 1`),
    ownHospital(),
  ],
);

/** The newest row of each chain; locked last in every transaction that appends. */
export const ledgerHeads = pgTable(
  'ledger_heads',
  {
    hospitalId: uuid('hospital_id').primaryKey(),
    seq: bigint('seq', { mode: 'number' }).notNull(),
    hash: sha256('hash').notNull(),
  },
  () => [ownHospital()],
);
