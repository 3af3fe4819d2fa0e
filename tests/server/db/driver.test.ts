import { connect, createServer, type AddressInfo } from 'node:net';
import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, describe, expect, it } from 'vitest';
import { openDatabase } from '../../../server/db/client';
import { DatabaseUnavailable } from '../../../server/db/faults';
import { done, inHospital, readInHospital } from '../../../server/db/in-hospital';
import { wards } from '../../../server/db/schema/hospitals';
import { inTransaction, INSTALLATION } from '../../../server/db/transaction';
import { sharedDatabase } from '../support/database';
import { faultOf, makeHospital, openAll } from './make-hospital';

const test = sharedDatabase();
const { owner, superuser } = openAll(test);
const one = openDatabase(test.appUrl, { max: 1 });
afterAll(() => one.close());

const cut = async (pid: number) => {
  await superuser.sql`select pg_terminate_backend(${pid})`;
  await sleep(100);
};

describe('a transaction whose connection was cut while it waited', () => {
  it('sends nothing into the transaction that has the connection next', async () => {
    const [a, b] = [await makeHospital(owner), await makeHospital(owner)];
    let goOn = () => undefined as void;
    const waits = new Promise<void>((resolve) => (goOn = resolve));
    let late: unknown;
    const first = inHospital(one, a.doctor, {}, async (tx) => {
      const [me] = await tx.execute<{ pid: number }>('select pg_backend_pid() as pid');
      await cut(me!.pid);
      await waits;
      late = await tx
        .insert(wards)
        .values({ name: 'Stray' })
        .then(
          () => 'sent',
          () => 'refused',
        );
      return done('first');
    });
    await expect(first).rejects.toThrow(DatabaseUnavailable);

    const second = await inHospital(one, b.doctor, {}, async (tx) => {
      await tx.insert(wards).values({ name: 'Curlew' });
      goOn();
      await sleep(100);
      await tx.insert(wards).values({ name: 'Plover' });
      return done('second');
    });
    expect(second.ok).toBe(true);
    expect(late).toBe('refused');
    const names = (hospitalId: string) =>
      readInHospital(one, { hospitalId }, async (tx) =>
        (await tx.select().from(wards)).map((ward) => ward.name).sort(),
      );
    expect(await names(b.id)).toEqual(['Curlew', 'Heron', 'Plover']);
    expect(await names(a.id)).toEqual(['Heron']);
  });
});

/** Stands between a pool and the database, goes away as soon as a connection asks for the array types, and stays away. */
async function cutterBefore(url: string): Promise<{ url: string; cuts: () => number }> {
  const { hostname, port } = new URL(url);
  let count = 0;
  const server = createServer((client) => {
    const upstream = connect(Number(port), hostname);
    const end = () => [client, upstream].forEach((socket) => socket.destroy());
    [client, upstream].forEach((socket) => socket.on('error', end).on('close', end));
    upstream.pipe(client);
    client.on('data', (data) => {
      if (!data.includes('typarray')) return void upstream.write(data);
      count += 1;
      server.close();
      end();
    });
  });
  await new Promise<void>((ready) => server.listen(0, '127.0.0.1', ready));
  const through = new URL(url);
  through.port = String((server.address() as AddressInfo).port);
  return { url: through.href, cuts: () => count };
}

describe('a connection that is cut while it is being made', () => {
  it('rejects the statement it was made for, and nothing outside of it', async () => {
    const cutter = await cutterBefore(test.appUrl);
    const stray: unknown[] = [];
    const note = (reason: unknown) => void stray.push(reason);
    process.on('unhandledRejection', note);
    const pool = openDatabase(cutter.url, { max: 1 });
    await expect(
      readInHospital(pool, { hospitalId: INSTALLATION }, (tx) => tx.execute('select 1')),
    ).rejects.toThrow(DatabaseUnavailable);
    await sleep(50);
    process.off('unhandledRejection', note);
    await pool.close();
    expect(cutter.cuts()).toBeGreaterThan(0);
    expect(stray).toEqual([]);
  });
});

describe('errors of the driver', () => {
  it('hold no bound values', async () => {
    const hospital = await makeHospital(owner);
    const insert = inTransaction(one, hospital.id, 'read write', (tx) =>
      tx.insert(wards).values([{ name: 'Secret-7' }, { name: 'Secret-7' }]),
    );
    const { message } = await faultOf(insert);
    expect(message).not.toContain('Secret-7');
    const thrown = await readInHospital(one, { hospitalId: hospital.id }, (tx) =>
      tx.insert(wards).values({ name: 'Secret-8' }),
    ).catch((error: unknown) => error as Error);
    expect(thrown).toBeInstanceOf(Error);
    const error = thrown as Error & { parameters?: unknown; query?: unknown };
    expect(`${error.message} ${error.stack} ${JSON.stringify(error)}`).not.toContain('Secret-8');
    expect([error.parameters, error.query]).toEqual([undefined, undefined]);
  });
});
