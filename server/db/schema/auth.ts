import { sql } from 'drizzle-orm';
import { check, index, integer, pgSchema, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { instant, oneOf } from '../columns';
import { hospitals } from './hospitals';

/** Sign-in comes before a hospital is known: no row-level security here, no names and nothing clinical. */
export const auth = pgSchema('auth');

export const logins = auth.table(
  'logins',
  {
    id: uuid('id').primaryKey().defaultRandom(),
    hospitalId: uuid('hospital_id')
      .notNull()
      .references(() => hospitals.id),
    email: text('email').notNull(),
    /** argon2id; absent until the invitation is taken up. */
    passwordHash: text('password_hash'),
    failedCount: integer('failed_count').notNull().default(0),
    lockedUntil: instant('locked_until'),
    disabledAt: instant('disabled_at'),
  },
  (t) => [
    uniqueIndex('logins_email').on(sql`lower(${t.email})`),
    unique('logins_hospital').on(t.hospitalId, t.id),
    check('logins_failed_count', sql`${t.failedCount} >= 0`),
  ],
);

export const SESSION_KINDS = ['own', 'beside'] as const;

export const sessions = auth.table(
  'sessions',
  {
    /** SHA-256 of the cookie's secret, hex. */
    id: text('id').primaryKey(),
    loginId: uuid('login_id')
      .notNull()
      .references(() => logins.id, { onDelete: 'cascade' }),
    kind: text('kind', { enum: SESSION_KINDS }).notNull().default('own'),
    madeAt: instant('made_at').notNull(),
    idleUntil: instant('idle_until').notNull(),
    absoluteUntil: instant('absolute_until').notNull(),
    lockedAt: instant('locked_at'),
    /** The beside session that took over this screen. */
    suspendedBy: text('suspended_by'),
    /** Beside only: the session it suspends and the version it may check. */
    besideOf: text('beside_of'),
    versionId: uuid('version_id'),
    agent: text('agent'),
  },
  (t) => [
    index('sessions_login').on(t.loginId),
    index('sessions_absolute_until').on(t.absoluteUntil),
    oneOf('sessions_kind', t.kind, SESSION_KINDS),
    check('sessions_id', sql`${t.id} ~ '^[0-9a-f]{64}$'`),
    check(
      'sessions_beside',
      sql`(${t.kind} = 'beside') = (${t.besideOf} is not null and ${t.versionId} is not null)`,
    ),
  ],
);

export const TOKEN_PURPOSES = ['invitation', 'password-reset'] as const;

export const oneTimeTokens = auth.table(
  'one_time_tokens',
  {
    /** SHA-256 of the token, hex. */
    sha256: text('sha256').primaryKey(),
    loginId: uuid('login_id')
      .notNull()
      .references(() => logins.id, { onDelete: 'cascade' }),
    purpose: text('purpose', { enum: TOKEN_PURPOSES }).notNull(),
    madeAt: instant('made_at').notNull(),
    expiresAt: instant('expires_at').notNull(),
    usedAt: instant('used_at'),
  },
  (t) => [
    index('one_time_tokens_login').on(t.loginId),
    oneOf('one_time_tokens_purpose', t.purpose, TOKEN_PURPOSES),
    check('one_time_tokens_sha256', sql`${t.sha256} ~ '^[0-9a-f]{64}$'`),
  ],
);
