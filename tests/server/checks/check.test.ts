import { ROUTES } from '@shared/routes';
import { eq } from 'drizzle-orm';
import { describe, expect, it, beforeAll } from 'vitest';
import { checks } from '../../../server/db/schema/checks';
import { ledger } from '../../../server/db/schema/ledger';
import { nearMisses } from '../../../server/db/schema/near-misses';
import { orderVersions } from '../../../server/db/schema/orders';
import { outbox } from '../../../server/db/schema/outbox';
import { signatures } from '../../../server/db/schema/signatures';
import { sharedDatabase } from '../support/database';
import { checkForm, lockIn, makeOrder, signCheck } from '../support/make-order';
import { makeWorld, PASSWORD, type PersonKey, type World } from '../support/world';

let world: World;
beforeAll(async () => {
  world = await makeWorld(sharedDatabase());
});

const waiting = async () => makeOrder(world, await world.addChild());
const stateOf = (versionId: string) =>
  world.within(
    async (tx) => (await tx.select().from(orderVersions).where(eq(orderVersions.id, versionId)))[0]!.state,
  );
const missesOf = (versionId: string) =>
  world.within((tx) => tx.select().from(nearMisses).where(eq(nearMisses.versionId, versionId)));
const actsOf = async (versionId: string) => {
  const rows = await world.within((tx) => tx.select().from(ledger).where(eq(ledger.subjectId, versionId)));
  return rows.sort((a, b) => a.seq - b.seq).map(({ act, outcome }) => `${act}:${outcome}`);
};
const mailsTo = (person: PersonKey, versionId: string) =>
  world.within(async (tx) => {
    const rows = await tx.select().from(outbox).where(eq(outbox.toAccount, world.people[person].id));
    return rows.filter(({ ref }) => ref.versionId === versionId).map(({ kind }) => kind);
  });

describe('agree and sign', () => {
  it('uncovers only after lock-in, and signs over exactly these bytes', async () => {
    const { versionId } = await waiting();
    const client = world.as('checker');
    const covered = await client.call(ROUTES.checkPage, { params: { id: versionId } });
    expect(covered.body).toMatchObject({ state: 'awaiting-check', uncovered: null, hasSeenFigures: false });
    const locked = await lockIn(world, 'checker', versionId);
    expect(locked.status).toBe(200);
    expect(locked.body).toMatchObject({
      uncovered: {
        comparison: { outcome: 'agreed', effect: '' },
        author: { name: 'Imogen Vale' },
        content: { figures: { rateMlPerH: '44.0' } },
      },
    });
    const signed = await signCheck(world, 'checker', versionId);
    expect(signed.body).toEqual({ state: 'signed' });
    const rows = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.versionId, versionId)),
    );
    const sha = (locked.body as { uncovered: { contentSha256: string } }).uncovered.contentSha256;
    expect(
      rows.map(({ meaning, contentSha256, printedName }) => [meaning, contentSha256, printedName]),
    ).toEqual(
      expect.arrayContaining([
        ['author', sha, 'Imogen Vale'],
        ['independent-check', sha, 'Piers Okonjo'],
      ]),
    );
    expect(await mailsTo('doctor', versionId)).toEqual(['order-signed']);
    expect(await actsOf(versionId)).toEqual(
      expect.arrayContaining(['check-locked-in:done', 'check-signed:done']),
    );
  });

  it('asks for the password, the right bytes, and agreeing figures first', async () => {
    const { versionId } = await waiting();
    const client = world.as('checker');
    const send = (body: object) => client.call(ROUTES.signCheck, { params: { id: versionId }, body });
    const before = await send({ contentSha256: 'x', acceptReason: null, password: PASSWORD });
    expect(before.body).toMatchObject({ type: '/problems/locked-in-agreed' });
    await lockIn(world, 'checker', versionId);
    const wrong = await send({ contentSha256: 'x', acceptReason: null, password: 'not this' });
    expect(wrong.body).toMatchObject({ type: '/problems/password-wrong' });
    const stale = await send({ contentSha256: '0'.repeat(64), acceptReason: null, password: PASSWORD });
    expect(stale.body).toMatchObject({ type: '/problems/stale' });
    expect(await stateOf(versionId)).toBe('awaiting-check');
  });

  it('keeps agreed figures for 15 minutes, then another may check', async () => {
    const own = await makeWorld(sharedDatabase());
    const order = await makeOrder(own, await own.addChild());
    await lockIn(own, 'checker', order.versionId);
    const held = await lockIn(own, 'otherChecker', order.versionId);
    expect(held.body).toMatchObject({ type: '/problems/nobody-else-holds-check' });
    own.clock.advance(15 * 60_000 + 1000);
    const late = await signCheck(own, 'checker', order.versionId);
    expect(late.body).toMatchObject({ type: '/problems/locked-in-agreed' });
    const other = await lockIn(own, 'otherChecker', order.versionId);
    expect(other.status).toBe(200);
    expect((await signCheck(own, 'otherChecker', order.versionId)).body).toEqual({ state: 'signed' });
  });
});

