import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, describe, expect, it } from 'vitest';
import { openDatabase } from '../../../server/db/client';
import { DatabaseUnavailable } from '../../../server/db/faults';
import { done, inHospital, readInHospital } from '../../../server/db/in-hospital';
import { wards } from '../../../server/db/schema/hospitals';
import { inTransaction } from '../../../server/db/transaction';
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
