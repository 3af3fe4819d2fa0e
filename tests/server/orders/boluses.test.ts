import { ROUTES } from '@shared/routes';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { exceptions } from '../../../server/db/schema/checks';
import { orderVersions } from '../../../server/db/schema/orders';
import { outbox } from '../../../server/db/schema/outbox';
import { sharedDatabase } from '../support/database';
import { makeWorld, PASSWORD, type World } from '../support/world';
import { draft, read, seen, sign, start, STATED, type } from './write-order';

/** An answer as text, less ids and hashes: they are random and may hold any digits. */
const withoutIds = (body: unknown): string =>
  JSON.stringify(body).replaceAll(/[0-9a-f]{8}-[0-9a-f-]{27}|[0-9a-f]{64}/g, '');

let world: World;
beforeAll(async () => {
  world = await makeWorld(sharedDatabase());
});

describe('two boluses of one child', () => {
  it('signed at once: the second does not pass the senior line of 40 mL/kg unnoticed', async () => {
    const childId = await world.addChild();
    const first = await draft(world, 'bolus', { mlPerKg: '20' }, childId);
    const other = world.as('otherDoctor');
    const second = await start(other, childId, 'bolus');
    await type(other, second.versionId, { ...STATED.bolus, mlPerKg: '20' });
    // both saw their own figures before either signed
    const send = async (client: typeof other, versionId: string) => {
      const shown = await seen(client, versionId);
      return () =>
        client.call(ROUTES.sign, { params: { id: versionId }, body: { ...shown, password: PASSWORD } });
    };
    const sends = [await send(world.as('doctor'), first.versionId), await send(other, second.versionId)];
    const answers = await Promise.all(sends.map((go) => go()));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    const refused = answers.find(({ status }) => status === 409)!;
    expect(refused.body.type).toContain('exception-needed');
    // 20 + 20 mL/kg reaches the line; the other order's figures are not told
    expect(refused.body.data.limits.map(({ code }: { code: string }) => code)).toEqual(['bolus-total']);
    expect(withoutIds(refused.body)).not.toMatch(/328|40 mL/);
  });

  it('shows a bolus that waits for its check to nobody, not even in the totals', async () => {
    const childId = await world.addChild();
    const first = await draft(world, 'bolus', { mlPerKg: '20' }, childId);
    expect((await sign(world.as('doctor'), first.versionId)).status).toBe(200);
    const other = world.as('otherDoctor');
    const second = await start(other, childId, 'bolus');
    const page = await read(other, second.versionId);
    expect(page.context.bolusesLast24h).toEqual([]);
    expect(withoutIds(page)).not.toContain('328');
  });

  it('in an emergency go on, and the senior matter falls due within the hour', async () => {
    const childId = await world.addChild();
    const first = await draft(world, 'bolus', { mlPerKg: '20' }, childId);
    expect((await sign(world.as('doctor'), first.versionId)).status).toBe(200);
    const second = await draft(world, 'bolus', { mlPerKg: '20', urgency: 'emergency' }, childId);
    const answer = await sign(world.as('doctor'), second.versionId);
    expect(answer.status, JSON.stringify(answer.body)).toBe(200);
    const rows = await world.within((tx) =>
      tx.select().from(exceptions).where(eq(exceptions.versionId, second.versionId)),
    );
    expect(rows.map(({ limitCode, state }) => [limitCode, state])).toEqual([['bolus-total', 'asked']]);
    expect(rows[0]!.countersignDueAt).toBe(world.clock.now() + 3_600_000);
    const mails = await world.within((tx) => tx.select().from(outbox));
    expect(mails.filter(({ ref }) => ref['versionId'] === second.versionId)).toEqual([]);
    const list = await world.as('senior').call(ROUTES.exceptionsForMe);
    const due = list.body.toCountersign.find(
      (row: { versionId: string }) => row.versionId === second.versionId,
    );
    const countersigned = await world.as('senior').call(ROUTES.countersignException, {
      params: { id: due.exceptionId as string },
      body: { password: PASSWORD },
    });
    expect(countersigned.status, JSON.stringify(countersigned.body)).toBe(200);
  });
});

describe('given in an emergency', () => {
  const give = (childId: string, change: object = {}) =>
    world.as('nurse').call(ROUTES.recordGiven, {
      params: { id: childId },
      body: {
        kind: 'bolus',
        weightId: null,
        productId: world.products['Sodium chloride 0.9%'],
        volumeMl: '164',
        overMinutes: '5',
        route: 'syringe',
        givenAt: '2026-06-10T11:50',
        onWordOfId: world.people.doctor.id,
        readBack: true,
        reason: 'Arrested in the bay',
        password: PASSWORD,
        ...change,
      },
    });

  it('is counted at once, open to the ward, and asks for a countersignature within the hour', async () => {
    const childId = await world.addChild();
    const answer = await give(childId);
    expect(answer.status, JSON.stringify(answer.body)).toBe(200);
    const [row] = await world.within((tx) =>
      tx
        .select()
        .from(orderVersions)
        .where(eq(orderVersions.id, answer.body.versionId as string)),
    );
    expect(row).toMatchObject({ state: 'given', volumeMl: 164, urgency: 'emergency' });
    expect(row!.checkDueAt).toBe(world.clock.now() + 3_600_000);
    const { versionId } = await draft(world, 'bolus', {}, childId);
    const { context } = await read(world.as('doctor'), versionId);
    expect(context.bolusesLast24h.map(({ ml }) => ml)).toEqual(['164.0']);
    const page = await world.as('checker').call(ROUTES.order, { params: { id: row!.id } });
    expect(page.body.open.content.figures.volumeMl).toBe('164.0');
    const mails = await world.within((tx) => tx.select().from(outbox));
    const kinds = mails.filter(({ ref }) => ref['versionId'] === row!.id).map(({ kind }) => kind);
    expect(new Set(kinds)).toEqual(new Set(['countersign-asked']));
  });

  it.each([
    // 16.4 kg × 20 = 328 mL
    ['over the volume of one dose', { volumeMl: '329' }, 'over-the-brim'],
    ['in the time to come', { givenAt: '2026-06-10T12:30' }, 'bad-input'],
    ['on nobody’s word', { onWordOfId: '00000000-0000-4000-8000-000000000000' }, 'bad-input'],
    ['in no number', { volumeMl: '16O' }, 'bad-input'],
    ['without having read it back', { readBack: false }, 'bad-input'],
  ])('is refused %s', async (_what, change, code) => {
    const answer = await give(await world.addChild(), change);
    expect(answer.body.type).toContain(code);
  });

  it('holds the brim on the fluid', async () => {
    const glucose = Object.entries(world.products).find(([name]) => name === 'Glucose 10%')!;
    const answer = await give(await world.addChild(), { productId: glucose[1] });
    expect(answer.body.type).toContain('over-the-brim');
  });
});
