import { ROUTES } from '@shared/routes';
import type { RouteDefinition } from '@shared/routes/define';
import { HOUR, MINUTE } from '@shared/time';
import { eq } from 'drizzle-orm';
import type { Response } from 'supertest';
import { beforeEach, describe, expect, it } from 'vitest';
import { memberships } from '../../../server/db/schema/accounts';
import { checks } from '../../../server/db/schema/checks';
import { ledger } from '../../../server/db/schema/ledger';
import { orderVersions } from '../../../server/db/schema/orders';
import { signatures } from '../../../server/db/schema/signatures';
import { sharedDatabase } from '../support/database';
import {
  bedsideEntries,
  checkForm,
  fillDraft,
  lockIn,
  makeOrder,
  makeSignedOrder,
  signCheck,
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

describe('signing', () => {
  it('by two checkers at once signs once', async () => {
    const order = await makeOrder(world, childId);
    const locked = await Promise.all([
      lockIn(world, 'checker', order.versionId, checkForm()),
      lockIn(world, 'otherChecker', order.versionId, checkForm()),
    ]);
    expect(locked.map(({ status }) => status).sort()).toEqual([200, 409]);
    const signed = await Promise.all(
      (['checker', 'otherChecker'] as const).map((who) => signCheck(world, who, order.versionId)),
    );
    expect(signed.filter(({ status }) => status === 200)).toHaveLength(1);
    const rows = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.versionId, order.versionId)),
    );
    expect(rows.map(({ meaning }) => meaning).sort()).toEqual(['author', 'independent-check']);
  });

  it('twice by a double click, and again by another key, signs once; the ledger has each', async () => {
    const order = await makeOrder(world, childId);
    await lockIn(world, 'checker', order.versionId, checkForm());
    const { contentSha256 } = await versionOf(order.versionId);
    const body = { contentSha256, acceptReason: null, password: PASSWORD };
    const key = 'one-click-of-the-mouse';
    const answers = await Promise.all(
      [key, key, 'another-key-of-mine'].map((each) =>
        by('checker', ROUTES.signCheck, order.versionId, body, { key: each }),
      ),
    );
    expect(answers.map(({ status }) => status)).toContain(200);
    const rows = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.versionId, order.versionId)),
    );
    expect(rows.filter(({ meaning }) => meaning === 'independent-check')).toHaveLength(1);
    const again = await by(
      'checker',
      ROUTES.signCheck,
      order.versionId,
      { ...body, acceptReason: 'other' },
      { key },
    );
    expect(problem(again)).toBe('/problems/key-reused');
    // another person’s key of the same name is another key, and gives nothing of the first answer
    const stranger = await by('otherChecker', ROUTES.signCheck, order.versionId, body, { key });
    expect(problem(stranger)).toBe('/problems/order-state');
    const acts = await world.within((tx) =>
      tx.select().from(ledger).where(eq(ledger.subjectId, order.versionId)),
    );
    expect(acts.filter(({ act }) => act === 'check-signed').length).toBeGreaterThanOrEqual(3);
  });

  it('an old version’s figures signs nothing, nor does the hash of another order', async () => {
    const order = await makeOrder(world, childId);
    const other = await makeOrder(world, await world.addChild());
    await lockIn(world, 'checker', order.versionId, checkForm());
    const { contentSha256 } = await versionOf(other.versionId);
    const body = { contentSha256, acceptReason: null, password: PASSWORD };
    expect(problem(await by('checker', ROUTES.signCheck, order.versionId, body))).toBe('/problems/stale');
    await by('doctor', ROUTES.withdraw, order.versionId, { reason: 'not needed any more' });
    const right = { ...body, contentSha256: (await versionOf(order.versionId)).contentSha256 };
    expect(problem(await by('checker', ROUTES.signCheck, order.versionId, right))).toBe(
      '/problems/order-state',
    );
    expect(await stateOf(order.versionId)).toBe('withdrawn');
  });

  it('of agreed figures ends with their reservation, and another checker takes the check', async () => {
    const order = await makeOrder(world, childId);
    await lockIn(world, 'checker', order.versionId, checkForm());
    expect(problem(await lockIn(world, 'otherChecker', order.versionId, checkForm()))).toBe(
      '/problems/nobody-else-holds-check',
    );
    world.clock.advance(15 * MINUTE + 1);
    expect(problem(await signCheck(world, 'checker', order.versionId))).toBe('/problems/locked-in-agreed');
    expect((await lockIn(world, 'otherChecker', order.versionId, checkForm())).status).toBe(200);
    expect((await signCheck(world, 'checker', order.versionId)).status).toBeGreaterThanOrEqual(400);
    expect((await signCheck(world, 'otherChecker', order.versionId)).body).toEqual({ state: 'signed' });
  });

  it('with a wrong password signs nothing and is in the ledger', async () => {
    const order = await makeOrder(world, childId);
    await lockIn(world, 'checker', order.versionId, checkForm());
    const { contentSha256 } = await versionOf(order.versionId);
    const body = { contentSha256, acceptReason: null, password: 'not mine' };
    expect(problem(await by('checker', ROUTES.signCheck, order.versionId, body))).toBe(
      '/problems/password-wrong',
    );
    const rows = await world.within((tx) =>
      tx.select().from(ledger).where(eq(ledger.act, 'password-refused')),
    );
    expect(rows).toHaveLength(1);
  });

  it('lock-in is final: other figures, a slip or a pass change nothing of it', async () => {
    const order = await makeOrder(world, childId);
    await lockIn(world, 'checker', order.versionId, checkForm({ rate: '41', volumeMl: '984' }));
    const before = await world.within((tx) =>
      tx.select().from(checks).where(eq(checks.versionId, order.versionId)),
    );
    for (const answer of [
      await lockIn(world, 'checker', order.versionId, checkForm()),
      await by('checker', ROUTES.saveCheck, order.versionId, { rev: 0, form: checkForm() }),
      await by('checker', ROUTES.passOn, order.versionId, {
        toId: null,
        seenFigures: false,
        reason: 'no time',
      }),
    ]) {
      expect(answer.status).toBe(409);
    }
    expect((await by('checker', ROUTES.slip, order.versionId, { reason: 'misread the chart' })).status).toBe(
      200,
    );
    expect((await lockIn(world, 'checker', order.versionId, checkForm())).status).toBeGreaterThanOrEqual(400);
    const [after] = await world.within((tx) =>
      tx.select().from(checks).where(eq(checks.versionId, order.versionId)),
    );
    expect(after).toMatchObject({
      figuresSha256: before[0]!.figuresSha256,
      comparison: before[0]!.comparison,
    });
    // not for ever: the day has passed, and still it is another person's
    world.clock.advance(HOUR);
    expect((await lockIn(world, 'checker', order.versionId, checkForm())).status).toBeGreaterThanOrEqual(400);
  });
});

