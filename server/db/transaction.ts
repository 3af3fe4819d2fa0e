import { PgDialect } from 'drizzle-orm/pg-core';
import { PostgresJsSession, PostgresJsTransaction } from 'drizzle-orm/postgres-js';
import type { TransactionSql } from 'postgres';
import type { Database } from './client';

/** A drizzle transaction whose statements are prepared once per connection. */
export type Tx = PostgresJsTransaction<Record<string, never>, Record<string, never>>;

const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/;

/** The chain and the name of what belongs to no hospital. */
export const INSTALLATION = '00000000-0000-0000-0000-000000000000';

const dialect = new PgDialect();

/** Drizzle asks for unprepared statements; prepared ones are about 1.4 times as fast under row-level security. */
function prepared(sql: TransactionSql): TransactionSql {
  const unsafe: TransactionSql['unsafe'] = (query, parameters, options) =>
    sql.unsafe(query, parameters ?? [], { ...options, prepare: true, simple: false } as never);
  const savepoint = ((work: (inner: TransactionSql) => Promise<unknown>) =>
    sql.savepoint((inner) => work(prepared(inner)))) as TransactionSql['savepoint'];
  return { unsafe, savepoint, options: sql.options } as TransactionSql;
}

const drizzleOn = (sql: TransactionSql): Tx =>
  new PostgresJsTransaction(
    dialect,
    new PostgresJsSession<TransactionSql, Record<string, never>, Record<string, never>>(
      prepared(sql),
      dialect,
      undefined,
    ),
    undefined,
  );

type Mode = 'read write' | 'read only';

/**
 * The driver cleans the words after BEGIN through their `replace`; answering it ourselves sends BEGIN and the
 * setting in one message, and keeps the driver's own handling of a connection lost half-way.
 */
function opening(mode: Mode, settings: string): string {
  return { replace: () => `${mode}; ${settings}` } as unknown as string;
}

/** Runs `work` in a transaction that sees one hospital's rows only; throws RangeError when the id is no uuid. */
export async function inTransaction<T>(
  database: Database,
  hospitalId: string,
  mode: Mode,
  work: (tx: Tx, sql: TransactionSql) => Promise<T>,
): Promise<T> {
  if (!UUID.test(hospitalId)) throw new RangeError('a hospital id is a lower-case uuid');
  const result = await database.sql.begin(
    opening(mode, `set local app.hospital_id = '${hospitalId}'`),
    (sql) => work(drizzleOn(sql), sql),
  );
  return result as T;
}

/** The paper behind a print code, before a hospital is known; undefined when there is none. */
export async function findPrint(
  database: Database,
  code: string,
): Promise<{ hospitalId: string; versionId: string } | undefined> {
  if (!/^[A-Z2-7]{20}$/.test(code)) return undefined;
  const rows = await database.sql.begin(
    opening('read only', `set local app.hospital_id = ''; set local app.print_code = '${code}'`),
    (sql) => sql<{ hospitalId: string; versionId: string }[]>`
      select hospital_id as "hospitalId", version_id as "versionId" from prints where code = ${code}`,
  );
  return rows[0];
}
