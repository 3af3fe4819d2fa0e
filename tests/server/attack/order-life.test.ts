import { ROUTES } from '@shared/routes';
import type { RouteDefinition } from '@shared/routes/define';
import { eq } from 'drizzle-orm';
import type { Response } from 'supertest';
import { beforeEach, describe, expect, it } from 'vitest';
import { infusions } from '../../../server/db/schema/bedside';
import { children } from '../../../server/db/schema/children';
import { orderVersions } from '../../../server/db/schema/orders';
import { sharedDatabase } from '../support/database';
import {
  bedsideEntries,
  bolusCheckForm,
  fillDraft,
  lockIn,
  makeSignedOrder,
  SALINE,
  signCheck,
  signDraft,
  type MadeOrder,
} from '../support/make-order';
import { makeWorld, PASSWORD, type PersonKey, type World } from '../support/world';

let world: World;
let childId: string;
beforeEach(async () => {
  world = await makeWorld(sharedDatabase());
  childId = await world.addChild();
});

const problem = (answer: Response) => (answer.body as { type?: string }).type;
const by = (
  person: PersonKey,
  route: RouteDefinition,
  versionId: string,
  body: unknown = {},
  options: { key?: string } = {},
) => world.as(person).call(route, { params: { id: versionId }, body, ...options });
const versionOf = (versionId: string) =>
  world.within(
    async (tx) => (await tx.select().from(orderVersions).where(eq(orderVersions.id, versionId)))[0]!,
  );
const stateOf = async (versionId: string) => (await versionOf(versionId)).state;
const numberOf = () =>
  world.within(async (tx) => (await tx.select().from(children).where(eq(children.id, childId)))[0]!.number);

const BY_SYRINGE = {
  bag: { productId: '' },
  pump: { device: '', channel: '', rate: '', volume: '164', minutes: '10' },
};
type StartChange = {
  person?: PersonKey;
  bolus?: boolean;
  replaces?: string | null;
  witness?: object | null;
  key?: string;
};
async function start(
  versionId: string,
  { person = 'nurse', bolus = false, replaces = null, witness = null, key }: StartChange = {},
) {
  const number = await numberOf();
  const change = bolus ? { ...BY_SYRINGE, bag: { productId: world.products[SALINE]! } } : {};
  return by(
    person,
    ROUTES.recordStart,
    versionId,
    { entries: bedsideEntries(world, number, change), witness, replacesVersionId: replaces },
    { key },
  );
}

async function given(volumeMl = '164', person: PersonKey = 'otherDoctor'): Promise<string> {
  const answer = await world.as(person).call(ROUTES.recordGiven, {
    params: { id: childId },
    body: {
      kind: 'bolus',
      weightId: null,
      productId: world.products[SALINE],
      volumeMl,
      overMinutes: '10',
      route: 'syringe',
      givenAt: '2026-06-10T11:50',
      onWordOfId: world.people.senior.id,
      readBack: true,
      reason: 'Shock on arrival',
      password: PASSWORD,
    },
  });
  expect(answer.body, answer.text).toMatchObject({ versionId: expect.any(String) });
  return (answer.body as { versionId: string }).versionId;
}

