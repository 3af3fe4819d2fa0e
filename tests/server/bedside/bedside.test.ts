import { ROUTES } from '@shared/routes';
import type { BedsideEntries } from '@shared/routes/bedside';
import { HOUR } from '@shared/time';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { infusionEvents, infusions } from '../../../server/db/schema/bedside';
import { children } from '../../../server/db/schema/children';
import { ledger } from '../../../server/db/schema/ledger';
import { nearMisses } from '../../../server/db/schema/near-misses';
import { orderVersions } from '../../../server/db/schema/orders';
import { signatures } from '../../../server/db/schema/signatures';
import { sharedDatabase } from '../support/database';
import {
  bedsideEntries,
  makeOrder,
  makeSignedOrder,
  productId,
  SALINE,
  SALINE_GLUCOSE,
  type MadeOrder,
} from '../support/make-order';
import { makeWorld, PASSWORD, type PersonKey, type World } from '../support/world';

let world: World;
beforeAll(async () => {
  world = await makeWorld(sharedDatabase());
});

type Change = Parameters<typeof bedsideEntries>[2];
type Signed = MadeOrder & { number: string };

async function signed(of: World = world, childId?: string): Promise<Signed> {
  const child = childId ?? (await of.addChild());
  const order = await makeSignedOrder(of, child);
  const number = await of.within(
    async (tx) => (await tx.select().from(children).where(eq(children.id, child)))[0]!.number,
  );
  return { ...order, number };
}

type StartBody = { entries?: BedsideEntries; witness?: object | null; replacesVersionId?: string | null };
const start = (
  order: Signed,
  change: Change = {},
  body: StartBody = {},
  by: PersonKey = 'nurse',
  of = world,
  key?: string,
) =>
  of.as(by).call(ROUTES.recordStart, {
    params: { id: order.versionId },
    body: {
      entries: bedsideEntries(of, order.number, change),
      witness: null,
      replacesVersionId: null,
      ...body,
    },
    ...(key ? { key } : {}),
  });
const problem = (answer: { body: unknown }) => (answer.body as { type?: string }).type;
const stateOf = (versionId: string, of = world) =>
  of.within(
    async (tx) => (await tx.select().from(orderVersions).where(eq(orderVersions.id, versionId)))[0]!.state,
  );
const missesOf = (versionId: string) =>
  world.within((tx) => tx.select().from(nearMisses).where(eq(nearMisses.versionId, versionId)));
const stop = (versionId: string, by: PersonKey = 'nurse', body: object = {}, of = world) =>
  of
    .as(by)
    .call(ROUTES.stop, { params: { id: versionId }, body: { reason: '', volumeInfusedMl: null, ...body } });