describe('a role that is not clinical', () => {
  it('reads no paper, though the account is a member of the ward', async () => {
    const order = await makeSignedOrder(world, childId);
    const print = await by('doctor', ROUTES.makePrint, order.versionId);
    const { href, code } = print.body as { href: string; code: string };
    await world.within((tx) =>
      tx
        .insert(memberships)
        .values({ accountId: world.people.admin.id, wardId: world.wards.heron, entitlements: [] }),
    );
    expect((await world.as('admin').get(href)).status).toBe(404);
    const paper = await world.as('admin').call(ROUTES.paper, { params: { code } });
    expect(paper.body).toMatchObject({ known: true, order: null });
    expect((await world.as('nurse').get(href)).status).toBe(200);
  });

  it('nor anyone once the child has gone to another ward than theirs', async () => {
    const order = await makeSignedOrder(world, childId);
    const { href } = (await by('doctor', ROUTES.makePrint, order.versionId)).body as { href: string };
    expect((await world.as('elsewhere').get(href)).status).toBe(404);
    const other = await makeWorld(sharedDatabase());
    expect((await other.as('doctor').get(href)).status).toBe(404);
  });
});

describe('another hospital', () => {
  it('acts on nothing of this one, whatever id it names', async () => {
    const other = await makeWorld(sharedDatabase());
    const order: MadeOrder = await makeOrder(world, childId);
    const params = { id: order.versionId };
    const reason = 'from another hospital';
    const entries = bedsideEntries(other, 'SM-0001');
    const bodies: [RouteDefinition, unknown][] = [
      [ROUTES.withdraw, { reason }],
      [ROUTES.revise, {}],
      [ROUTES.lockIn, { form: checkForm() }],
      [ROUTES.saveCheck, { rev: 0, form: checkForm() }],
      [ROUTES.cannotVerify, { what: 'weight', reason }],
      [ROUTES.passOn, { toId: null, seenFigures: false, reason }],
      [ROUTES.stop, { reason, volumeInfusedMl: null }],
      [ROUTES.stopReason, { reason, volumeInfusedMl: null }],
      [ROUTES.recordStart, { entries, witness: null, replacesVersionId: null }],
      [ROUTES.makePrint, {}],
      [ROUTES.disputeMatter, {}],
      [ROUTES.exceptionMatter, {}],
      [ROUTES.order, {}],
      [ROUTES.checkPage, {}],
      [ROUTES.bedside, {}],
      [ROUTES.draft, {}],
    ];
    for (const person of ['lead', 'checker', 'pharmacist', 'doctor'] as const) {
      for (const [route, body] of bodies) {
        const answer = await other.as(person).call(route, { params, body });
        expect([person, route.path, answer.status]).toEqual([person, route.path, 404]);
      }
    }
    expect(await stateOf(order.versionId)).toBe('awaiting-check');
    // a weight and a product of another hospital are no entries of this one
    const child = await other.addChild();
    const draft = await other.as('doctor').call(ROUTES.startDraft, {
      params: { id: child },
      body: { kind: 'maintenance', followsOrderId: order.orderId },
    });
    expect(draft.status).toBe(404);
    const own = await other.as('doctor').call(ROUTES.startDraft, {
      params: { id: child },
      body: { kind: 'maintenance', followsOrderId: null },
    });
    const { versionId } = own.body as { versionId: string };
    const weightId = await world.addWeight(childId, { kg: 10 });
    const rev = await fillDraft(other, child, versionId, { form: { weightId } });
    const signed = await other.as('doctor').call(ROUTES.sign, {
      params: { id: versionId },
      body: { rev, seen: { rateMlPerH: '44.0', volumeMl: '1056.0', rulebook: 1 }, password: PASSWORD },
    });
    expect(problem(signed)).toBe('/problems/bad-input');
  });
});
