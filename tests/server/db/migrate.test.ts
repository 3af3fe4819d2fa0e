import { describe, expect, it } from 'vitest';
import { fixedClock } from '../../../server/clock';
import { openDatabase } from '../../../server/db/client';
import { migrate, schemaIsCurrent, SchemaNewer } from '../../../server/db/migrate';
import { INSTALLATION } from '../../../server/db/transaction';
import { verifyChain } from '../../../server/ledger/verify';
import { emptyDatabase } from '../support/database';
import { NOON, openAll } from './make-hospital';

describe('migrate', () => {
  it('is done once by three processes at once, and written into the installation’s chain', async () => {
    const test = await emptyDatabase();
    const { app, owner } = openAll(test);
    await Promise.all([1, 2, 3].map(() => migrate(test.ownerUrl, fixedClock(NOON))));
    expect(await schemaIsCurrent(app)).toBe(true);

    const [counted] = await owner.sql<
      { n: number }[]
    >`select count(*)::int as n from drizzle.__drizzle_migrations`;
    const rows = await owner.sql.begin(async (sql) => {
      await sql`select set_config('app.hospital_id', ${INSTALLATION}, true)`;
      return sql<{ act: string; at: string }[]>`select act, at from ledger`;
    });
    expect(rows).toHaveLength(counted!.n);
    expect(rows[0]).toEqual({ act: 'schema-migrated', at: '2026-06-10T12:00:00.000Z' });
    expect(await verifyChain(app, INSTALLATION)).toMatchObject({ whole: true, rows: counted!.n });
  });

  it('refuses a schema that a newer program made', async () => {
    const test = await emptyDatabase();
    const { app, owner } = openAll(test);
    await migrate(test.ownerUrl);
    await owner.sql`insert into drizzle.__drizzle_migrations (hash, created_at) values ('later', ${Date.now() * 2})`;
    await expect(migrate(test.ownerUrl)).rejects.toThrow(SchemaNewer);
    await expect(schemaIsCurrent(app)).rejects.toThrow(SchemaNewer);
  });

  it('knows a database that lags behind', async () => {
    const test = await emptyDatabase();
    const { app, owner } = openAll(test);
    await migrate(test.ownerUrl);
    await owner.sql`delete from drizzle.__drizzle_migrations where id = (select max(id) from drizzle.__drizzle_migrations)`;
    expect(await schemaIsCurrent(app)).toBe(false);
  });

  it('knows an empty database', async () => {
    const test = await emptyDatabase();
    const database = openDatabase(test.ownerUrl, { max: 1 });
    try {
      expect(await schemaIsCurrent(database)).toBe(false);
    } finally {
      await database.close();
    }
  });
});
