import { drizzle } from 'drizzle-orm/postgres-js';
import { migrate as applyMigrations } from 'drizzle-orm/postgres-js/migrator';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import postgres, { type Sql } from 'postgres';
import { systemClock, type Clock } from '../clock';
import { appendEntries } from '../ledger/append';
import type { Database } from './client';
import { INSTALLATION } from './transaction';

const folder = fileURLToPath(new URL('../../migrations', import.meta.url));

/** Any fixed number: every Brimline process that migrates this database takes the same lock. */
const LOCK = 4_202_611;

type Journal = { entries: { when: number; tag: string }[] };

const journal = (): Journal['entries'] =>
  (JSON.parse(readFileSync(`${folder}/meta/_journal.json`, 'utf8')) as Journal).entries;

const newestKnown = (): number => Math.max(...journal().map((entry) => entry.when));

/** The newest migration in the database, as the journal counts; 0 when there is none. */
async function newestApplied(sql: Sql): Promise<number> {
  const [found] = await sql`select to_regclass('drizzle.__drizzle_migrations') is not null as there`;
  if (!found?.there) return 0;
  const [row] =
    await sql`select coalesce(max(created_at), 0)::text as newest from drizzle.__drizzle_migrations`;
  return Number(row?.newest);
}

/** Someone's newer program made this schema: an older one must not touch it. */
export class SchemaNewer extends Error {
  override readonly name = 'SchemaNewer';
  constructor() {
    super('The database was made by a newer Brimline. Run that version, or restore an older backup.');
  }
}

/** Brings the database up to this program's schema, one process at a time; throws SchemaNewer. */
export async function migrate(ownerUrl: string, clock: Clock = systemClock): Promise<void> {
  const sql = postgres(ownerUrl, { max: 1, onnotice: () => undefined, connection: { TimeZone: 'UTC' } });
  try {
    await sql`select pg_advisory_lock(${LOCK})`;
    const before = await newestApplied(sql);
    if (before > newestKnown()) throw new SchemaNewer();
    if (before === newestKnown()) return;
    await applyMigrations(drizzle(sql), { migrationsFolder: folder });
    await record(sql, before, clock);
  } finally {
    await sql.end({ timeout: 5 });
  }
}

async function record(sql: Sql, before: number, clock: Clock): Promise<void> {
  const applied = journal().filter((entry) => entry.when > before);
  await sql.begin(async (tx) => {
    await tx`select set_config('app.hospital_id', ${INSTALLATION}, true)`;
    await appendEntries(
      tx,
      applied.map(({ tag }) => ({
        act: 'schema-migrated' as const,
        subject: { kind: 'migration', id: tag },
        at: new Date(clock.now()).toISOString(),
        actor: null,
        outcome: 'done' as const,
      })),
    );
  });
}

/** Whether the database has exactly this program's schema; throws SchemaNewer when it is ahead. */
export async function schemaIsCurrent(database: Database): Promise<boolean> {
  const applied = await newestApplied(database.sql);
  if (applied > newestKnown()) throw new SchemaNewer();
  return applied === newestKnown();
}