describe('the start', () => {
  it('is recorded when child, bag, pump and line agree', async () => {
    const order = await signed();
    const page = await world.as('nurse').call(ROUTES.bedside, { params: { id: order.versionId } });
    // 4 h × 44 mL/h
    expect(page.body).toMatchObject({
      state: 'signed',
      volumeToInfuse: { mostMl: '176.0', words: '4 h of flow at 44 mL/h' },
      witnessNeeded: false,
    });
    const answer = await start(order);
    expect(answer.body).toMatchObject({
      infusionId: expect.any(String),
      startedAt: '2026-06-10T11:00:00.000Z',
    });
    expect(await stateOf(order.versionId)).toBe('running');
    const [infusion] = await world.within((tx) =>
      tx.select().from(infusions).where(eq(infusions.versionId, order.versionId)),
    );
    expect(infusion).toMatchObject({
      pumpRateMlH: 44,
      pumpVolumeMl: 176,
      bagBatch: 'K26B114',
      line: 'left hand',
    });
    const marks = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.versionId, order.versionId)),
    );
    expect(marks.map(({ meaning }) => meaning).sort()).toEqual(['author', 'bedside', 'independent-check']);
  });

  it.each<[string, Change, string, string]>([
    ['pump ten times the order', { pump: { rate: '440' } }, 'pump-ten-times', 'Ten times the order.'],
    ['pump a tenth', { pump: { rate: '4.4' } }, 'pump-a-tenth', 'A tenth of the order.'],
    ['rate and volume swapped', { pump: { rate: '176', volume: '44' } }, 'pump-swapped', 'swapped'],
    ['too much volume on the pump', { pump: { volume: '1056' } }, 'pump-too-much', 'Set at most 176 mL'],
    [
      'wrong child',
      { child: { number: 'SM 000 000' } },
      'child-wrong-child',
      'Stop: is this the right child?',
    ],
    ['expired bag', { bag: { expiry: '2026-06-09' } }, 'bag-expired', 'This bag expired on 9 Jun 2026'],
    ['another line', { line: { lineClass: 'central' } }, 'line-another-line', 'peripheral'],
  ])('is refused on %s, said in words, kept as a near miss', async (_what, change, limitCode, words) => {
    const order = await signed();
    const compared = await world.as('nurse').call(ROUTES.compareStep, {
      params: { id: order.versionId },
      body: { step: Object.keys(change!)[0], entries: bedsideEntries(world, order.number, change) },
    });
    expect(compared.body).toMatchObject({ agrees: false });
    expect(compared.text).toContain(words);
    const answer = await start(order, change);
    expect(answer.status).toBe(409);
    expect(answer.body).toMatchObject({
      type: '/problems/bedside-differs',
      detail: expect.stringContaining(words),
    });
    expect(await stateOf(order.versionId)).toBe('signed');
    // compared and started: one near miss, two lines in the ledger
    expect(await missesOf(order.versionId)).toMatchObject([{ limitCode }]);
    const rows = await world.within((tx) =>
      tx.select().from(ledger).where(eq(ledger.subjectId, order.versionId)),
    );
    expect(rows.filter(({ act }) => act === 'bedside-compared' || act === 'infusion-started')).toHaveLength(
      2,
    );
    expect((await start(order)).status).toBe(200);
  });

  it('is refused with the wrong bag', async () => {
    const order = await signed();
    const answer = await start(order, { bag: { productId: productId(world, SALINE) } });
    expect(answer.body).toMatchObject({
      type: '/problems/bedside-differs',
      errors: [
        {
          pointer: '/entries/bag/productId',
          detail: `Another fluid. The order says ${SALINE_GLUCOSE}. Take this bag away.`,
        },
      ],
    });
    expect(await missesOf(order.versionId)).toMatchObject([
      { class: 'bedside', limitCode: 'bag-another-fluid' },
    ]);
  });

  it('keeps no near miss of what is only unfinished', async () => {
    const order = await signed();
    const answer = await start(order, { pump: { rate: '' }, line: { traced: false } });
    expect(answer.body).toMatchObject({ type: '/problems/bedside-differs' });
    expect(await missesOf(order.versionId)).toEqual([]);
  });

  it('is refused before the check, after lapse, to the author, to who is no nurse of the ward', async () => {
    const own = await makeWorld(sharedDatabase());
    const waiting = await makeOrder(own, await own.addChild());
    expect(problem(await start({ ...waiting, number: 'x' }, {}, {}, 'nurse', own))).toBe(
      '/problems/order-state',
    );
    const order = await signed(own);
    expect(problem(await start(order, {}, {}, 'doctor', own))).toBe('/problems/role-missing');
    expect(problem(await start(order, {}, {}, 'checker', own))).toBe('/problems/role-missing');
    own.clock.advance(6 * HOUR + 1);
    expect(problem(await start(order, {}, {}, 'nurse', own))).toBe('/problems/not-lapsed');
  });

  it('happens once: double click, two nurses', async () => {
    const order = await signed();
    const clicked = await Promise.all([
      start(order, {}, {}, 'nurse', world, 'click-0001'),
      start(order, {}, {}, 'otherNurse'),
    ]);
    expect(clicked.map(({ status }) => status).sort()).toEqual([200, 409]);
    const again = await signed();
    const client = world.as('nurse');
    const send = () =>
      client.call(ROUTES.recordStart, {
        params: { id: again.versionId },
        body: { entries: bedsideEntries(world, again.number), witness: null, replacesVersionId: null },
        key: 'click-0002',
      });
    const [first, second] = await Promise.all([send(), send()]);
    expect(first.body).toEqual(second.body);
    expect(first.status).toBe(200);
  });

  it('of a high-risk order needs a witness with their own credentials', async () => {
    const product = Object.keys(world.products).find(
      (name) => name.startsWith(`${SALINE_GLUCOSE} `) && name.includes('40'),
    )!;
    const childId = await world.addChild();
    const order = await makeSignedOrder(world, childId, {
      product,
      check: { addedPotassium: '40' },
      checker: 'pharmacist',
    });
    const number = await world.within(
      async (tx) => (await tx.select().from(children).where(eq(children.id, childId)))[0]!.number,
    );
    const bag = { productId: productId(world, product) };
    const by = (person: PersonKey, password = PASSWORD) => ({
      witness: { email: world.people[person].email, password },
    });
    const made = { ...order, number };
    expect(problem(await start(made, { bag }))).toBe('/problems/witness-needed');
    expect(problem(await start(made, { bag }, by('nurse')))).toBe('/problems/witness-needed');
    expect(problem(await start(made, { bag }, by('otherDoctor')))).toBe('/problems/witness-needed');
    expect(problem(await start(made, { bag }, by('otherNurse', 'wrong')))).toBe('/problems/sign-in-refused');
    expect(problem(await start(made, { bag: { ...bag, batch: '' } }, by('otherNurse')))).toBe(
      '/problems/bedside-differs',
    );
    expect((await start(made, { bag }, by('otherNurse'))).status).toBe(200);
    const marks = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.versionId, order.versionId)),
    );
    expect(marks.find(({ meaning }) => meaning === 'witness')).toMatchObject({
      by: world.people.otherNurse.id,
      how: 'password',
    });
  });

  it('is refused once the child weighs something else', async () => {
    const order = await signed();
    // 16.4 × 1.1 = 18.04
    await world.addWeight(order.childId, { kg: 18.1, at: world.clock.now() });
    const answer = await start(order);
    expect(answer.body).toMatchObject({
      type: '/problems/stale',
      detail: expect.stringContaining('18.1 kg'),
    });
    expect(await missesOf(order.versionId)).toMatchObject([{ class: 'weight', limitCode: 'weight-moved' }]);
  });

  it('never runs two maintenance orders side by side: the older is named as replaced', async () => {
    const older = await signed();
    await start(older);
    // half: 1320 ÷ 2 = 660 mL, 27.5 mL/h; with the older one 130 % of full maintenance
    const half = { fraction: 'half', rate: '27.5', volumeMl: '660' };
    const order = await makeSignedOrder(world, older.childId, {
      form: { fraction: 'half' },
      seen: { rateMlPerH: '27.5', volumeMl: '660.0' },
      check: half,
    });
    const newer = { ...order, number: older.number };
    const pump = { rate: '27.5', volume: '110' };
    const page = await world.as('nurse').call(ROUTES.bedside, { params: { id: newer.versionId } });
    expect(page.body).toMatchObject({ connected: [{ versionId: older.versionId, code: older.code }] });
    const refused = await start(newer, { pump });
    expect(refused.body).toMatchObject({
      type: '/problems/something-runs',
      data: { connected: [{ code: older.code }] },
    });
    const started = await start(newer, { pump }, { replacesVersionId: older.versionId });
    expect(started.status).toBe(200);
    expect(await stateOf(older.versionId)).toBe('replaced');
    expect(await stateOf(newer.versionId)).toBe('running');
  });
});

