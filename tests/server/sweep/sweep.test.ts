import { ROUTES } from '@shared/routes';
import { instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { checks } from '../../../server/db/schema/checks';
import { ledger } from '../../../server/db/schema/ledger';
import { orderVersions } from '../../../server/db/schema/orders';
import { answers, outbox } from '../../../server/db/schema/outbox';
import { sweepHospital } from '../../../server/sweep/sweep';
import { draft, signedOrder } from '../orders/write-order';
import { sharedDatabase } from '../support/database';
import { makeWorld, type World } from '../support/world';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
let world: World;
beforeEach(async () => {
  world = await makeWorld(sharedDatabase());
});

const sweep = () => sweepHospital(world.deps, world.hospitalId);
const stateOf = async (versionId: string) => {
  const [row] = await world.within((tx) =>
    tx.select({ state: orderVersions.state }).from(orderVersions).where(eq(orderVersions.id, versionId)),
  );
  return row!.state;
};
const mailsOf = async (versionId: string) => {
  const rows = await world.within((tx) => tx.select().from(outbox));
  return rows
    .filter(({ ref }) => ref['versionId'] === versionId)
    .map(({ kind, toAccount }) => [kind, toAccount] as const);
};
const kindsOf = async (versionId: string) => (await mailsOf(versionId)).map(([kind]) => kind);

describe('the sweep', () => {
  it('lapses what can no longer be started, once, and tells the author', async () => {
    const { versionId } = await signedOrder(world);
    world.clock.advance(6 * HOUR); // planned start 12:00, starts within 6 h (ours): met, not passed
    await sweep();
    expect(await stateOf(versionId)).toBe('awaiting-check');
    world.clock.advance(1);
    await Promise.all([sweep(), sweep()]);
    await sweep();
    expect(await stateOf(versionId)).toBe('lapsed');
    expect((await kindsOf(versionId)).filter((kind) => kind === 'order-lapsed')).toHaveLength(1);
    const rows = await world.within((tx) => tx.select().from(ledger).where(eq(ledger.subjectId, versionId)));
    const lapsed = rows.filter(({ act }) => act === 'order-lapsed');
    expect(lapsed.map(({ outcome, actorId }) => [outcome, actorId])).toEqual([['done', null]]);
  });

  it.each([
    [14, []],
    [15, ['check-reminder']],
    [30, ['check-reminder', 'check-second']],
    [45, ['check-reminder', 'check-second', 'check-senior']],
    [60, ['check-reminder', 'check-second', 'check-senior', 'check-author']],
  ])('after %i of 60 minutes has reminded %j', async (minutes, kinds) => {
    const { versionId } = await signedOrder(world, 'maintenance', {
      checkerId: world.people.checker.id,
    });
    world.clock.advance(minutes * MINUTE);
    await sweep();
    await sweep();
    const sent = (await kindsOf(versionId)).filter((kind) => kind !== 'check-asked');
    expect(sent.sort()).toEqual([...kinds].sort());
  });

  it('reminds the checker asked, then another, then a senior, then tells the author to telephone', async () => {
    const { checker, senior, doctor } = world.people;
    const { versionId } = await signedOrder(world, 'maintenance', { checkerId: checker.id });
    world.clock.advance(60 * MINUTE);
    await sweep();
    const mails = new Map(await mailsOf(versionId));
    expect(mails.get('check-reminder')).toBe(checker.id);
    expect(mails.get('check-second')).not.toBe(checker.id);
    expect(mails.get('check-senior')).toBe(senior.id);
    expect(mails.get('check-author')).toBe(doctor.id);
  });

  it('gives a check free whose agreed figures were not signed in time', async () => {
    const { versionId } = await signedOrder(world);
    const now = world.clock.now();
    const figures = '{}';
    await world.within((tx) =>
      tx.insert(checks).values({
        versionId,
        authorId: world.people.doctor.id,
        checkerId: world.people.checker.id,
        state: 'locked-agreed',
        openedAt: now,
        figures,
        figuresSha256: '44136fa355b3678a1146ad16f7e8649e94fb4fc21fe77e8310c060f61caaff8a',
        lockedInAt: now,
        reservedUntil: instant(now + 15 * MINUTE),
      }),
    );
    const check = async () =>
      (await world.within((tx) => tx.select().from(checks).where(eq(checks.versionId, versionId))))[0]!.state;
    world.clock.advance(15 * MINUTE);
    await sweep();
    expect(await check()).toBe('locked-agreed');
    world.clock.advance(1);
    await sweep();
    expect(await check()).toBe('expired');
  });

  it('discards a draft nobody touched for a day, and leaves a touched one', async () => {
    const old = await draft(world, 'maintenance');
    world.clock.advance(2 * HOUR);
    const fresh = await draft(world, 'maintenance');
    world.clock.advance(22 * HOUR + 1);
    await sweep();
    expect(await stateOf(old.versionId)).toBe('discarded');
    expect(await stateOf(fresh.versionId)).toBe('draft');
  });

  it('tells the author once that a signed order soon lapses', async () => {
    const { versionId } = await signedOrder(world);
    await world.within((tx) =>
      tx
        .update(orderVersions)
        .set({ state: 'signed', checkedAt: world.clock.now() })
        .where(eq(orderVersions.id, versionId)),
    );
    world.clock.advance(4 * HOUR);
    await sweep();
    expect(await kindsOf(versionId)).not.toContain('order-lapsing');
    world.clock.advance(HOUR + 1);
    await sweep();
    await sweep();
    expect((await kindsOf(versionId)).filter((kind) => kind === 'order-lapsing')).toHaveLength(1);
  });

  it('forgets answers after a day', async () => {
    const childId = await world.addChild();
    await world.as('doctor').call(ROUTES.startDraft, {
      params: { id: childId },
      body: { kind: 'maintenance', followsOrderId: null },
    });
    const count = () => world.within(async (tx) => (await tx.select().from(answers)).length);
    expect(await count()).toBe(1);
    world.clock.advance(24 * HOUR + 1);
    await sweep();
    expect(await count()).toBe(0);
  });

  it('leaves other hospitals alone', async () => {
    const { versionId } = await signedOrder(world);
    world.clock.advance(7 * HOUR);
    const other = await makeWorld(sharedDatabase());
    await sweepHospital(other.deps, other.hospitalId);
    expect(await stateOf(versionId)).toBe('awaiting-check');
  });
});
