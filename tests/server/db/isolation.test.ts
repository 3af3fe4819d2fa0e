import { millilitresPerHour } from '@shared/units';
import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { readInHospital } from '../../../server/db/in-hospital';
import { children, stays } from '../../../server/db/schema/children';
import { coveredVersions } from '../../../server/db/schema/covered-versions';
import { orders } from '../../../server/db/schema/orders';
import { findPrint, inTransaction } from '../../../server/db/transaction';
import { prints } from '../../../server/db/schema/bedside';
import { sharedDatabase } from '../support/database';
import { anOrder, faultOf, makeHospital, NOON, openAll, plantVersion } from './make-hospital';

const { app, owner, superuser } = openAll(sharedDatabase());

describe('hospitals are kept apart by the database', () => {
  it('shows a hospital its own rows only, without any where clause', async () => {
    const [a, b] = [await makeHospital(owner), await makeHospital(owner)];
    const rows = await readInHospital(app, { hospitalId: a.id }, (tx) => tx.select().from(children));
    expect(rows.map((row) => row.id)).toEqual([a.childId]);
    const foreign = await readInHospital(app, { hospitalId: a.id }, (tx) =>
      tx.select().from(children).where(eq(children.id, b.childId)),
    );
    expect(foreign).toEqual([]);
  });

  it('binds the owner of the tables too', async () => {
    const [a] = [await makeHospital(owner), await makeHospital(owner)];
    const rows = await readInHospital(owner, { hospitalId: a.id }, (tx) => tx.select().from(children));
    expect(rows.map((row) => row.id)).toEqual([a.childId]);
  });

  it('shows nothing where no hospital is set, also on a connection that was used before', async () => {
    const hospital = await makeHospital(owner);
    await readInHospital(app, { hospitalId: hospital.id }, (tx) => tx.select().from(children));
    const found = await Promise.all(
      Array.from({ length: 20 }, () => app.sql`select count(*)::int as n from children`),
    );
    expect(found.map(([row]) => row?.n as number)).toEqual(Array(20).fill(0));
  });

  it('refuses a row written for another hospital', async () => {
    const [a, b] = [await makeHospital(owner), await makeHospital(owner)];
    const write = inTransaction(app, a.id, 'read write', (tx) =>
      tx.insert(stays).values({ hospitalId: b.id, childId: b.childId, wardId: b.wardId, from: NOON }),
    );
    expect(await faultOf(write)).toMatchObject({ code: '42501' });
  });

  it('refuses an order for a child of another hospital: the foreign key carries the hospital', async () => {
    const [a, b] = [await makeHospital(owner), await makeHospital(owner)];
    const write = inTransaction(app, a.id, 'read write', (tx) =>
      tx.insert(orders).values({ ...anOrder(a), childId: b.childId }),
    );
    expect(await faultOf(write)).toMatchObject({ code: '23503', constraint: 'orders_child_fk' });
  });

  it('has the hospital in every primary and foreign key between its tables', async () => {
    const bare = await superuser.sql`
      select conrelid::regclass::text as table, conname from pg_constraint c
      join pg_class t on t.oid = c.conrelid join pg_namespace n on n.oid = t.relnamespace
      where n.nspname = 'public' and t.relname <> 'hospitals' and contype in ('p', 'f')
        and coalesce(confrelid::regclass::text, '') <> 'hospitals'
        and not exists (select from pg_attribute a where a.attrelid = c.conrelid
          and a.attname = 'hospital_id' and a.attnum = any (c.conkey))`;
    expect([...bare]).toEqual([]);
  });

  it.each(['', 'x', "'; drop table children; --", '00000000-0000-0000-0000-00000000000G'])(
    'takes nothing but a uuid for a hospital: %j',
    async (hospitalId) => {
      await expect(readInHospital(app, { hospitalId }, () => Promise.resolve(1))).rejects.toThrow(RangeError);
    },
  );

  it('refuses writing in a read', async () => {
    const hospital = await makeHospital(owner);
    const write = readInHospital(app, { hospitalId: hospital.id }, (tx) =>
      tx.insert(orders).values(anOrder(hospital)),
    );
    expect(await faultOf(write)).toMatchObject({ code: '25006' });
  });
});

describe('covered_versions', () => {
  it('keeps hospitals apart and holds no figure, content, fluid or author', async () => {
    const [a, b] = [await makeHospital(owner), await makeHospital(owner)];
    const { versionId } = await plantVersion(owner, a, { rateMlH: millilitresPerHour(43.7) });
    await plantVersion(owner, b);
    const rows = await readInHospital(app, { hospitalId: a.id }, (tx) => tx.select().from(coveredVersions));
    expect(rows.map((row) => row.versionId)).toEqual([versionId]);

    const columns = await superuser.sql<{ name: string }[]>`
      select column_name as name from information_schema.columns where table_name = 'covered_versions'`;
    expect(columns.map((column) => column.name).sort()).toEqual([
      'asked_checker',
      'asked_start',
      'check_due_at',
      'child_id',
      'code',
      'hospital_id',
      'is_high_risk',
      'kind',
      'live',
      'order_id',
      'reason',
      'signed_at',
      'state',
      'state_since',
      'urgency',
      'version',
      'version_id',
    ]);
    expect(JSON.stringify(rows)).not.toContain(a.doctor.id);
    expect(JSON.stringify(rows)).not.toMatch(/43\.7|16\.4/);
  });
});

describe('a paper code', () => {
  it('leads to its hospital before one is known, and a wrong one to nothing', async () => {
    const hospital = await makeHospital(owner);
    const { versionId } = await plantVersion(owner, hospital);
    const code = hospital.id
      .replaceAll('-', '')
      .toUpperCase()
      .replaceAll(/[^A-F2-7]/g, 'Z')
      .slice(0, 20);
    await inTransaction(app, hospital.id, 'read write', (tx) =>
      tx.insert(prints).values({ code, versionId, ledgerSeq: 1, by: hospital.doctor.id, at: NOON }),
    );
    expect(await findPrint(app, code)).toEqual({ hospitalId: hospital.id, versionId });
    expect(await findPrint(app, 'A'.repeat(20))).toBeUndefined();
    expect(await findPrint(app, "'; select 1; --")).toBeUndefined();
  });
});
