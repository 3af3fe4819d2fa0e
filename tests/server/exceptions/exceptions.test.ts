import { ROUTES } from '@shared/routes';
import { instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { exceptions } from '../../../server/db/schema/checks';
import { orderVersions } from '../../../server/db/schema/orders';
import { signatures } from '../../../server/db/schema/signatures';
import { draft, read, sign, type } from '../orders/write-order';
import { sharedDatabase } from '../support/database';
import { makeWorld, NOON, PASSWORD, type PersonKey, type World } from '../support/world';

const DAY = 86_400_000;
let world: World;
beforeAll(async () => {
  world = await makeWorld(sharedDatabase());
});

/** Last weighed nine days ago: a senior has to agree (common practice), and the order lives 12 h. */
async function oldWeight() {
  const childId = await world.addChild({ kg: null });
  await world.addWeight(childId, { kg: 16.4, at: instant(NOON - 9 * DAY) });
  return draft(world, 'maintenance', {}, childId);
}

const ask = async (versionId: string, seniorId: string | null = null) => {
  const { rev } = await read(world.as('doctor'), versionId);
  return world.as('doctor').call(ROUTES.askException, {
    params: { id: versionId },
    body: { rev, seniorId, reason: 'Scales are broken' },
  });
};
const open = (person: PersonKey, versionId: string) =>
  world.as(person).call(ROUTES.exceptionMatter, { params: { id: versionId } });
const decide = (person: PersonKey, versionId: string, contentSha256: string, agree = true) =>
  world.as(person).call(ROUTES.decideException, {
    params: { id: versionId },
    body: { agree, contentSha256, reason: 'Seen the child', password: PASSWORD },
  });
const grant = async (versionId: string) => {
  await ask(versionId);
  const matter = await open('senior', versionId);
  expect(matter.status, JSON.stringify(matter.body)).toBe(200);
  const answer = await decide('senior', versionId, matter.body.contentSha256 as string);
  expect(answer.status, JSON.stringify(answer.body)).toBe(200);
  return matter.body as { contentSha256: string };
};
const rowsOf = (versionId: string) =>
  world.within((tx) => tx.select().from(exceptions).where(eq(exceptions.versionId, versionId)));

describe('a senior matter', () => {
  it('keeps the order from being signed until a senior agrees', async () => {
    const { versionId } = await oldWeight();
    const refused = await sign(world.as('doctor'), versionId);
    expect(refused.status).toBe(409);
    expect(refused.body.type).toContain('exception-needed');
    expect(refused.body.data.limits.map(({ code }: { code: string }) => code)).toEqual(['weight-old']);

    const { contentSha256 } = await grant(versionId);
    const signed = await sign(world.as('doctor'), versionId);
    expect(signed.status, JSON.stringify(signed.body)).toBe(200);
    const [version] = await world.within((tx) =>
      tx.select().from(orderVersions).where(eq(orderVersions.id, versionId)),
    );
    // the bytes the senior read are the bytes that were signed
    expect(version!.contentSha256).toBe(contentSha256);
    expect(version!.isHighRisk).toBe(true);
  });

  it('is bound to the content: any change voids it and says so', async () => {
    const doctor = world.as('doctor');
    const { versionId } = await oldWeight();
    await grant(versionId);
    const { rev, form } = await read(doctor, versionId);
    const saved = await doctor.call(ROUTES.saveDraft, {
      params: { id: versionId },
      body: { rev, form: { ...form, drugsMl: '71' } },
    });
    expect(saved.body.exceptionsVoided).toBe(true);
    expect((await rowsOf(versionId)).map(({ state }) => state)).toEqual(['void']);
    expect((await sign(doctor, versionId)).body.type).toContain('exception-needed');
  });

  it('is not decided on content that moved since it was read', async () => {
    const { versionId } = await oldWeight();
    await ask(versionId);
    const matter = await open('senior', versionId);
    await type(world.as('doctor'), versionId, { drugsMl: '72' });
    const answer = await decide('senior', versionId, matter.body.contentSha256 as string);
    expect(answer.body.type).toContain('stale');
  });

  it('is refused with a reason, and then not signed', async () => {
    const { versionId } = await oldWeight();
    await ask(versionId);
    const matter = await open('senior', versionId);
    expect((await decide('senior', versionId, matter.body.contentSha256 as string, false)).status).toBe(200);
    expect((await sign(world.as('doctor'), versionId)).body.type).toContain('exception-needed');
  });

  it.each(['doctor', 'otherDoctor', 'nurse', 'pharmacist', 'lead', 'elsewhere', 'admin'] as const)(
    'is not opened by %s',
    async (person) => {
      const { versionId } = await oldWeight();
      await ask(versionId);
      expect((await open(person, versionId)).status).toBe(403);
    },
  );

  it('bars the senior who granted from the check of the order', async () => {
    const { versionId } = await oldWeight();
    await grant(versionId);
    await type(world.as('doctor'), versionId, {});
    const answer = await sign(world.as('doctor'), versionId);
    expect(answer.status).toBe(200);
    const page = await world.as('senior').call(ROUTES.order, { params: { id: versionId } });
    const check = page.body.acts.find(({ act }: { act: string }) => act === 'open-check');
    expect(check.allowed).toBe(false);
    expect(page.body.open).not.toBeNull();
  });

  it('stands in the senior’s list without a figure', async () => {
    const { versionId } = await oldWeight();
    await ask(versionId, world.people.senior.id);
    const list = await world.as('senior').call(ROUTES.exceptionsForMe);
    const row = list.body.asked.find((each: { versionId: string }) => each.versionId === versionId);
    expect(row.limits).toEqual(['Age of the weight']);
    expect(JSON.stringify(row)).not.toMatch(/52\.1|1250|16\.4/);
  });
});

describe('by telephone', () => {
  const telephone = async (versionId: string, seniorId: string, heardById: string) => {
    const { rev } = await read(world.as('doctor'), versionId);
    return world.as('doctor').call(ROUTES.telephoneException, {
      params: { id: versionId },
      body: { rev, seniorId, heardById, readBack: true, reason: 'Agreed at 12:05', password: PASSWORD },
    });
  };

  it('counts at once and is countersigned by the senior who was named', async () => {
    const { versionId } = await oldWeight();
    const { senior, nurse } = world.people;
    const answer = await telephone(versionId, senior.id, nurse.id);
    expect(answer.status, JSON.stringify(answer.body)).toBe(200);
    expect((await sign(world.as('doctor'), versionId)).status).toBe(200);
    const [row] = await rowsOf(versionId);
    expect(row).toMatchObject({ state: 'granted', how: 'telephone', by: senior.id, readBackTo: nurse.id });
    expect(row!.countersignDueAt).toBe(NOON + 12 * 3_600_000);

    const countersign = (person: PersonKey) =>
      world.as(person).call(ROUTES.countersignException, {
        params: { id: row!.id },
        body: { password: PASSWORD },
      });
    expect((await countersign('otherDoctor')).status).toBe(403);
    expect((await countersign('senior')).status).toBe(200);
    expect((await countersign('senior')).status).toBe(409);
    const signed = await world.within((tx) =>
      tx.select().from(signatures).where(eq(signatures.exceptionId, row!.id)),
    );
    expect(signed.map(({ meaning, by }) => [meaning, by])).toEqual([['countersignature', senior.id]]);
  });

  it('needs a senior of the ward and a second person who is neither', async () => {
    const { versionId } = await oldWeight();
    const { senior, nurse, checker, doctor } = world.people;
    expect((await telephone(versionId, checker.id, nurse.id)).status).toBe(422);
    expect((await telephone(versionId, senior.id, senior.id)).status).toBe(422);
    expect((await telephone(versionId, senior.id, doctor.id)).status).toBe(422);
    expect(await rowsOf(versionId)).toEqual([]);
  });
});

describe('as time passes', () => {
  beforeAll(async () => {
    world = await makeWorld(sharedDatabase());
  });

  it('an agreement holds for the same draft, saved again twenty minutes later', async () => {
    const { versionId } = await oldWeight();
    await grant(versionId);
    world.clock.advance(20 * 60_000);
    await type(world.as('doctor'), versionId, {});
    expect((await sign(world.as('doctor'), versionId)).status).toBe(200);
  });
});
