import { describe, expect, it } from 'vitest';
import { openDatabase } from '../../../server/db/client';
import { assertSafeRole, roleFaults } from '../../../server/db/roles';
import { freshDatabase } from '../support/database';
import { faultOf, makeHospital, openAll } from './make-hospital';

const test = await freshDatabase();
const { app, owner, superuser } = openAll(test);

const as = (database: typeof app, hospitalId: string, statement: string) =>
  database.sql.begin(async (sql) => {
    await sql`select set_config('app.hospital_id', ${hospitalId}, true)`;
    await sql.unsafe(statement);
  });

describe('the role the server runs as', () => {
  it('is found safe', async () => {
    expect(await roleFaults(app)).toEqual([]);
    await expect(assertSafeRole(app)).resolves.toBeUndefined();
  });

  it('is refused when it owns the tables', async () => {
    await expect(assertSafeRole(owner)).rejects.toThrow(/owns table public\.ledger/);
  });

  it('is refused when it is a superuser', async () => {
    await expect(assertSafeRole(superuser)).rejects.toThrow(/superuser/);
  });

  it('is refused when it may change the ledger or a table stops forcing row-level security', async () => {
    await owner.sql`grant update on ledger to brimline_app`;
    await owner.sql`alter table stays no force row level security`;
    expect(await roleFaults(app)).toEqual([
      'table stays does not force row-level security',
      'the role may change ledger',
    ]);
    await owner.sql`revoke update on ledger from brimline_app`;
    await owner.sql`alter table stays force row level security`;
    expect(await roleFaults(app)).toEqual([]);
  });

  it('can be taken at connection by a login that may set it', async () => {
    await superuser.sql`grant brimline_app to brimline_owner`;
    const single = openDatabase(test.ownerUrl, { max: 1, role: 'brimline_app' });
    try {
      expect(await roleFaults(single)).toEqual([]);
    } finally {
      await single.close();
      await superuser.sql`revoke brimline_app from brimline_owner`;
    }
  });
});

describe('insert-only', () => {
  it.each(['ledger', 'signatures', 'infusion_events'])('%s: the server may not change it', async (table) => {
    const hospital = await makeHospital(owner);
    for (const statement of [
      `update ${table} set hospital_id = hospital_id`,
      `delete from ${table}`,
      `truncate ${table} cascade`,
    ]) {
      expect(await faultOf(as(app, hospital.id, statement)), statement).toMatchObject({ code: '42501' });
    }
  });

  it.each(['ledger', 'signatures', 'infusion_events'])('%s: its owner is refused too', async (table) => {
    const hospital = await makeHospital(owner);
    for (const statement of [
      `update ${table} set hospital_id = hospital_id`,
      `delete from ${table}`,
      `truncate ${table}`,
    ]) {
      expect(await faultOf(as(owner, hospital.id, statement)), statement).toMatchObject({ code: 'BL001' });
    }
  });

  it('lets the server write the ledger through its function only', async () => {
    const hospital = await makeHospital(owner);
    const insert = as(
      app,
      hospital.id,
      `insert into ledger (seq, prev, hash, entry) values (1, '\\x00', '\\x00', '{}')`,
    );
    expect(await faultOf(insert)).toMatchObject({ code: '42501' });
    expect(await faultOf(as(app, hospital.id, 'update ledger_heads set seq = 0'))).toMatchObject({
      code: '42501',
    });
  });

  it.each([
    'orders',
    'order_versions',
    'children',
    'weights',
    'checks',
    'rulebooks',
    'prints',
    'near_misses',
  ])('%s: nothing is deleted', async (table) => {
    const hospital = await makeHospital(owner);
    expect(await faultOf(as(app, hospital.id, `delete from ${table}`))).toMatchObject({ code: '42501' });
  });
});
