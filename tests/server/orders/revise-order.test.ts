import { ROUTES } from '@shared/routes';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { checks } from '../../../server/db/schema/checks';
import { ledger } from '../../../server/db/schema/ledger';
import { orderVersions } from '../../../server/db/schema/orders';
import { sharedDatabase } from '../support/database';
import { makeWorld, PASSWORD, type PersonKey, type World } from '../support/world';
import { read, sign, signedOrder, type } from './write-order';

let world: World;
beforeAll(async () => {
  world = await makeWorld(sharedDatabase());
});

const act = (
  person: PersonKey,
  route: (typeof ROUTES)['revise' | 'withdraw' | 'settle'],
  id: string,
  body = {},
) => world.as(person).call(route, { params: { id }, body });
const page = async (person: PersonKey, id: string) =>
  (await world.as(person).call(ROUTES.order, { params: { id } })).body;
/** Puts a version where its check would have brought it. */
const plant = (versionId: string, change: Partial<typeof orderVersions.$inferInsert>) =>
  world.within((tx) => tx.update(orderVersions).set(change).where(eq(orderVersions.id, versionId)));

describe('revising', () => {
  it('makes version 2 from the same form, and voids every signature of version 1', async () => {
    const { versionId } = await signedOrder(world);
    await plant(versionId, { state: 'returned' });
    const answer = await act('doctor', ROUTES.revise, versionId);
    expect(answer.status, JSON.stringify(answer.body)).toBe(200);
    const next = await read(world.as('doctor'), answer.body.versionId as string);
    expect(next).toMatchObject({ version: 2, rev: 1 });
    expect(next.form).toMatchObject({ drugsMl: '70', feedsMl: '0', fraction: 'full' });
    const old = await page('doctor', versionId);
    expect(old.state).toBe('revised');
    expect(old.open.signatures.map(({ isVoid }: { isVoid: boolean }) => isVoid)).toEqual([true]);
    const signed = await sign(world.as('doctor'), next.versionId);
    expect(signed.status, JSON.stringify(signed.body)).toBe(200);
  });

  it('of a returned order may be taken over by another prescriber, who has then seen the figures', async () => {
    const { versionId } = await signedOrder(world);
    expect((await act('otherChecker', ROUTES.revise, versionId)).status).toBe(409);
    await plant(versionId, { state: 'signed' });
    expect((await act('otherChecker', ROUTES.revise, versionId)).status).toBe(403);
    await plant(versionId, { state: 'returned' });
    const answer = await act('otherChecker', ROUTES.revise, versionId);
    expect(answer.status).toBe(200);
    // the first author wrote an earlier version: another checker is asked first
    await type(world.as('otherChecker'), answer.body.versionId as string, {
      checkerId: world.people.checker.id,
    });
    expect((await sign(world.as('otherChecker'), answer.body.versionId as string)).status).toBe(200);
    const facts = (await page('doctor', answer.body.versionId as string)) as {
      open: unknown;
      acts: { act: string; allowed: boolean }[];
    };
    expect(facts.open).toBeNull();
    expect(facts.acts.find((each) => each.act === 'open-check')?.allowed).toBe(false);
  });

  it('is refused to a nurse and to a stranger to the ward', async () => {
    const { versionId } = await signedOrder(world);
    await plant(versionId, { state: 'returned' });
    expect((await act('nurse', ROUTES.revise, versionId)).status).toBe(403);
    expect((await act('elsewhere', ROUTES.revise, versionId)).status).toBe(403);
  });
});

describe('withdrawing', () => {
  it('is the author’s or a lead’s, with a reason', async () => {
    const { versionId } = await signedOrder(world);
    expect((await act('doctor', ROUTES.withdraw, versionId, { reason: '' })).status).toBe(422);
    expect((await act('otherDoctor', ROUTES.withdraw, versionId, { reason: 'Not needed' })).status).toBe(403);
    expect((await act('doctor', ROUTES.withdraw, versionId, { reason: 'Feeding now' })).status).toBe(200);
    expect((await page('doctor', versionId)).state).toBe('withdrawn');
    expect((await act('doctor', ROUTES.withdraw, versionId, { reason: 'Feeding now' })).status).toBe(409);
    const rows = await world.within((tx) => tx.select().from(ledger).where(eq(ledger.subjectId, versionId)));
    expect(rows.filter((row) => row.act === 'order-withdrawn').map(({ outcome }) => outcome)).toEqual([
      'refused',
      'done',
      'refused',
    ]);
  });
});

describe('settling a dispute', () => {
  async function disputed() {
    const { versionId } = await signedOrder(world);
    await world.within((tx) =>
      tx.insert(checks).values({
        versionId,
        authorId: world.people.doctor.id,
        checkerId: world.people.checker.id,
        state: 'passed-on',
        openedAt: world.clock.now(),
      }),
    );
    await plant(versionId, { state: 'disputed' });
    return versionId;
  }
  const settle = (person: PersonKey, versionId: string) =>
    act(person, ROUTES.settle, versionId, { reason: 'Weigh again', password: PASSWORD });

  it('sends it back to its author, by a senior or pharmacist who is neither', async () => {
    const versionId = await disputed();
    expect((await settle('doctor', versionId)).status).toBe(403);
    expect((await settle('otherDoctor', versionId)).status).toBe(403);
    expect((await page('pharmacist', versionId)).open).toBeNull();
    const opened = await world.as('pharmacist').call(ROUTES.disputeMatter, { params: { id: versionId } });
    expect(opened.body.open.content.figures.rateMlPerH).toBe('52.1');
    expect((await settle('pharmacist', versionId)).status).toBe(200);
    const after = await page('doctor', versionId);
    expect(after.state).toBe('returned');
    const revised = await act('doctor', ROUTES.revise, versionId);
    const draft = await read(world.as('doctor'), revised.body.versionId as string);
    expect(draft.cameBack?.words).toContain('Weigh again');
  });
});

describe('a covered order', () => {
  const SECRETS = /52\.1|1250|1320|Sodium chloride|bands-daily|16\.4|Imogen Vale/;

  it.each(['checker', 'nurse', 'pharmacist', 'senior', 'lead', 'otherDoctor'] as const)(
    'tells %s nothing of its figures, fluid, weight, method or author',
    async (person) => {
      const { versionId } = await signedOrder(world);
      const body = await page(person, versionId);
      expect(body.open).toBeNull();
      expect(JSON.stringify(body)).not.toMatch(SECRETS);
      expect(body.reason).toBe('Nil by mouth before surgery');
    },
  );

  it('is open to its author', async () => {
    const { versionId } = await signedOrder(world);
    expect((await page('doctor', versionId)).open.content.figures.rateMlPerH).toBe('52.1');
  });

  it('is not found from another hospital, and refused from another ward', async () => {
    const { versionId } = await signedOrder(world);
    const elsewhere = await makeWorld(sharedDatabase());
    const answer = await elsewhere.as('doctor').call(ROUTES.order, { params: { id: versionId } });
    expect(answer.status).toBe(404);
    const ward = await world.as('elsewhere').call(ROUTES.order, { params: { id: versionId } });
    expect(ward.status).toBe(403);
  });
});