describe('facts differ', () => {
  it('disputes, tells the author, keeps both sets for ever', async () => {
    const { versionId } = await waiting();
    const locked = await lockIn(
      world,
      'checker',
      versionId,
      checkForm({ weightKg: '14', rate: '40', volumeMl: '960' }),
    );
    expect(locked.body).toMatchObject({
      state: 'disputed',
      uncovered: { comparison: { outcome: 'facts-differ' } },
    });
    expect(await stateOf(versionId)).toBe('disputed');
    expect(await mailsTo('doctor', versionId)).toEqual(['order-disputed']);
    expect(await missesOf(versionId)).toMatchObject([{ class: 'check-differed', limitCode: 'weightKg' }]);
    const again = await lockIn(world, 'checker', versionId);
    expect(again.body).toMatchObject({ type: '/problems/order-state' });
    const kept = world.within((tx) =>
      tx.update(checks).set({ figures: '{}' }).where(eq(checks.versionId, versionId)),
    );
    await expect(kept).rejects.toThrow();
  });

  it('a slip passes the check to another person, once for each version', async () => {
    const { versionId } = await waiting();
    const wrong = checkForm({ weightKg: '14', rate: '40', volumeMl: '960' });
    await lockIn(world, 'checker', versionId, wrong);
    const foreign = await world
      .as('otherChecker')
      .call(ROUTES.slip, { params: { id: versionId }, body: { reason: 'not mine' } });
    expect(foreign.body).toMatchObject({ type: '/problems/own-check' });
    const slipped = await world
      .as('checker')
      .call(ROUTES.slip, { params: { id: versionId }, body: { reason: 'typed 14 for 16.4' } });
    expect(slipped.body).toEqual({ ok: true });
    expect(await stateOf(versionId)).toBe('awaiting-check');
    expect((await lockIn(world, 'checker', versionId)).body).toMatchObject({
      type: '/problems/not-locked-in',
    });
    await lockIn(world, 'otherChecker', versionId, wrong);
    const second = await world
      .as('otherChecker')
      .call(ROUTES.slip, { params: { id: versionId }, body: { reason: 'me too' } });
    expect(second.body).toMatchObject({ type: '/problems/not-slipped-before' });
  });

  it('settle → revise → checked by another', async () => {
    const { versionId, childId } = await waiting();
    await lockIn(world, 'checker', versionId, checkForm({ weightKg: '14', rate: '40', volumeMl: '960' }));
    const opened = await world.as('senior').call(ROUTES.disputeMatter, { params: { id: versionId } });
    expect(opened.status).toBe(200);
    const settled = await world.as('senior').call(ROUTES.settle, {
      params: { id: versionId },
      body: { reason: 'Weigh again', password: PASSWORD },
    });
    expect(settled.body).toEqual({ ok: true });
    expect(await stateOf(versionId)).toBe('returned');
    const revised = await world.as('doctor').call(ROUTES.revise, { params: { id: versionId } });
    const next = (revised.body as { versionId: string }).versionId;
    const { fillDraft, signDraft } = await import('../support/make-order');
    const rev = await fillDraft(world, childId, next);
    await signDraft(world, { versionId: next, rev }, { seen: { rateMlPerH: '44.0', volumeMl: '1056.0' } });
    // the first checker and the senior have seen the figures: another is asked first
    for (const person of ['checker', 'senior'] as const) {
      const page = await world.as(person).call(ROUTES.checkPage, { params: { id: next } });
      expect(page.body).toMatchObject({ uncovered: null, hasSeenFigures: true });
      expect((await lockIn(world, person, next)).body).toMatchObject({ type: '/problems/unseen-or-waited' });
    }
    await lockIn(world, 'otherChecker', next);
    expect((await signCheck(world, 'otherChecker', next)).body).toEqual({ state: 'signed' });
    const old = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.versionId, versionId)),
    );
    expect(old.length).toBeGreaterThan(0);
  });
});