describe('the stop', () => {
  it('is refused to no clinical role of the hospital, whatever ward', async () => {
    for (const person of ['nurse', 'doctor', 'pharmacist', 'lead', 'elsewhere', 'unregistered'] as const) {
      const order = await signed();
      await start(order);
      const answer = await stop(order.versionId, person, { reason: 'swollen hand' });
      expect(answer.body).toMatchObject({ stoppedBy: world.people[person].name, reasonOwed: false });
      expect(await stateOf(order.versionId)).toBe('stopped');
    }
    const order = await signed();
    await start(order);
    expect(problem(await stop(order.versionId, 'admin'))).toBe('/problems/role-missing');
  });

  it('gives a second caller the first answer, and takes its reason afterwards', async () => {
    const order = await signed();
    await start(order);
    const [one, two] = await Promise.all([stop(order.versionId, 'nurse'), stop(order.versionId, 'doctor')]);
    expect(one.status).toBe(200);
    expect(two.body).toEqual(one.body);
    expect(one.body).toMatchObject({ reasonOwed: true });
    const told = await world.as('nurse').call(ROUTES.stopReason, {
      params: { id: order.versionId },
      body: { reason: 'Cannula tissued', volumeInfusedMl: '88' },
    });
    expect(told.body).toEqual({ ok: true });
    const [infusion] = await world.within((tx) =>
      tx.select().from(infusions).where(eq(infusions.versionId, order.versionId)),
    );
    expect(infusion).toMatchObject({ endReason: 'Cannula tissued', infusedMl: 88, endedHow: 'stopped' });
    const events = await world.within((tx) =>
      tx.select().from(infusionEvents).where(eq(infusionEvents.infusionId, infusion!.id)),
    );
    expect(events.map(({ kind }) => kind).sort()).toEqual(['reason-added', 'started', 'stopped']);
  });

  it('never waits for a volume that does not read', async () => {
    const order = await signed();
    await start(order);
    const answer = await stop(order.versionId, 'nurse', { reason: 'wet bed', volumeInfusedMl: '8,8' });
    expect(answer.body).toMatchObject({ reasonOwed: true });
    expect(await stateOf(order.versionId)).toBe('stopped');
  });

  it('works long past its time, from held and from away', async () => {
    const own = await makeWorld(sharedDatabase());
    const held = await signed(own);
    await start(held, {}, {}, 'nurse', own);
    const holding = await own
      .as('nurse')
      .call(ROUTES.hold, { params: { id: held.versionId }, body: { reason: 'bath' } });
    expect(holding.body).toEqual({ until: '2026-06-10T12:00:00.000Z' });
    const away = await signed(own);
    await start(away, {}, {}, 'nurse', own);
    await own
      .as('nurse')
      .call(ROUTES.sendAway, { params: { id: away.versionId }, body: { where: 'theatre' } });
    own.clock.advance(30 * HOUR);
    expect((await stop(held.versionId, 'nurse', {}, own)).status).toBe(200);
    expect((await stop(away.versionId, 'elsewhere', {}, own)).status).toBe(200);
  });

  it('has nothing to stop before a start', async () => {
    const order = await signed();
    expect(problem(await stop(order.versionId))).toBe('/problems/order-state');
  });
});

