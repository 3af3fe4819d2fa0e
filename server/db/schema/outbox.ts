import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { hospitalId, instant, oneOf, ownHospital, rowId, sha256, within } from '../columns';
import { accounts } from './accounts';

export const OUTBOX_STATES = ['due', 'sent', 'dead', 'dropped'] as const;

/** Mail to send, written in the act's own transaction. `ref` holds ids, never a name, fluid or figure. */
export const outbox = pgTable(
  'outbox',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    kind: text('kind').notNull(),
    toAccount: uuid('to_account').notNull(),
    ref: jsonb('ref').$type<Record<string, string>>().notNull(),
    state: text('state', { enum: OUTBOX_STATES }).notNull().default('due'),
    attempts: integer('attempts').notNull().default(0),
    madeAt: instant('made_at').notNull(),
    /** Not tried before this. */
    dueAt: instant('due_at').notNull(),
    sentAt: instant('sent_at'),
    lastError: text('last_error'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    index('outbox_due')
      .on(t.hospitalId, t.dueAt)
      .where(sql`${t.state} = 'due'`),
    index('outbox_dead')
      .on(t.hospitalId, t.madeAt)
      .where(sql`${t.state} = 'dead'`),
    within('outbox_to_account', t, t.toAccount, accounts),
    oneOf('outbox_state', t.state, OUTBOX_STATES),
    check('outbox_attempts', sql`${t.attempts} >= 0`),
    ownHospital(),
  ],
);

/** First answers, kept for a day: the same key gets the same answer. */
export const answers = pgTable(
  'answers',
  {
    hospitalId: hospitalId(),
    accountId: uuid('account_id').notNull(),
    key: text('key').notNull(),
    requestSha256: sha256('request_sha256').notNull(),
    /** Absent only inside the transaction that is making the answer. */
    status: text('status', { enum: ['done', 'refused'] }),
    body: text('body'),
    at: instant('at').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.accountId, t.key] }),
    index('answers_at').on(t.hospitalId, t.at),
    within('answers_account', t, t.accountId, accounts),
    ownHospital(),
  ],
);
