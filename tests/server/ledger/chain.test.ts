import { execFile } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';
import { describe, expect, it } from 'vitest';
import type { Database } from '../../../server/db/client';
import { done, inHospital, theProgram, type Acting } from '../../../server/db/in-hospital';
import { inTransaction, INSTALLATION } from '../../../server/db/transaction';
import { appendEntries } from '../../../server/ledger/append';
import type { LedgerNote } from '../../../server/ledger/entries';
import { rowHash, verifyChain } from '../../../server/ledger/verify';
import { faultOf, makeHospital, openAll } from '../db/make-hospital';
import { freshDatabase } from '../support/database';

const test = await freshDatabase();
const { app, owner, superuser } = openAll(test);

const note = (id: string, reason?: string): LedgerNote => ({
  act: 'order-withdrawn',
  subject: { kind: 'version', id },
  child: 'c1',
  code: 'BL-260610-001',
  version: 2,
  from: { state: 'signed' },
  to: { state: 'withdrawn' },
  ...(reason === undefined ? {} : { reason }),
});

const append = (actor: Acting, ...entries: LedgerNote[]) =>
  inHospital(app, actor, {}, () => Promise.resolve(done(null, { entries })));

/** As someone with the keys to everything would: triggers off, row-level security passed by. */
const tamper = (hospitalId: string, statement: string) =>
  superuser.sql.begin(async (sql) => {
    await sql.unsafe(
      `set local session_replication_role = replica; set local app.hospital_id = '${hospitalId}'`,
    );
    await sql.unsafe('alter table ledger drop constraint ledger_hash');
    await sql.unsafe(statement);
    await sql.unsafe(`alter table ledger add constraint ledger_hash
      check (hash = sha256(prev || int8send(seq) || convert_to(entry, 'UTF8'))) not valid`);
  });

async function chainOf(n: number): Promise<{ id: string; doctor: Acting }> {
  const hospital = await makeHospital(owner);
  for (let i = 1; i <= n; i += 1) await append(hospital.doctor, note(`v${i}`));
  return hospital;
}

describe('the chain', () => {
  it('is what its row says, in canonical text, found by its generated columns', async () => {
    const hospital = await makeHospital(owner);
    await append(hospital.doctor, note('v1', 'Zu früh – “nein” \\ \n ok'), note('v2'));
    const [first, second] = await inTransaction(superuser, hospital.id, 'read only', (tx) =>
      tx.execute<Record<string, unknown>>(
        `select seq::int, encode(prev, 'hex') as prev, encode(hash, 'hex') as hash, entry, act, outcome,
           subject_kind, subject_id, child_id, actor_id, code, at from ledger where hospital_id = '${hospital.id}' order by seq`,
      ),
    );
    expect(first).toMatchObject({
      seq: 1,
      prev: '0'.repeat(64),
      act: 'order-withdrawn',
      outcome: 'done',
      subject_kind: 'version',
      subject_id: 'v1',
      child_id: 'c1',
      actor_id: hospital.doctor.id,
      code: 'BL-260610-001',
      at: '2026-06-10T12:00:00.000Z',
    });
    expect(JSON.parse(first!.entry as string)).toMatchObject({
      reason: 'Zu früh – “nein” \\ \n ok',
      version: 2,
    });
    expect(first!.hash).toBe(rowHash('0'.repeat(64), 1, first!.entry as string));
    expect(second).toMatchObject({ seq: 2, prev: first!.hash });
  });

  it('stays whole under fifty appends at once, in two hospitals and the installation', async () => {
    const [a, b] = [await makeHospital(owner), await makeHospital(owner)];
    const installation = theProgram(INSTALLATION);
    const before = await verifyChain(app, INSTALLATION);
    await Promise.all(
      Array.from({ length: 50 }, (_, i) =>
        Promise.all(
          [a.doctor, b.checker, installation].map((actor) => append(actor, note(`x${i}`), note(`y${i}`))),
        ),
      ),
    );
    expect(await verifyChain(app, a.id)).toMatchObject({ whole: true, rows: 100 });
    expect(await verifyChain(app, b.id)).toMatchObject({ whole: true, rows: 100 });
    expect(await verifyChain(app, INSTALLATION)).toMatchObject({ whole: true, rows: before.rows + 100 });
  });

  it('tells its newest number to those who listen, after the commit', async () => {
    const hospital = await makeHospital(owner);
    const heard: string[] = [];
    const listening = await app.sql.listen('ledger', (payload) => {
      if (payload.startsWith(hospital.id)) heard.push(payload);
    });
    await append(hospital.doctor, note('v1'), note('v2'));
    await expect.poll(() => heard).toEqual([`${hospital.id}:2`]);
    await listening.unlisten();
  });

  it('takes no entry without act and time, none outside a hospital, none in another isolation level', async () => {
    const hospital = await makeHospital(owner);
    const raw = (line: string) =>
      inTransaction(app, hospital.id, 'read write', (tx) =>
        tx.execute(`select ledger_append(array['${line}'])`),
      );
    expect(await faultOf(raw('{"at":"2026-06-10T12:00:00.000Z"}'))).toMatchObject({
      constraint: 'ledger_entry',
    });
    expect(await faultOf(raw('{"act":"x","at":"yesterday"}'))).toMatchObject({ constraint: 'ledger_entry' });
    const outside = app.sql.unsafe(`select ledger_append(array['{}'])`);
    expect(await faultOf(Promise.resolve(outside))).toMatchObject({ code: 'BL002' });
    const serial = app.sql.begin('isolation level serializable', async (sql) => {
      await sql`select set_config('app.hospital_id', ${hospital.id}, true)`;
      await sql.unsafe(`select ledger_append(array['{}'])`);
    });
    expect(await faultOf(serial)).toMatchObject({ code: 'BL002' });
  });

  it('refuses an entry that is not canonical', async () => {
    const hospital = await makeHospital(owner);
    await expect(append(hospital.doctor, { ...note('v1'), to: { rate: 43.7 } })).rejects.toThrow(/decimals/);
  });
});