describe('only a choice differs', () => {
  const full = checkForm({ fraction: 'full', rate: '55', volumeMl: '1320' });

  it('is accepted with a reason, which is counted and stays with the signature', async () => {
    const { versionId } = await waiting();
    const locked = await lockIn(world, 'checker', versionId, full);
    expect(locked.body).toMatchObject({
      state: 'awaiting-check',
      uncovered: { comparison: { outcome: 'choices-differ', mayAccept: true } },
    });
    const bare = await signCheck(world, 'checker', versionId);
    expect(bare.body).toMatchObject({
      type: '/problems/reason-owed',
      errors: [{ pointer: '/acceptReason' }],
    });
    const signed = await signCheck(world, 'checker', versionId, 'Pneumonia: 80 % is right');
    expect(signed.body).toEqual({ state: 'signed' });
    expect(await missesOf(versionId)).toMatchObject([{ class: 'choice-accepted', limitCode: 'fraction' }]);
    const rows = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.versionId, versionId)),
    );
    expect(rows.find(({ meaning }) => meaning === 'independent-check')?.note).toContain(
      'Pneumonia: 80 % is right',
    );
  });

  it('or returned with one', async () => {
    const { versionId } = await waiting();
    await lockIn(world, 'checker', versionId, full);
    const returned = await world.as('checker').call(ROUTES.cannotVerify, {
      params: { id: versionId },
      body: { what: 'fraction', reason: 'Full is right here' },
    });
    expect(returned.body).toEqual({ ok: true });
    expect(await stateOf(versionId)).toBe('returned');
    expect(await mailsTo('doctor', versionId)).toEqual(['order-returned']);
    expect(await missesOf(versionId)).toMatchObject([{ class: 'check-returned', limitCode: 'fraction' }]);
  });
});

describe('the child is entered again', () => {
  it('refuses a wrong one, says which entry and not what it is, locks nothing in', async () => {
    const { versionId } = await waiting();
    const answer = await lockIn(world, 'checker', versionId, checkForm({ initials: 'ZZ' }));
    expect(answer.status).toBe(409);
    expect(answer.body).toMatchObject({
      type: '/problems/wrong-child',
      errors: [{ pointer: '/form/initials' }],
    });
    expect(answer.text).not.toMatch(/MT|Marlow|Thorne/);
    expect(await stateOf(versionId)).toBe('awaiting-check');
    expect(await missesOf(versionId)).toMatchObject([{ class: 'wrong-child', childId: expect.any(String) }]);
    expect(await actsOf(versionId)).toContain('check-locked-in:refused');
    await lockIn(world, 'checker', versionId, checkForm({ initials: 'ZZ' }));
    expect(await missesOf(versionId)).toHaveLength(1);
    expect((await lockIn(world, 'checker', versionId)).status).toBe(200);
  });

  it('names every malformed entry beside its field', async () => {
    const { versionId } = await waiting();
    const answer = await lockIn(world, 'checker', versionId, checkForm({ weightKg: '16,4', rate: '4.4e1' }));
    expect(answer.status).toBe(422);
    expect((answer.body as { errors: { pointer: string }[] }).errors.map(({ pointer }) => pointer)).toEqual([
      '/form/weightKg',
      '/form/rate',
    ]);
  });
});

describe('unsent figures', () => {
  it('are kept as typed, readable by their owner alone, and settled between tabs', async () => {
    const { versionId } = await waiting();
    const client = world.as('checker');
    const save = (rev: number, rate: string) =>
      client.call(ROUTES.saveCheck, { params: { id: versionId }, body: { rev, form: checkForm({ rate }) } });
    expect((await save(0, '4')).body).toMatchObject({ rev: 1 });
    expect((await save(1, '44.')).body).toMatchObject({ rev: 2 });
    const stale = await save(1, '440');
    expect(stale.body).toMatchObject({
      type: '/problems/draft-moved',
      data: { rev: 2, form: { rate: '44.' } },
    });
    const page = await client.call(ROUTES.checkPage, { params: { id: versionId } });
    expect(page.body).toMatchObject({ draft: { rev: 2, form: { rate: '44.' } } });
    const other = await world.as('otherChecker').call(ROUTES.checkPage, { params: { id: versionId } });
    expect(other.body).toMatchObject({ draft: { rev: 0, form: { rate: '' } } });
  });
});
