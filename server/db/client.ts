import { drizzle, type PostgresJsDatabase } from 'drizzle-orm/postgres-js';
import type { Sql } from 'postgres';
import { systemClock, type Clock } from '../clock';
import { openDriver } from './driver';

/** One pool, its clock and its two faces: drizzle for queries, `sql` for named statements and LISTEN. */
export type Database = {
  readonly sql: Sql;
  readonly db: PostgresJsDatabase;
  readonly clock: Clock;
  close(): Promise<void>;
};

type Options = {
  max?: number;
  clock?: Clock;
  /** Takes this role at connection; for installations with a single database address. */
  role?: string;
  applicationName?: string;
};

/** Opens a pool in UTC with time limits; connects on first use. */
export function openDatabase(url: string, options: Options = {}): Database {
  const sql = openDriver(url, {
    max: options.max ?? 10,
    connect_timeout: 5,
    // s; the driver's own grows to 20 with every connection that was cut
    backoff: () => 0.2,
    onnotice: () => undefined,
    connection: {
      application_name: options.applicationName ?? 'brimline',
      TimeZone: 'UTC',
      statement_timeout: 10_000,
      idle_in_transaction_session_timeout: 30_000,
      ...(options.role ? { role: options.role } : {}),
    },
  });
  return {
    sql,
    db: drizzle(sql),
    clock: options.clock ?? systemClock,
    close: () => sql.end({ timeout: 5 }),
  };
}