describe('what was given in an emergency', () => {
  it('never becomes an order that can be started again', async () => {
    const versionId = await given();
    const wrong = bolusCheckForm({ weightSource: '', workedOutBy: '', weightKg: '12', volumeMl: '120' });
    const differed = await by('checker', ROUTES.countersignGiven, versionId, {
      agree: false,
      form: wrong,
      reason: 'Weighs 12 kg',
      password: PASSWORD,
    });
    expect(differed.body).toMatchObject({ state: 'disputed' });
    await by('checker', ROUTES.slip, versionId, { reason: 'Read the wrong line' });
    expect(await stateOf(versionId)).not.toBe('awaiting-check');
    const form = bolusCheckForm({ weightSource: '', workedOutBy: '' });
    await lockIn(world, 'otherChecker', versionId, form);
    await signCheck(world, 'otherChecker', versionId);
    expect(await stateOf(versionId)).not.toBe('signed');
    await start(versionId, { bolus: true });
    expect(await stateOf(versionId)).not.toBe('running');
  });

  it('is countersigned by another person after a slip', async () => {
    const versionId = await given();
    const wrong = bolusCheckForm({ weightSource: '', workedOutBy: '', weightKg: '12', volumeMl: '120' });
    const body = { agree: false, form: wrong, reason: 'Weighs 12 kg', password: PASSWORD };
    await by('checker', ROUTES.countersignGiven, versionId, body);
    const slipped = await by('checker', ROUTES.slip, versionId, { reason: 'Read the wrong line' });
    expect(slipped.status).toBe(200);
    expect(await stateOf(versionId)).toBe('given');
    const agreed = {
      agree: true,
      form: bolusCheckForm({ weightSource: '', workedOutBy: '' }),
      reason: '',
      password: PASSWORD,
    };
    const again = await by('checker', ROUTES.countersignGiven, versionId, agreed);
    expect(again.status).toBeGreaterThanOrEqual(400);
    const other = await by('otherChecker', ROUTES.countersignGiven, versionId, agreed);
    expect(other.body).toMatchObject({ state: 'countersigned' });
  });

  it('is neither withdrawn, revised nor signed as an order', async () => {
    const versionId = await given();
    const reason = 'trying it out';
    for (const route of [ROUTES.withdraw, ROUTES.revise, ROUTES.cannotVerify, ROUTES.passOn, ROUTES.stop]) {
      const body = { reason, what: 'weight', toId: null, seenFigures: false, volumeInfusedMl: null };
      for (const person of ['otherDoctor', 'lead', 'checker', 'senior'] as const) {
        await by(person, route, versionId, body);
      }
    }
    expect(await stateOf(versionId)).toBe('given');
  });
});

describe('the sum of boluses', () => {
  const limitsOf = async (versionId: string) => {
    const read = await by('doctor', ROUTES.draft, versionId);
    return (read.body as { context: { bolusesLast24h: { ml: string }[] } }).context.bolusesLast24h;
  };

  it('counts a bolus that the new order follows', async () => {
    const first = await makeSignedOrder(world, childId, { kind: 'bolus' });
    expect((await start(first.versionId, { bolus: true })).status).toBe(200);
    const next = await world.as('doctor').call(ROUTES.startDraft, {
      params: { id: childId },
      body: { kind: 'bolus', followsOrderId: first.orderId },
    });
    const { versionId } = next.body as { versionId: string };
    expect(await limitsOf(versionId)).toMatchObject([{ ml: '164.0' }]);
  });

  it('a stranger to the ward cannot write down afterwards that less went in', async () => {
    const first = await makeSignedOrder(world, childId, { kind: 'bolus' });
    await start(first.versionId, { bolus: true });
    await by('nurse', ROUTES.stop, first.versionId, { reason: '', volumeInfusedMl: null });
    const body = { reason: 'from far away', volumeInfusedMl: '0' };
    const answer = await by('elsewhere', ROUTES.stopReason, first.versionId, body);
    expect(problem(answer)).toBe('/problems/on-ward');
    const [row] = await world.within((tx) =>
      tx.select().from(infusions).where(eq(infusions.versionId, first.versionId)),
    );
    expect(row).toMatchObject({ infusedMl: null });
    expect((await by('nurse', ROUTES.stopReason, first.versionId, body)).status).toBe(200);
  });

  it('whoever stopped it may say why, from whatever ward', async () => {
    const first = await makeSignedOrder(world, childId, { kind: 'bolus' });
    await start(first.versionId, { bolus: true });
    const stopped = await by('elsewhere', ROUTES.stop, first.versionId, {
      reason: '',
      volumeInfusedMl: null,
    });
    expect(stopped.status).toBe(200);
    const body = { reason: 'saw it run dry', volumeInfusedMl: '100' };
    expect((await by('elsewhere', ROUTES.stopReason, first.versionId, body)).status).toBe(200);
  });
});

