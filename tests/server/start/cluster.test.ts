import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Cluster } from '../../../server/start/postgres';
import { findRunningCluster, startCluster } from '../../../server/start/postgres';
import { startTestCluster } from '../../../server/start/test-cluster';
import { freshDatabase, sharedDatabase } from '../support/database';

const purpose = `test-${process.pid}` as const;

let cluster: Cluster;
let destroy: () => Promise<void>;
beforeAll(async () => {
  ({ cluster, destroy } = await startTestCluster());
  await cluster.createDatabase('brimline');
});
afterAll(() => destroy());

async function rows(url: string, query: string): Promise<Record<string, unknown>[]> {
  const sql = postgres(url, { max: 1, onnotice: () => undefined });
  try {
    return [...(await sql.unsafe(query))];
  } finally {
    await sql.end();
  }
}

describe('a private cluster', () => {
  it('listens on the loopback address without a socket and keeps checksums', async () => {
    const shown = await cluster.query(
      'show listen_addresses; show unix_socket_directories; show data_checksums;',
    );
    expect(shown.split('\n')).toEqual(['127.0.0.1', '', 'on']);
  });

  it('asks everyone for a password', async () => {
    const wrong = cluster.appUrl('brimline').replace(/:[^:@]+@/, ':wrong@');
    await expect(rows(wrong, 'select 1')).rejects.toThrow('password authentication failed');
  });

  it('has an owner and a server role without power over the cluster', async () => {
    const found = await rows(
      cluster.superUrl,
      `select rolname, rolsuper or rolbypassrls or rolcreaterole or rolcreatedb as power, rolcanlogin as login
       from pg_roles where rolname in ('brimline_owner', 'brimline_app', 'brimline_server') order by rolname`,
    );
    expect(found).toEqual([
      { rolname: 'brimline_app', power: false, login: false },
      { rolname: 'brimline_owner', power: false, login: true },
      { rolname: 'brimline_server', power: false, login: true },
    ]);
  });

  it('lets the owner make tables and the server not', async () => {
    await rows(cluster.ownerUrl('brimline'), 'create table owned (a int)');
    await expect(rows(cluster.appUrl('brimline'), 'create table sneaked (a int)')).rejects.toThrow(
      'permission denied',
    );
    await expect(rows(cluster.appUrl('brimline'), 'select * from owned')).rejects.toThrow(
      'permission denied',
    );
  });

  it('keeps its port and data over a restart', async () => {
    await cluster.restart();
    expect(await rows(cluster.ownerUrl('brimline'), 'select count(*)::int as n from owned')).toEqual([
      { n: 0 },
    ]);
  });

  it('is adopted by the next start while it runs, and found by others', async () => {
    const again = await startCluster(purpose);
    expect(again.address).toEqual(cluster.address);
    expect((await findRunningCluster(purpose))?.superUrl).toBe(cluster.superUrl);
  });

  it('comes up again after its postmaster was killed', async () => {
    const pid = Number(
      (await cluster.query("select split_part(pg_read_file('postmaster.pid'), E'\\n', 1);")).trim(),
    );
    process.kill(pid, 'SIGKILL');
    const again = await startCluster(purpose);
    expect(await again.hasDatabase('brimline')).toBe(true);
  });

  it('stops twice without complaint and is then not found', async () => {
    await cluster.stop();
    await cluster.stop();
    expect(await findRunningCluster(purpose)).toBeNull();
    await cluster.start();
  });
});

describe('test databases', () => {
  it('are migrated copies that do not see each other', async () => {
    const own = await freshDatabase();
    await rows(own.superUrl, 'create table only_here (a int)');
    const tables =
      'select to_regclass($$only_here$$) is not null as here, to_regclass($$hospitals$$) is not null as migrated';
    expect(await rows(own.superUrl, tables)).toEqual([{ here: true, migrated: true }]);
    expect(await rows(sharedDatabase().superUrl, tables)).toEqual([{ here: false, migrated: true }]);
  });
});
