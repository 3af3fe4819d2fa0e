import { ROUTES } from '@shared/routes';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { checks, exceptions } from '../../../server/db/schema/checks';
import { ledger } from '../../../server/db/schema/ledger';
import { orderVersions } from '../../../server/db/schema/orders';
import { outbox } from '../../../server/db/schema/outbox';
import { signatures } from '../../../server/db/schema/signatures';
import { sharedDatabase } from '../support/database';
import { checkForm, lockIn, makeOrder, SALINE_GLUCOSE, signCheck } from '../support/make-order';
import { makeWorld, PASSWORD, type PersonKey, type World } from '../support/world';

let world: World;
beforeAll(async () => {
  world = await makeWorld(sharedDatabase());
});

const waiting = async () => makeOrder(world, await world.addChild());
const problem = (answer: { body: unknown }) => (answer.body as { type?: string }).type;
const versionRow = (versionId: string) =>
  world.within(
    async (tx) => (await tx.select().from(orderVersions).where(eq(orderVersions.id, versionId)))[0]!,
  );
type QueueLine = {
  versionId: string;
  barred: string | null;
  yourState: string;
  askedOfYou: boolean;
  isLate: boolean;
};
const queueOf = async (person: PersonKey, of: World = world) => {
  const answer = await of.as(person).call(ROUTES.checkQueue);
  expect(answer.status).toBe(200);
  return (answer.body as { rows: QueueLine[] }).rows;
};
const lineOf = async (person: PersonKey, versionId: string, of: World = world) =>
  (await queueOf(person, of)).find((row) => row.versionId === versionId);

describe('who may check', () => {
  it.each<[PersonKey, string]>([
    ['doctor', '/problems/second-person-required'],
    ['otherDoctor', '/problems/checking'],
    ['nurse', '/problems/checking'],
    ['elsewhere', '/problems/on-ward'],
    ['unregistered', '/problems/registered'],
    ['admin', '/problems/role-missing'],
  ])('not %s: %s', async (person, type) => {
    const { versionId } = await waiting();
    expect(problem(await lockIn(world, person, versionId))).toBe(type);
    const returned = await world.as(person).call(ROUTES.cannotVerify, {
      params: { id: versionId },
      body: { what: 'weight', reason: 'No scales' },
    });
    expect(returned.status).toBe(403);
    expect((await versionRow(versionId)).state).toBe('awaiting-check');
  });

  it.each<PersonKey>(['checker', 'otherNurse', 'pharmacist', 'senior'])('but %s', async (person) => {
    const { versionId } = await waiting();
    expect((await lockIn(world, person, versionId)).status).toBe(200);
  });

  it('never who granted an exception on it', async () => {
    const { versionId } = await waiting();
    const { contentSha256, authorId } = await versionRow(versionId);
    await world.within((tx) =>
      tx.insert(exceptions).values({
        versionId,
        authorId,
        limitCode: 'raised-adh',
        contentSha256: contentSha256!,
        state: 'granted',
        askedAt: world.clock.now(),
        by: world.people.senior.id,
        decidedAt: world.clock.now(),
        reason: 'agreed',
        how: 'here',
      }),
    );
    expect(problem(await lockIn(world, 'senior', versionId))).toBe('/problems/second-person-required');
    expect((await lineOf('senior', versionId))?.barred).toContain('another person');
    expect((await lockIn(world, 'checker', versionId)).status).toBe(200);
  });

  it('a high-risk order needs a senior checker or a pharmacist', async () => {
    const product = Object.keys(world.products).find(
      (name) => name.startsWith(`${SALINE_GLUCOSE} `) && name.includes('40'),
    );
    const { versionId } = await makeOrder(world, await world.addChild(), { product });
    const form = checkForm({ addedPotassium: '40' });
    expect(problem(await lockIn(world, 'checker', versionId, form))).toBe('/problems/senior-checking');
    expect((await lineOf('checker', versionId))?.barred).toContain('high-risk');
    expect((await lockIn(world, 'pharmacist', versionId, form)).status).toBe(200);
  });
});

describe('concurrency', () => {
  it('of two who lock in agreeing figures at once one holds the check', async () => {
    const { versionId } = await waiting();
    const answers = await Promise.all([
      lockIn(world, 'checker', versionId),
      lockIn(world, 'otherChecker', versionId),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    const rows = await world.within((tx) => tx.select().from(checks).where(eq(checks.versionId, versionId)));
    expect(rows.filter((row) => row.figures !== null)).toHaveLength(1);
  });

  it('of two sign-offs at once one wins, and the ledger holds it once', async () => {
    const { versionId } = await waiting();
    const locked = await lockIn(world, 'checker', versionId);
    const { contentSha256 } = (locked.body as { uncovered: { contentSha256: string } }).uncovered;
    const client = world.as('checker');
    const sign = (key?: string) =>
      client.call(ROUTES.signCheck, {
        params: { id: versionId },
        body: { contentSha256, acceptReason: null, password: PASSWORD },
        ...(key ? { key } : {}),
      });
    const answers = await Promise.all([sign(), sign(), sign('same-key-0001'), sign('same-key-0001')]);
    expect(answers.filter(({ status }) => status === 200).length).toBeGreaterThanOrEqual(1);
    const signed = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.versionId, versionId)),
    );
    expect(signed.filter(({ meaning }) => meaning === 'independent-check')).toHaveLength(1);
    const rows = await world.within((tx) => tx.select().from(ledger).where(eq(ledger.subjectId, versionId)));
    expect(rows.filter(({ act, outcome }) => act === 'check-signed' && outcome === 'done')).toHaveLength(1);
    const mails = await world.within((tx) => tx.select().from(outbox).where(eq(outbox.kind, 'order-signed')));
    expect(mails.filter(({ ref }) => ref.versionId === versionId)).toHaveLength(1);
  });
});

