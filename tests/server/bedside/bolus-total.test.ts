import { ROUTES } from '@shared/routes';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { children } from '../../../server/db/schema/children';
import { nearMisses } from '../../../server/db/schema/near-misses';
import { sharedDatabase } from '../support/database';
import { bedsideEntries, makeSignedOrder, productId, SALINE } from '../support/make-order';
import { makeWorld, type World } from '../support/world';

let world: World;
beforeAll(async () => {
  world = await makeWorld(sharedDatabase());
});

/** 16.4 kg, 10 mL/kg: 164 mL signed; `elsewhere` mL is written down between signing and starting. */
async function startAfter(elsewhere: string | null, urgency: 'urgent' | 'emergency' = 'urgent') {
  const childId = await world.addChild();
  const order = await makeSignedOrder(world, childId, { kind: 'bolus', form: { urgency } });
  if (elsewhere !== null) {
    const told = await world.as('nurse').call(ROUTES.recordIntake, {
      params: { id: childId },
      body: {
        what: 'bolus',
        ml: elsewhere,
        at: '2026-06-10T11:30',
        where: 'Ambulance, sodium chloride 0.9%',
      },
    });
    expect(told.status, told.text).toBe(200);
  }
  const number = await world.within(
    async (tx) => (await tx.select().from(children).where(eq(children.id, childId)))[0]!.number,
  );
  const answer = await world.as('nurse').call(ROUTES.recordStart, {
    params: { id: order.versionId },
    body: {
      entries: bedsideEntries(world, number, {
        bag: { productId: productId(world, SALINE) },
        pump: { rate: '', volume: '164', minutes: '10', device: '', channel: '' },
      }),
      witness: null,
      replacesVersionId: null,
    },
  });
  return { answer, versionId: order.versionId };
}

// the line at 40 mL/kg in 24 h: NICE NG29 1.3, expert advice at 40 to 60; a line is reached at its value (ours)
describe('boluses given between signing and start', () => {
  it('start when the day stays below 40 mL/kg', async () => {
    // 491 + 164 = 655 mL, 39.9 mL/kg
    const { answer } = await startAfter('491');
    expect(answer.status, answer.text).toBe(200);
  });

  it('do not start at 40 mL/kg unless a senior had agreed, and it is kept as a near miss', async () => {
    // 492 + 164 = 656 mL, exactly 40 mL/kg
    const { answer, versionId } = await startAfter('492');
    expect(answer.status).toBe(409);
    expect(answer.body).toMatchObject({
      type: '/problems/exception-needed',
      detail: expect.stringContaining('40 mL/kg'),
    });
    const misses = await world.within((tx) =>
      tx.select().from(nearMisses).where(eq(nearMisses.versionId, versionId)),
    );
    expect(misses).toMatchObject([{ class: 'senior', limitCode: 'bolus-total' }]);
  });

  it('never hold up an emergency', async () => {
    const { answer } = await startAfter('492', 'emergency');
    expect(answer.status, answer.text).toBe(200);
  });
});
