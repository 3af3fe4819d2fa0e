import { randomBytes } from 'node:crypto';
import { afterAll, inject } from 'vitest';
import { openDatabases } from '../../../server/start/databases';
import type { Databases } from '../../../server/start/databases';
import type { Cluster } from '../../../server/start/postgres';
import { startTestCluster } from '../../../server/start/test-cluster';
import { migrateDatabase } from '../../../server/start/demo-data';
import { SHARED, TEMPLATE } from './global-setup';

/** One migrated database, and the three ways in. */
export type TestDatabase = {
  name: string;
  /** Owns the schema and passes no row-level security by that (FORCE). */
  ownerUrl: string;
  /** What the server runs as. */
  appUrl: string;
  /** Superuser of this database: looks past row-level security, for what a test has to see or plant. */
  superUrl: string;
};

function describeDatabase(databases: Databases, name: string): TestDatabase {
  const superUrl = new URL(databases.superUrl);
  superUrl.pathname = `/${name}`;
  return {
    name,
    ownerUrl: databases.ownerUrl(name),
    appUrl: databases.appUrl(name),
    superUrl: superUrl.href,
  };
}

const databases = () => openDatabases(inject('cluster'));

/**
 * The database all test files share: every test makes its own hospital and sees nothing else.
 * For what works on all hospitals at once (sweep, outbox, migrations) take `freshDatabase`.
 */
export const sharedDatabase = (): TestDatabase => describeDatabase(databases(), SHARED);

/** A copy for this test file alone, dropped after its last test. Call it at the top of the file. */
export async function freshDatabase(): Promise<TestDatabase> {
  const name = `brimline_${randomBytes(6).toString('hex')}`;
  await databases().createDatabase(name, TEMPLATE);
  afterAll(() => databases().dropDatabase(name));
  return describeDatabase(databases(), name);
}

/** An empty database without schema, dropped after the file's last test: for tests of the migrations. */
export async function emptyDatabase(): Promise<TestDatabase> {
  const name = `brimline_${randomBytes(6).toString('hex')}`;
  await databases().createDatabase(name);
  afterAll(() => databases().dropDatabase(name));
  return describeDatabase(databases(), name);
}

/** A cluster for this test file alone, for tests that restart or stop PostgreSQL; removed afterwards. */
export async function ownCluster(): Promise<TestDatabase & { cluster: Cluster }> {
  const { cluster, destroy } = await startTestCluster();
  afterAll(destroy);
  const name = 'brimline';
  await cluster.createDatabase(name);
  await migrateDatabase(cluster.ownerUrl(name));
  return { ...describeDatabase(cluster, name), cluster };
}
