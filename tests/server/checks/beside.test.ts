import { ROUTES } from '@shared/routes';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { checks, seenFigures } from '../../../server/db/schema/checks';
import { orderVersions } from '../../../server/db/schema/orders';
import { clientWith, type Client } from '../support/client';
import { sharedDatabase } from '../support/database';
import { bolusCheckForm, lockIn, makeOrder, type MadeOrder } from '../support/make-order';
import { makeWorld, PASSWORD, type PersonKey, type World } from '../support/world';

let world: World;
let author: Client;
let order: MadeOrder;
beforeEach(async () => {
  world = await makeWorld(sharedDatabase());
  order = await makeOrder(world, await world.addChild(), { kind: 'bolus', form: { urgency: 'emergency' } });
  author = world.as('doctor');
});

const problem = (answer: { body: unknown }) => (answer.body as { type?: string }).type;
const open = (person: PersonKey, password = PASSWORD, on = author) =>
  on.call(ROUTES.openBeside, {
    params: { id: order.versionId },
    body: { email: world.people[person].email, password },
  });

/** The author's browser with the visit's cookie beside its own, as the cookie's path would send it. */
function beside(opened: { headers: Record<string, unknown> }): Client {
  const cookies = (opened.headers['set-cookie'] as string[]).map((cookie) => cookie.split(';')[0]);
  return clientWith(world.deps, world.server, async () => [await author.cookie(), ...cookies].join('; '));
}

describe('check beside me', () => {
  it('is blind, suspends the author, and signs as the checker for this one order', async () => {
    const opened = await open('checker');
    expect(opened.body).toMatchObject({ checkerName: 'Piers Okonjo' });
    expect(opened.headers['set-cookie']?.[0]).toMatch(/Path=\/api\/beside;.*HttpOnly; SameSite=Strict/);
    const visit = beside(opened);
    const suspended = await author.call(ROUTES.order, { params: { id: order.versionId } });
    expect(problem(suspended)).toBe('/problems/session-locked');
    const page = await visit.call(ROUTES.besidePage);
    expect(page.body).toMatchObject({ isShortForm: true, uncovered: null, state: 'awaiting-check' });
    expect(page.text).not.toContain('Imogen Vale');
    const form = bolusCheckForm({ weightSource: '', workedOutBy: '' });
    expect((await visit.call(ROUTES.besideSave, { body: { rev: 0, form } })).body).toMatchObject({ rev: 1 });
    const locked = await visit.call(ROUTES.besideLockIn, { body: { form } });
    expect(locked.body).toMatchObject({ uncovered: { comparison: { outcome: 'agreed' } } });
    const { contentSha256 } = (locked.body as { uncovered: { contentSha256: string } }).uncovered;
    const sign = (password: string) =>
      visit.call(ROUTES.besideSign, { body: { contentSha256, acceptReason: null, password } });
    expect(problem(await sign('the author’s own'))).toBe('/problems/password-wrong');
    expect((await sign(PASSWORD)).body).toEqual({ state: 'signed' });
    const [row] = await world.within((tx) =>
      tx.select().from(checks).where(eq(checks.versionId, order.versionId)),
    );
    expect(row).toMatchObject({ checkerId: world.people.checker.id, isBeside: true, state: 'agreed' });
    expect((await visit.call(ROUTES.closeBeside)).body).toEqual({ ok: true });
    expect((await author.call(ROUTES.order, { params: { id: order.versionId } })).status).toBe(200);
    expect(problem(await visit.call(ROUTES.besidePage))).toBe('/problems/signed-out');
    const seen = await world.within((tx) =>
      tx.select().from(seenFigures).where(eq(seenFigures.how, 'beside-cancelled')),
    );
    expect(seen).toEqual([]);
  });

  it('cancelled without lock-in counts as having seen the figures', async () => {
    const visit = beside(await open('checker'));
    await visit.call(ROUTES.closeBeside);
    const answer = await lockIn(world, 'checker', order.versionId, bolusCheckForm());
    expect(problem(answer)).toBe('/problems/unseen-or-waited');
    expect((await author.call(ROUTES.me)).body).toMatchObject({ session: { locked: false } });
  });

  it('opens for nobody who could not check, with a wrong password, or from another’s screen', async () => {
    expect(problem(await open('nurse'))).toBe('/problems/checking');
    expect(problem(await open('checker', 'wrong'))).toBe('/problems/sign-in-refused');
    expect(problem(await open('doctor'))).toBe('/problems/second-person-required');
    expect(problem(await open('checker', PASSWORD, world.as('otherDoctor')))).toBe('/problems/own-check');
    const other = await makeWorld(sharedDatabase());
    const stranger = await author.call(ROUTES.openBeside, {
      params: { id: order.versionId },
      body: { email: other.people.checker.email, password: PASSWORD },
    });
    expect(problem(stranger)).toBe('/problems/checker-unfit');
    // nothing of it suspended the author
    expect((await author.call(ROUTES.order, { params: { id: order.versionId } })).status).toBe(200);
  });

  it('lasts ten minutes and leaves the author’s screen locked', async () => {
    const visit = beside(await open('checker'));
    world.clock.advance(10 * 60_000 + 1);
    expect(problem(await visit.call(ROUTES.besidePage))).toBe('/problems/signed-out');
    expect(problem(await author.call(ROUTES.order, { params: { id: order.versionId } }))).toBe(
      '/problems/session-locked',
    );
  });
});

