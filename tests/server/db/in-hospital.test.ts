import { eq } from 'drizzle-orm';
import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { openDatabase } from '../../../server/db/client';
import { forgetAnswers } from '../../../server/db/answers';
import { DatabaseUnavailable } from '../../../server/db/faults';
import {
  done,
  inHospital,
  readInHospital,
  refused,
  theProgram,
  type Command,
} from '../../../server/db/in-hospital';
import { ledger } from '../../../server/db/schema/ledger';
import { nearMisses } from '../../../server/db/schema/near-misses';
import { answers, outbox } from '../../../server/db/schema/outbox';
import { wards } from '../../../server/db/schema/hospitals';
import { orderVersions } from '../../../server/db/schema/orders';
import { inTransaction } from '../../../server/db/transaction';
import { instant } from '@shared/time';
import { sharedDatabase } from '../support/database';
import { aVersion, anOrder, makeHospital, NOON, openAll, type Hospital } from './make-hospital';
import { orders } from '../../../server/db/schema/orders';
import { millilitresPerHour } from '@shared/units';

const { app, owner } = openAll(sharedDatabase());

const note = (id: string) => ({ act: 'ward-added' as const, subject: { kind: 'ward', id } });

const addWard =
  (name: string): Command<{ wardId: string }> =>
  async (tx) => {
    const [ward] = await tx.insert(wards).values({ name }).returning();
    return done({ wardId: ward!.id }, { entries: [note(ward!.id)] });
  };

const all = (hospital: Hospital) =>
  readInHospital(app, { hospitalId: hospital.id }, async (tx) => ({
    wards: (await tx.select().from(wards)).map((ward) => ward.name).sort(),
    ledger: await tx
      .select({
        act: ledger.act,
        outcome: ledger.outcome,
        actor: ledger.actorId,
        at: ledger.at,
        entry: ledger.entry,
      })
      .from(ledger)
      .orderBy(ledger.seq),
    mails: await tx.select().from(outbox),
    misses: await tx.select().from(nearMisses),
    answers: await tx.select().from(answers),
  }));

