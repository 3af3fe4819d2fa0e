import { ROUTES } from '@shared/routes';
import { expect, it } from 'vitest';
import { accounts } from '../../../server/db/schema/accounts';
import { eq } from 'drizzle-orm';
import { sharedDatabase } from '../support/database';
import { makeWorld, type PersonKey } from '../support/world';

const urls = sharedDatabase();
type Colleague = { name: string; entitlements: string[] };

it('lists who works on a ward with what they are entitled to there, without those who left', async () => {
  const world = await makeWorld(urls);
  await world.within((tx) =>
    tx
      .update(accounts)
      .set({ deactivatedAt: world.clock.now() })
      .where(eq(accounts.id, world.people.otherChecker.id)),
  );
  const answer = await world.as('doctor').call(ROUTES.colleagues, { params: { id: world.wards.heron } });
  const people = answer.body.people as Colleague[];
  const names = people.map(({ name }) => name);
  expect(names).toEqual([...names].sort());
  expect(people.find(({ name }) => name === 'Halina Brandt')!.entitlements).toEqual(['senior', 'checking']);
  for (const absent of ['Jonas Peel', 'Maud Ferrier', 'Wilma Stroud']) expect(names).not.toContain(absent);
});

it.each([
  ['elsewhere', 403],
  ['admin', 403],
  ['lead', 200],
] as [PersonKey, number][])('%s asks: %d', async (who, status) => {
  const world = await makeWorld(urls);
  const answer = await world.as(who).call(ROUTES.colleagues, { params: { id: world.wards.heron } });
  expect(answer.status).toBe(status);
});