/** A checked order that takes over from another. */
async function followed(old: MadeOrder): Promise<MadeOrder> {
  const answer = await world.as('doctor').call(ROUTES.startDraft, {
    params: { id: childId },
    body: { kind: 'maintenance', followsOrderId: old.orderId },
  });
  const made = { ...(answer.body as MadeOrder), childId };
  const rev = await fillDraft(world, childId, made.versionId);
  const seen = { rateMlPerH: '44.0', volumeMl: '1056.0' };
  await signDraft(world, { versionId: made.versionId, rev }, { seen });
  expect((await lockIn(world, 'checker', made.versionId)).status).toBe(200);
  expect((await signCheck(world, 'checker', made.versionId)).body).toEqual({ state: 'signed' });
  return made;
}

describe('the start', () => {
  it('that replaces a held order is refused in words, not a fault of ours', async () => {
    const old = await makeSignedOrder(world, childId);
    expect((await start(old.versionId)).status).toBe(200);
    expect((await by('nurse', ROUTES.hold, old.versionId, { reason: 'to theatre' })).status).toBe(200);
    const newer = await followed(old);
    const answer = await start(newer.versionId, { replaces: old.versionId });
    expect(problem(answer)).toBe('/problems/something-runs');
    expect(await stateOf(newer.versionId)).toBe('signed');
  });

  it('of a discharged child’s order is refused, to a lead as well', async () => {
    const order = await makeSignedOrder(world, childId);
    expect((await by('nurse', ROUTES.dischargeChild, childId)).status).toBe(200);
    for (const person of ['nurse', 'lead'] as const) {
      expect((await start(order.versionId, { person })).status).toBeGreaterThanOrEqual(400);
    }
    expect(await stateOf(order.versionId)).toBe('signed');
  });

  it('by two nurses at once happens once, and is told to the other', async () => {
    const order = await makeSignedOrder(world, childId);
    const answers = await Promise.all([
      start(order.versionId),
      start(order.versionId, { person: 'otherNurse' }),
      start(order.versionId, { person: 'lead' }),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
    const rows = await world.within((tx) =>
      tx.select().from(infusions).where(eq(infusions.versionId, order.versionId)),
    );
    expect(rows).toHaveLength(1);
  });

  it('against a withdrawal at the same time ends in one of the two, never both', async () => {
    const order = await makeSignedOrder(world, childId);
    const [started, withdrawn] = await Promise.all([
      start(order.versionId),
      by('doctor', ROUTES.withdraw, order.versionId, { reason: 'not needed any more' }),
    ]);
    const state = await stateOf(order.versionId);
    expect([started.status, withdrawn.status].sort()).toEqual([200, 409]);
    expect(state).toBe(started.status === 200 ? 'running' : 'withdrawn');
  });

  it('holds to its last minute, to the millisecond', async () => {
    const order = await makeSignedOrder(world, childId);
    const startBy = (await versionOf(order.versionId)).startBy!;
    world.clock.set(startBy + 1);
    expect(problem(await start(order.versionId))).toBe('/problems/not-lapsed');
    world.clock.set(startBy);
    expect((await start(order.versionId)).status).toBe(200);
  });

  it('is witnessed by neither the starter, a stranger, nor another hospital', async () => {
    const other = await makeWorld(sharedDatabase());
    const order = await makeSignedOrder(world, childId);
    const tries = {
      starter: world.people.nurse.email,
      unregistered: world.people.unregistered.email,
      admin: world.people.admin.email,
      elsewhere: world.people.elsewhere.email,
      'another hospital': other.people.otherNurse.email,
    };
    for (const [who, email] of Object.entries(tries)) {
      const answer = await start(order.versionId, { witness: { email, password: PASSWORD } });
      expect([who, problem(answer)]).toEqual([who, '/problems/witness-needed']);
    }
    expect(await stateOf(order.versionId)).toBe('signed');
  });
});