describe('inHospital', () => {
  it('commits the writes, the mail and the ledger row of an act together', async () => {
    const hospital = await makeHospital(owner);
    const answer = await inHospital(app, hospital.doctor, {}, async (tx) => {
      await tx.insert(wards).values({ name: 'Curlew' });
      return done('made', {
        entries: [{ ...note('w'), reason: 'opened' }],
        mails: [{ kind: 'check-asked', toAccount: hospital.checker.id, ref: { version: 'v' } }],
      });
    });
    expect(answer).toEqual({ ok: true, value: 'made', replayed: false });
    const found = await all(hospital);
    expect(found.wards).toEqual(['Curlew', 'Heron']);
    expect(found.ledger).toMatchObject([
      { act: 'ward-added', outcome: 'done', actor: hospital.doctor.id, at: '2026-06-10T12:00:00.000Z' },
    ]);
    expect(found.mails).toMatchObject([
      { toAccount: hospital.checker.id, state: 'due', dueAt: NOON, attempts: 0 },
    ]);
  });

  it('keeps the refusal and undoes what the refused command wrote', async () => {
    const hospital = await makeHospital(owner);
    const answer = await inHospital(app, hospital.doctor, {}, async (tx) => {
      await tx.insert(wards).values({ name: 'Curlew' });
      return refused('conflict', {
        detail: 'no',
        data: { offer: '500' },
        entries: [note('w')],
        nearMisses: [{ class: 'brim', limitCode: 'bolus-one-dose', dedupe: 'd1', value: '620 mL' }],
      });
    });
    expect(answer).toEqual({
      ok: false,
      code: 'conflict',
      detail: 'no',
      data: { offer: '500' },
      replayed: false,
    });
    const found = await all(hospital);
    expect(found.wards).toEqual(['Heron']);
    expect(found.ledger).toMatchObject([{ act: 'ward-added', outcome: 'refused' }]);
    expect(found.ledger[0]?.entry).toContain('"refusal":"conflict"');
    expect(found.misses).toMatchObject([
      { class: 'brim', by: hospital.doctor.id, at: NOON, value: '620 mL' },
    ]);
  });

  it('logs what was being tried when a refusing command says nothing itself', async () => {
    const hospital = await makeHospital(owner);
    await inHospital(app, hospital.doctor, { attempt: note('t') }, () => Promise.resolve(refused('stale')));
    expect((await all(hospital)).ledger).toMatchObject([{ act: 'ward-added', outcome: 'refused' }]);
  });

  it('keeps one near miss however often it is typed', async () => {
    const hospital = await makeHospital(owner);
    const type = () =>
      inHospital(app, hospital.doctor, {}, () =>
        Promise.resolve(done(null, { nearMisses: [{ class: 'brim', limitCode: 'x', dedupe: 'draft-1:x' }] })),
      );
    await type();
    await type();
    expect((await all(hospital)).misses).toHaveLength(1);
  });

  it('leaves nothing behind when a command throws', async () => {
    const hospital = await makeHospital(owner);
    const broken = inHospital(app, hospital.doctor, { key: 'k' }, async (tx) => {
      await tx.insert(wards).values({ name: 'Curlew' });
      throw new Error('our fault');
    });
    await expect(broken).rejects.toThrow('our fault');
    expect(await all(hospital)).toMatchObject({ wards: ['Heron'], ledger: [], answers: [] });
  });

  it('answers a broken unique rule as a conflict and logs it in a transaction of its own', async () => {
    const hospital = await makeHospital(owner);
    const answer = await inHospital(app, hospital.doctor, { attempt: note('t') }, addWard('Heron'));
    expect(answer).toEqual({ ok: false, code: 'conflict', replayed: false });
    const found = await all(hospital);
    expect(found.wards).toEqual(['Heron']);
    expect(found.ledger).toMatchObject([{ act: 'ward-added', outcome: 'refused' }]);
  });

  it('answers a last-resort limit by its own code, even when the command looked away', async () => {
    const hospital = await makeHospital(owner);
    const answer = await inHospital(app, hospital.doctor, { attempt: note('t') }, async (tx) => {
      const [order] = await tx.insert(orders).values(anOrder(hospital)).returning();
      const over = aVersion(hospital, order!.id, { rateMlH: millilitresPerHour(440) });
      await tx
        .insert(orderVersions)
        .values(over)
        .catch(() => undefined);
      return done('signed');
    });
    expect(answer).toMatchObject({ ok: false, code: 'last-resort-limit' });
    expect((await all(hospital)).ledger).toMatchObject([{ outcome: 'refused' }]);
  });

  it('writes the program as no person', async () => {
    const hospital = await makeHospital(owner);
    await inHospital(app, theProgram(hospital.id), {}, addWard('Wren'));
    expect((await all(hospital)).ledger[0]?.entry).toContain('"actor":null');
  });
});