describe('countersigning what was given in an emergency', () => {
  const given = async (child: string) => {
    const answer = await world.as('otherDoctor').call(ROUTES.recordGiven, {
      params: { id: child },
      body: {
        kind: 'bolus',
        weightId: null,
        productId: world.products['Sodium chloride 0.9%'],
        volumeMl: '164',
        overMinutes: '10',
        route: 'syringe',
        givenAt: '2026-06-10T11:50',
        onWordOfId: world.people.senior.id,
        readBack: true,
        reason: 'Shock on arrival',
        password: PASSWORD,
      },
    });
    expect(answer.body).toMatchObject({ versionId: expect.any(String) });
    return (answer.body as { versionId: string }).versionId;
  };
  const countersign = (person: PersonKey, versionId: string, body: object) =>
    world.as(person).call(ROUTES.countersignGiven, {
      params: { id: versionId },
      body: {
        agree: true,
        form: bolusCheckForm({ weightSource: '', workedOutBy: '' }),
        reason: '',
        password: PASSWORD,
        ...body,
      },
    });
  const stateOf = (versionId: string) =>
    world.within(
      async (tx) => (await tx.select().from(orderVersions).where(eq(orderVersions.id, versionId)))[0]!.state,
    );

  it('by another’s own figures; never by the giver', async () => {
    const versionId = await given(await world.addChild());
    const queue = await world.as('checker').call(ROUTES.checkQueue);
    const rows = (queue.body as { rows: { versionId: string; act: string; barred: string | null }[] }).rows;
    expect(rows.find((row) => row.versionId === versionId)).toMatchObject({
      act: 'countersign',
      barred: null,
    });
    expect(problem(await countersign('otherDoctor', versionId, {}))).toBe('/problems/second-person-required');
    const page = await world.as('checker').call(ROUTES.checkPage, { params: { id: versionId } });
    expect(page.body).toMatchObject({ state: 'given', uncovered: null });
    const done = await countersign('checker', versionId, {});
    expect(done.body).toMatchObject({ state: 'countersigned', comparison: { outcome: 'agreed' } });
  });

  it('or disputes it, with a reason; figures that differ are not countersigned', async () => {
    const versionId = await given(await world.addChild());
    const form = bolusCheckForm({ weightSource: '', workedOutBy: '', weightKg: '12', volumeMl: '120' });
    const agreed = await countersign('checker', versionId, { form });
    expect(problem(agreed)).toBe('/problems/conflict');
    expect(problem(await countersign('checker', versionId, { form, agree: false }))).toBe(
      '/problems/reason-owed',
    );
    const differed = await countersign('checker', versionId, { form, agree: false, reason: 'Weighs 12 kg' });
    expect(differed.body).toMatchObject({ state: 'disputed', comparison: { outcome: 'facts-differ' } });
    expect(await stateOf(versionId)).toBe('disputed');
  });

  it('and the dispute ends with its settlement: what was given cannot be written again', async () => {
    const versionId = await given(await world.addChild());
    const form = bolusCheckForm({ weightSource: '', workedOutBy: '', weightKg: '12', volumeMl: '120' });
    await countersign('checker', versionId, { form, agree: false, reason: 'Weighs 12 kg' });
    const settled = await world.as('senior').call(ROUTES.settle, {
      params: { id: versionId },
      body: { reason: 'Weighed again: 16.4 kg', password: PASSWORD },
    });
    expect(settled.body).toEqual({ ok: true });
    expect(await stateOf(versionId)).toBe('countersigned');
  });
});