describe('handing a check on', () => {
  const passOn = (
    person: PersonKey,
    versionId: string,
    body: { toId: string | null; seenFigures: boolean },
    of = world,
  ) =>
    of.as(person).call(ROUTES.passOn, { params: { id: versionId }, body: { ...body, reason: 'off shift' } });

  it('to a named checker, who is mailed; to nobody unfit', async () => {
    const { versionId } = await waiting();
    const unfit = await passOn('checker', versionId, { toId: world.people.nurse.id, seenFigures: false });
    expect(problem(unfit)).toBe('/problems/checker-unfit');
    const author = await passOn('checker', versionId, { toId: world.people.doctor.id, seenFigures: false });
    expect(problem(author)).toBe('/problems/checker-unfit');
    const passed = await passOn('checker', versionId, {
      toId: world.people.otherChecker.id,
      seenFigures: false,
    });
    expect(passed.body).toEqual({ ok: true });
    expect((await versionRow(versionId)).askedChecker).toBe(world.people.otherChecker.id);
    expect(await lineOf('otherChecker', versionId)).toMatchObject({ askedOfYou: true, barred: null });
  });

  it('who has seen the figures waits ten minutes, and only when there is nobody else', async () => {
    const own = await makeWorld(sharedDatabase());
    const order = await makeOrder(own, await own.addChild());
    await passOn('checker', order.versionId, { toId: null, seenFigures: true }, own);
    own.clock.advance(11 * 60_000);
    expect(problem(await lockIn(own, 'checker', order.versionId))).toBe('/problems/unseen-or-waited');
    expect((await lineOf('checker', order.versionId, own))?.barred).toContain('seen the other figures');
    // everybody else has seen them too
    for (const other of ['otherChecker', 'otherNurse', 'senior', 'pharmacist'] as const) {
      await passOn(other, order.versionId, { toId: null, seenFigures: true }, own);
    }
    own.clock.advance(9 * 60_000);
    expect(problem(await lockIn(own, 'senior', order.versionId))).toBe('/problems/unseen-or-waited');
    own.clock.advance(60_000);
    expect((await lineOf('senior', order.versionId, own))?.barred).toBeNull();
    expect((await lockIn(own, 'senior', order.versionId)).status).toBe(200);
    const [row] = await own.within((tx) =>
      tx.select().from(checks).where(eq(checks.checkerId, own.people.senior.id)),
    );
    expect(row).toMatchObject({ state: 'locked-agreed', hadSeenFigures: true });
  });
});

describe('the queue', () => {
  it('shows what waits on the reader’s wards, covered, and not their own orders', async () => {
    const own = await makeWorld(sharedDatabase());
    const heron = await makeOrder(own, await own.addChild());
    const curlew = await makeOrder(own, await own.addChild({ ward: 'curlew' }));
    expect((await queueOf('checker', own)).map((row) => row.versionId).sort()).toEqual(
      [heron.versionId, curlew.versionId].sort(),
    );
    expect((await queueOf('elsewhere', own)).map((row) => row.versionId)).toEqual([curlew.versionId]);
    expect(await queueOf('doctor', own)).toEqual([]);
    expect(await lineOf('checker', heron.versionId, own)).toMatchObject({
      barred: null,
      yourState: 'none',
      isLate: false,
    });
    expect((await lineOf('nurse', heron.versionId, own))?.barred).toContain('not entitled');
    own.clock.advance(61 * 60_000);
    expect(await lineOf('checker', heron.versionId, own)).toMatchObject({ isLate: true });
    await lockIn(own, 'checker', heron.versionId);
    expect(await lineOf('checker', heron.versionId, own)).toMatchObject({
      yourState: 'agreed',
      barred: null,
    });
    expect((await lineOf('otherChecker', heron.versionId, own))?.barred).toContain('Someone else');
    await signCheck(own, 'checker', heron.versionId);
    expect(await lineOf('checker', heron.versionId, own)).toBeUndefined();
  });

  it('puts an emergency first', async () => {
    const own = await makeWorld(sharedDatabase());
    await makeOrder(own, await own.addChild());
    const urgent = await makeOrder(own, await own.addChild(), {
      kind: 'bolus',
      form: { urgency: 'emergency' },
    });
    expect((await queueOf('checker', own))[0]?.versionId).toBe(urgent.versionId);
  });
});

describe('what a page of the check is refused to', () => {
  it('a stranger to the ward, the author, and for a draft', async () => {
    const { versionId } = await waiting();
    const read = (person: PersonKey) =>
      world.as(person).call(ROUTES.checkPage, { params: { id: versionId } });
    expect((await read('doctor')).status).toBe(403);
    const stranger = await read('elsewhere');
    expect([403, 404]).toContain(stranger.status);
    expect((await read('checker')).status).toBe(200);
  });
});