describe('an idempotency key', () => {
  it('gives the first answer again and does the act once', async () => {
    const hospital = await makeHospital(owner);
    const options = { key: randomUUID(), request: { name: 'Curlew' } };
    const first = await inHospital(app, hospital.doctor, options, addWard('Curlew'));
    const again = await inHospital(app, hospital.doctor, options, addWard('Curlew'));
    expect(again).toEqual({ ...first, replayed: true });
    const found = await all(hospital);
    expect(found.wards).toEqual(['Curlew', 'Heron']);
    expect(found.ledger).toHaveLength(1);
  });

  it('gives a first refusal again, and logs it once', async () => {
    const hospital = await makeHospital(owner);
    const options = { key: 'k1', request: {}, attempt: note('t') };
    const refuse = () => Promise.resolve(refused('stale', { detail: 'moved' }));
    await inHospital(app, hospital.doctor, options, refuse);
    const again = await inHospital(app, hospital.doctor, options, addWard('Curlew'));
    expect(again).toEqual({ ok: false, code: 'stale', detail: 'moved', replayed: true });
    expect((await all(hospital)).ledger).toHaveLength(1);
  });

  it('gives a broken rule again', async () => {
    const hospital = await makeHospital(owner);
    const options = { key: 'k1', request: {} };
    await inHospital(app, hospital.doctor, options, addWard('Heron'));
    const again = await inHospital(app, hospital.doctor, options, addWard('Heron'));
    expect(again).toEqual({ ok: false, code: 'conflict', replayed: true });
    expect((await all(hospital)).ledger).toHaveLength(1);
  });

  it('is refused for another request, and is free for another person', async () => {
    const hospital = await makeHospital(owner);
    await inHospital(app, hospital.doctor, { key: 'k', request: { a: 1 } }, addWard('Curlew'));
    const other = await inHospital(app, hospital.doctor, { key: 'k', request: { a: 2 } }, addWard('Plover'));
    expect(other).toEqual({ ok: false, code: 'key-reused', replayed: false });
    const person = await inHospital(
      app,
      hospital.checker,
      { key: 'k', request: { a: 2 } },
      addWard('Plover'),
    );
    expect(person.ok).toBe(true);
    expect((await all(hospital)).wards).toEqual(['Curlew', 'Heron', 'Plover']);
  });

  it('keeps nothing of a password', async () => {
    const hospital = await makeHospital(owner);
    const request = (password: string) => ({ key: 'k', request: { rev: 1, password } });
    await inHospital(app, hospital.doctor, request('one'), addWard('Curlew'));
    const again = await inHospital(app, hospital.doctor, request('two'), addWard('Curlew'));
    expect(again).toMatchObject({ ok: true, replayed: true });
  });

  it('makes one act of twenty clicks at once', async () => {
    const hospital = await makeHospital(owner);
    const options = { key: randomUUID(), request: { name: 'Curlew' } };
    const clicks = await Promise.all(
      Array.from({ length: 20 }, () => inHospital(app, hospital.doctor, options, addWard('Curlew'))),
    );
    expect(clicks.filter((click) => !click.replayed)).toHaveLength(1);
    expect(new Set(clicks.map((click) => click.ok && click.value.wardId)).size).toBe(1);
    const found = await all(hospital);
    expect(found.wards).toEqual(['Curlew', 'Heron']);
    expect(found.ledger).toHaveLength(1);
  });

  it('is forgotten by the sweep when it is old', async () => {
    const hospital = await makeHospital(owner);
    await inHospital(app, hospital.doctor, { key: 'k' }, addWard('Curlew'));
    await inTransaction(app, hospital.id, 'read write', (tx) => forgetAnswers(tx, NOON));
    expect((await all(hospital)).answers).toHaveLength(1);
    await inTransaction(app, hospital.id, 'read write', (tx) => forgetAnswers(tx, instant(NOON + 1)));
    expect((await all(hospital)).answers).toEqual([]);
  });

  it('needs a person', async () => {
    const hospital = await makeHospital(owner);
    await expect(inHospital(app, theProgram(hospital.id), { key: 'k' }, addWard('Wren'))).rejects.toThrow(
      TypeError,
    );
  });
});

describe('a lost database', () => {
  const nowhere = 'postgres://brimline_server:x@127.0.0.1:1/none';

  it('is said as such, for writing and for reading', async () => {
    const hospital = await makeHospital(owner);
    const gone = openDatabase(nowhere, { max: 1 });
    try {
      await expect(inHospital(gone, hospital.doctor, {}, addWard('X'))).rejects.toThrow(DatabaseUnavailable);
      await expect(
        readInHospital(gone, { hospitalId: hospital.id }, () => Promise.resolve(1)),
      ).rejects.toThrow(DatabaseUnavailable);
    } finally {
      await gone.close();
    }
  });

  it('loses the act when the connection is cut in the middle, and the same key does it afterwards', async () => {
    const hospital = await makeHospital(owner);
    const options = { key: 'k', request: {} };
    const cut = inHospital(app, hospital.doctor, options, async (tx) => {
      await tx.insert(wards).values({ name: 'Curlew' });
      const [me] = await tx.execute<{ pid: number }>('select pg_backend_pid() as pid');
      await owner.sql`select 1`;
      await superKill(me!.pid);
      await tx.select().from(wards);
      return done('never');
    });
    await expect(cut).rejects.toThrow(DatabaseUnavailable);
    expect(await all(hospital)).toMatchObject({ wards: ['Heron'], ledger: [], answers: [] });
    const again = await inHospital(app, hospital.doctor, options, addWard('Curlew'));
    expect(again).toMatchObject({ ok: true, replayed: false });
    expect((await all(hospital)).wards).toEqual(['Curlew', 'Heron']);
  });
});

const { superuser } = openAll(sharedDatabase());
const superKill = (pid: number) => superuser.sql`select pg_terminate_backend(${pid})`;

describe('prepared statements', () => {
  it('are used inside transactions', async () => {
    const hospital = await makeHospital(owner);
    const names = await inTransaction(app, hospital.id, 'read only', async (tx) => {
      await tx.select({ id: wards.id }).from(wards).where(eq(wards.name, 'Heron'));
      return tx.execute<{ statement: string }>('select statement from pg_prepared_statements');
    });
    expect(names.some((row) => row.statement.includes('"wards"."name" = $1'))).toBe(true);
  });
});