describe('verify', () => {
  it.each([
    [
      'a changed entry',
      (id: string) =>
        `update ledger set entry = replace(entry, 'v3', 'v9') where hospital_id = '${id}' and seq = 3`,
      { fault: 'row-changed', seq: 3 },
    ],
    [
      'a changed entry with its hash made to fit',
      (id: string) => `update ledger set entry = replace(entry, 'v3', 'v9'),
         hash = sha256(prev || int8send(seq) || convert_to(replace(entry, 'v3', 'v9'), 'UTF8')) where hospital_id = '${id}' and seq = 3`,
      { fault: 'row-unlinked', seq: 4 },
    ],
    [
      'a row taken out',
      (id: string) => `delete from ledger where hospital_id = '${id}' and seq = 2`,
      { fault: 'row-missing', seq: 2 },
    ],
    [
      'the last row taken off',
      (id: string) => `delete from ledger where hospital_id = '${id}' and seq = 5`,
      { fault: 'head-ahead', seq: 5 },
    ],
    [
      'the head gone',
      (id: string) => `delete from ledger_heads where hospital_id = '${id}'`,
      { fault: 'head-missing', seq: 5 },
    ],
    [
      'the head changed',
      (id: string) =>
        `update ledger_heads set hash = decode(repeat('ab', 32), 'hex') where hospital_id = '${id}'`,
      { fault: 'head-changed', seq: 5 },
    ],
  ])('finds %s', async (_name, statement, found) => {
    const { id } = await chainOf(5);
    expect(await verifyChain(app, id)).toMatchObject({ whole: true, rows: 5 });
    await tamper(id, statement(id));
    expect(await verifyChain(app, id)).toMatchObject({ whole: false, ...found });
  });

  it('walks past the size of one reading', async () => {
    const { id, doctor } = await makeHospital(owner);
    const many = Array.from({ length: 2001 }, (_, i) => note(`v${i}`));
    await append(doctor, ...many);
    expect(await verifyChain(app, id)).toMatchObject({ whole: true, rows: 2001 });
  });
});

describe('the command', () => {
  const cli = fileURLToPath(new URL('../../../server/ledger/verify-cli.ts', import.meta.url));
  const run = async (url: string) => {
    try {
      const env = { PATH: process.env.PATH, DATABASE_URL: url };
      const { stdout } = await promisify(execFile)(process.execPath, ['--import', 'tsx', cli], { env });
      return { code: 0, stdout };
    } catch (error) {
      const failed = error as { code: number; stdout: string };
      return { code: failed.code, stdout: failed.stdout };
    }
  };

  it('prints every chain, and exits 1 on a break', async () => {
    const other = await freshDatabase();
    const databases = openAll(other);
    const whole = await makeHospital(databases.owner);
    await inAppend(databases.app, whole.doctor);
    const good = await run(other.appUrl);
    expect(good.stdout).toMatch(
      /^Invented [^\n]*: 1 rows, chain whole, newest hash [0-9a-f]{64}\nThe installation: /,
    );
    expect(good.code).toBe(0);

    await databases.superuser.sql.begin(async (sql) => {
      await sql.unsafe('set local session_replication_role = replica');
      await sql.unsafe(`delete from ledger where hospital_id = '${whole.id}'`);
    });
    const bad = await run(other.appUrl);
    expect(bad.stdout).toMatch(/^Invented [^\n]*: CHAIN BROKEN at row 1: it is missing at the end\n/);
    expect(bad.code).toBe(1);
  });
});

const inAppend = (database: Database, actor: Acting) =>
  inTransaction(database, actor.hospitalId, 'read write', (_tx, sql) =>
    appendEntries(sql, [{ ...note('v1'), at: '2026-06-10T12:00:00.000Z', actor: null, outcome: 'done' }]),
  );