describe('held, resumed, finished', () => {
  it('compares the pump again before it resumes', async () => {
    const order = await signed();
    await start(order);
    const client = world.as('nurse');
    const params = { id: order.versionId };
    await client.call(ROUTES.hold, { params, body: { reason: '' } });
    expect(await stateOf(order.versionId)).toBe('held');
    const { pump } = bedsideEntries(world, order.number, { pump: { rate: '440' } });
    const refused = await client.call(ROUTES.resume, { params, body: { pump } });
    expect(refused.body).toMatchObject({
      type: '/problems/bedside-differs',
      errors: [{ pointer: '/pump/rate' }],
    });
    expect(await stateOf(order.versionId)).toBe('held');
    const resumed = await client.call(ROUTES.resume, { params, body: { pump: { ...pump, rate: '44' } } });
    expect(resumed.body).toEqual({ ok: true });
    const malformed = await client.call(ROUTES.finish, { params, body: { volumeInfusedMl: '1.056,0' } });
    expect(malformed.status).toBe(422);
    expect((await client.call(ROUTES.finish, { params, body: { volumeInfusedMl: '1056' } })).body).toEqual({
      ok: true,
    });
    expect(await stateOf(order.versionId)).toBe('finished');
  });

  it('a bolus by syringe shares the line with what runs', async () => {
    const running = await signed();
    await start(running);
    const bolus = await makeSignedOrder(world, running.childId, { kind: 'bolus' });
    const answer = await start(
      { ...bolus, number: running.number },
      {
        bag: { productId: productId(world, SALINE) },
        pump: { device: '', channel: '', rate: '', volume: '164', minutes: '10' },
      },
    );
    expect(answer.status).toBe(200);
    expect(await stateOf(running.versionId)).toBe('running');
  });
});
