import { readContent } from '@shared/orders/build-content';
import { columnsOf } from '@shared/orders/content-columns';
import { ROUTES } from '@shared/routes';
import { eq } from 'drizzle-orm';
import { createHash, randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { ledger } from '../../../server/db/schema/ledger';
import { nearMisses } from '../../../server/db/schema/near-misses';
import { orderVersions } from '../../../server/db/schema/orders';
import { outbox } from '../../../server/db/schema/outbox';
import { signatures } from '../../../server/db/schema/signatures';
import { sharedDatabase } from '../support/database';
import { makeWorld, PASSWORD, type World } from '../support/world';
import { draft, read, seen, sign, signedOrder, start, type } from './write-order';

let world: World;
beforeAll(async () => {
  world = await makeWorld(sharedDatabase());
});

const version = async (versionId: string) => {
  const [row] = await world.within((tx) =>
    tx.select().from(orderVersions).where(eq(orderVersions.id, versionId)),
  );
  return row!;
};
const mailsOf = (versionId: string) =>
  world.within(async (tx) =>
    (await tx.select().from(outbox)).filter((mail) => mail.ref['versionId'] === versionId),
  );
const ledgerOf = (versionId: string) =>
  world.within((tx) => tx.select().from(ledger).where(eq(ledger.subjectId, versionId)));

describe('a first draft', () => {
  it('proposes what can be proposed and leaves what must be stated', async () => {
    const childId = await world.addChild();
    const { versionId, code } = await start(world.as('doctor'), childId, 'maintenance');
    const { form, rev, context } = await read(world.as('doctor'), versionId);
    expect(code).toMatch(/^BL-260610-\d{3}$/);
    expect(rev).toBe(1);
    expect(form).toMatchObject({
      method: 'bands-daily',
      fraction: 'full',
      hours: '24',
      line: 'peripheral',
      feedsMl: '',
      drugsMl: '',
      reason: '',
      plannedStart: '2026-06-10T12:00',
    });
    expect(context.products.find(({ id }) => id === form.productId)?.name).toMatch(
      /Sodium chloride 0\.9% \+ glucose 5%/,
    );
  });

  it('is read by its author alone', async () => {
    const { versionId } = await draft(world, 'maintenance');
    const answer = await world.as('otherDoctor').call(ROUTES.draft, { params: { id: versionId } });
    expect(answer.status).toBe(403);
  });
});

describe('saving a draft', () => {
  it('refuses a stale rev with both texts and overwrites nothing', async () => {
    const doctor = world.as('doctor');
    const { versionId } = await draft(world, 'maintenance');
    const before = await read(doctor, versionId);
    await type(doctor, versionId, { drugsMl: '80' });
    const answer = await doctor.call(ROUTES.saveDraft, {
      params: { id: versionId },
      body: { rev: before.rev, form: { ...before.form, drugsMl: '90' } },
    });
    expect(answer.status).toBe(409);
    expect(answer.body.type).toContain('draft-moved');
    expect(answer.body.data.stored.form.drugsMl).toBe('80');
    expect(answer.body.data.yours.drugsMl).toBe('90');
    expect((await read(doctor, versionId)).form.drugsMl).toBe('80');
  });

  it('keeps half-typed and wrong input as it is', async () => {
    const doctor = world.as('doctor');
    const { versionId } = await draft(world, 'maintenance', { typedRate: '4.4e1', drugsMl: '7,' });
    expect((await read(doctor, versionId)).form).toMatchObject({ typedRate: '4.4e1', drugsMl: '7,' });
  });

  it('keeps the first crossing of a brim once', async () => {
    const { versionId } = await draft(world, 'bolus', { mlPerKg: '25' });
    await type(world.as('doctor'), versionId, { mlPerKg: '26' });
    const rows = await world.within((tx) =>
      tx.select().from(nearMisses).where(eq(nearMisses.versionId, versionId)),
    );
    expect(rows.map(({ class: kind, limitCode }) => [kind, limitCode])).toEqual([['brim', 'bolus-volume']]);
  });
});

describe('signing', () => {
  it('fixes the content, its hash, the columns, one signature, mails and the ledger together', async () => {
    const { versionId, code } = await signedOrder(world);
    const row = await version(versionId);
    expect(row.state).toBe('awaiting-check');
    const content = readContent(row.content!);
    expect(content).toMatchObject({ code, version: 1, kind: 'maintenance' });
    // 16.4 kg: 1000 + 320 = 1320, less 70 of drugs, 1250 in 24 h: 52.1 mL/h (Holliday & Segar 1957)
    expect(content.figures).toMatchObject({ rateMlPerH: '52.1', volumeMl: '1250.0', fullMl: '1320.0' });
    expect(row.contentSha256).toBe(createHash('sha256').update(row.content!, 'utf8').digest('hex'));
    expect(row).toMatchObject(columnsOf(content));
    const signed = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.versionId, versionId)),
    );
    expect(signed).toHaveLength(1);
    expect(signed[0]).toMatchObject({
      meaning: 'author',
      printedName: world.people.doctor.name,
      contentSha256: row.contentSha256,
    });
    expect((await ledgerOf(versionId)).map(({ act }) => act)).toEqual(['draft-started', 'order-signed']);
    expect((await mailsOf(versionId)).length).toBeGreaterThan(0);
  });

  it('mails every checker of the ward once, and never the author', async () => {
    const { versionId } = await signedOrder(world);
    const to = (await mailsOf(versionId)).map(({ toAccount }) => toAccount);
    const { checker, otherChecker, senior, otherNurse, pharmacist } = world.people;
    expect([...to].sort()).toEqual(
      [checker, otherChecker, senior, otherNurse, pharmacist].map(({ id }) => id).sort(),
    );
  });

  it('mails the named checker alone, without child, fluid, figure or author', async () => {
    const { versionId, childId } = await signedOrder(world, 'maintenance', {
      checkerId: world.people.checker.id,
    });
    const mails = await mailsOf(versionId);
    expect(mails.map(({ toAccount }) => toAccount)).toEqual([world.people.checker.id]);
    const ref = JSON.stringify(mails[0]!.ref);
    for (const secret of ['52.1', '1250', 'Thorne', 'Sodium', childId, world.people.doctor.name]) {
      expect(ref).not.toContain(secret);
    }
  });

  it('asks the password again', async () => {
    const { versionId } = await draft(world, 'maintenance');
    const answer = await sign(world.as('doctor'), versionId, { password: 'not-the-password' });
    expect(answer.body.type).toContain('password-wrong');
    expect((await version(versionId)).state).toBe('draft');
  });

  it.each([
    ['rate', { rateMlPerH: '52.2' }],
    ['volume', { volumeMl: '1251' }],
    ['rulebook', { rulebook: 2 }],
  ])('signs nothing when the %s is not the one that was seen', async (_what, change) => {
    const { versionId } = await draft(world, 'maintenance');
    const shown = await seen(world.as('doctor'), versionId);
    const answer = await sign(world.as('doctor'), versionId, { seen: { ...shown.seen, ...change } });
    expect(answer.status).toBe(409);
    expect(answer.body.type).toContain('figures-moved');
    expect(answer.body.data.figures.rateMlPerH).toBe('52.1');
    expect((await version(versionId)).state).toBe('draft');
    expect((await ledgerOf(versionId)).at(-1)).toMatchObject({ act: 'order-signed', outcome: 'refused' });
  });

  it('signs nothing when a bolus charted meanwhile moved the total', async () => {
    const childId = await world.addChild();
    const { versionId } = await draft(world, 'bolus', { mlPerKg: '20' }, childId);
    const shown = await seen(world.as('doctor'), versionId);
    // 20 mL/kg in the ambulance, charted meanwhile: 40 mL/kg in 24 h is a senior's matter (NICE NG29)
    await world.as('nurse').call(ROUTES.recordIntake, {
      params: { id: childId },
      body: { what: 'bolus', ml: '328', at: '2026-06-10T11:30', where: 'Ambulance' },
    });
    const answer = await sign(world.as('doctor'), versionId, shown);
    expect(answer.body.type).toContain('exception-needed');
  });

  it('signs nothing from a window that is behind', async () => {
    const { versionId } = await draft(world, 'maintenance');
    const shown = await seen(world.as('doctor'), versionId);
    await type(world.as('doctor'), versionId, { drugsNote: 'cefotaxime' });
    const answer = await sign(world.as('doctor'), versionId, { rev: shown.rev });
    expect(answer.body.type).toContain('draft-moved');
  });

  it('refuses over the brim and keeps the near miss', async () => {
    // 62 kg × 10 = 620 mL, one bolus holds 500 (common practice)
    const childId = await world.addChild({ bornOn: '2012-01-05', kg: 62 });
    const { versionId } = await draft(world, 'bolus', { doseBy: 'weight', mlPerKg: '10' }, childId);
    const answer = await sign(world.as('doctor'), versionId);
    expect(answer.body.type).toContain('over-the-brim');
    expect(answer.body.data.limits[0].offer.value).toBe('500');
    expect((await version(versionId)).state).toBe('draft');
  });

  it('names every field that is missing or malformed', async () => {
    const { versionId } = await draft(world, 'maintenance', { feedsMl: '', drugsMl: '7O' });
    const answer = await world.as('doctor').call(ROUTES.sign, {
      params: { id: versionId },
      body: { rev: 2, seen: { rateMlPerH: '52.1', volumeMl: '1250', rulebook: 1 }, password: PASSWORD },
    });
    expect(answer.status).toBe(422);
    expect(answer.body.errors.map(({ pointer }: { pointer: string }) => pointer)).toEqual([
      '/form/feedsMl',
      '/form/drugsMl',
    ]);
  });

  it.each(['elsewhere', 'unregistered', 'nurse', 'doctor', 'otherDoctor'] as const)(
    'refuses %s as the named checker',
    async (person) => {
      const { versionId } = await draft(world, 'maintenance', { checkerId: world.people[person].id });
      const answer = await sign(world.as('doctor'), versionId);
      expect(answer.body.type).toContain('checker-unfit');
    },
  );

  it('is one act however often it is sent', async () => {
    const { versionId } = await draft(world, 'maintenance');
    const key = randomUUID();
    const shown = await seen(world.as('doctor'), versionId);
    const client = world.as('doctor');
    const send = () =>
      client.call(ROUTES.sign, {
        params: { id: versionId },
        body: { ...shown, password: PASSWORD },
        key,
      });
    const answers = await Promise.all([send(), send()]);
    expect(answers.map(({ status }) => status)).toEqual([200, 200]);
    expect(answers[0].body).toEqual(answers[1].body);
    expect((await ledgerOf(versionId)).filter(({ act }) => act === 'order-signed')).toHaveLength(1);
    const mails = await mailsOf(versionId);
    expect(new Set(mails.map(({ toAccount }) => toAccount)).size).toBe(mails.length);
  });

  it('loses the second of two different signings of one draft', async () => {
    const { versionId } = await draft(world, 'maintenance');
    const answers = await Promise.all([
      sign(world.as('doctor'), versionId),
      sign(world.as('doctor'), versionId),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    const signed = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.versionId, versionId)),
    );
    expect(signed).toHaveLength(1);
  });
});
