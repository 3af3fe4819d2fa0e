import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, expect, it } from 'vitest';
import { openDatabase } from '../../../server/db/client';
import { DatabaseUnavailable } from '../../../server/db/faults';
import { done, inHospital, readInHospital, theProgram } from '../../../server/db/in-hospital';
import { ledger } from '../../../server/db/schema/ledger';
import { verifyChain } from '../../../server/ledger/verify';
import { ownCluster } from '../support/database';
import { makeHospital } from './make-hospital';

const POOL = 10;
const WORKERS = 25;

const test = await ownCluster();
const app = openDatabase(test.appUrl, { max: POOL });
const owner = openDatabase(test.ownerUrl, { max: 1 });
afterAll(() => Promise.all([app.close(), owner.close()]));

type Tally = { done: number; unavailable: number; other: unknown[] };

/** Acts without a pause until told to stop; each act writes one ledger row and sends two statements at once. */
async function work(hospitalId: string, tally: Tally, going: () => boolean): Promise<void> {
  while (going()) {
    try {
      await inHospital(app, theProgram(hospitalId), {}, async (tx) => {
        await Promise.all([tx.execute('select pg_sleep(0.002)'), tx.execute('select 1')]);
        return done(null, { entries: [{ act: 'reminder-sent', subject: { kind: 'test', id: 'x' } }] });
      });
      tally.done += 1;
    } catch (error) {
      if (error instanceof DatabaseUnavailable) tally.unavailable += 1;
      else tally.other.push(error);
      await sleep(10);
    }
  }
}

it.each(['fast', 'immediate'] as const)('outlives a database that restarts under load (%s)', async (how) => {
  const hospital = await makeHospital(owner);
  const heard: string[] = [];
  const listening = await app.sql.listen('ledger', (payload) => heard.push(payload));
  const tally: Tally = { done: 0, unavailable: 0, other: [] };
  let going = true;
  const workers = Array.from({ length: WORKERS }, () => work(hospital.id, tally, () => going));
  await sleep(300);
  for (let round = 0; round < 3; round += 1) {
    await test.cluster.restart(how);
    await sleep(300);
  }
  const before = tally.done;
  await expect.poll(() => tally.done, { timeout: 10_000 }).toBeGreaterThan(before + WORKERS);
  going = false;
  await Promise.all(workers);

  expect(tally.other).toEqual([]);
  expect(tally.unavailable).toBeGreaterThan(0);
  // no act is lost that was answered, and none is half there
  const rows = await readInHospital(app, { hospitalId: hospital.id }, (tx) => tx.select().from(ledger));
  expect(rows.length).toBeGreaterThanOrEqual(tally.done);
  expect(await verifyChain(app, hospital.id)).toMatchObject({ whole: true, rows: rows.length });

  // the LISTEN connection came back
  heard.length = 0;
  await inHospital(app, theProgram(hospital.id), {}, () =>
    Promise.resolve(done(null, { entries: [{ act: 'reminder-sent', subject: { kind: 'test', id: 'y' } }] })),
  );
  await expect.poll(() => heard, { timeout: 5000 }).toEqual([`${hospital.id}:${rows.length + 1}`]);

  // every place of the pool works
  const pids = await Promise.all(
    Array.from({ length: POOL }, () =>
      readInHospital(app, { hospitalId: hospital.id }, async (tx) => {
        const [me] = await tx.execute<{ pid: number }>('select pg_backend_pid() as pid, pg_sleep(0.5)');
        return me!.pid;
      }),
    ),
  );
  expect(new Set(pids).size).toBe(POOL);
  await listening.unlisten();
});
