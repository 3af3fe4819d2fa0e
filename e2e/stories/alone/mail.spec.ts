import { eq } from 'drizzle-orm';
import { openDatabase } from '../../../server/db/client';
import { outbox } from '../../../server/db/schema/outbox';
import { verifyChain } from '../../../server/ledger/verify';
import { expect, testWithPost as test } from '../../support/alone-world';
import { timelineLine } from '../../support/hands';
import { draftByApi, signByApi } from '../../support/signed-order';
import { signAndAsk } from '../../support/hands';
import type { StoryWorld } from '../../support/world';

const letters = (world: StoryWorld) =>
  world.within((tx) => tx.select().from(outbox).where(eq(outbox.kind, 'check-asked')));

test('the mail server is down: signing does not wait for it, and the mail arrives when it is back', async ({
  world,
  post,
}) => {
  const child = await world.addChild();
  await world.addResults(child.id, { sodium: 138, potassium: 4.1 });
  const versionId = await draftByApi(world, child);
  const page = await world.open('doctor', `/drafts/${versionId}`);
  await signAndAsk(page, 'Tobias Rennick');
  await expect(timelineLine(page, 'Signed by its author, a check asked for')).toBeVisible();

  await expect
    .poll(async () => (await letters(world)).map(({ state, attempts }) => ({ state, tried: attempts > 0 })), {
      timeout: 20_000,
    })
    .toEqual([{ state: 'due', tried: true }]);

  const fake = await post.open();
  await expect.poll(() => fake.messages().length, { timeout: 40_000 }).toBe(1);
  const [mail] = fake.messages();
  expect(mail?.to).toBe(world.hospital.people.checker.email);
  await expect.poll(async () => (await letters(world)).map(({ state }) => state)).toEqual(['sent']);
});

test('the server is killed between the act and its mail: the act holds and the mail goes out once', async ({
  alone,
  world,
  post,
}) => {
  const child = await world.addChild();
  const versionId = await draftByApi(world, child);
  await signByApi(world, versionId);
  await alone.killServer();
  const waiting = (await letters(world)).length;
  expect(waiting).toBeGreaterThan(0);

  const fake = await post.open();
  await alone.startServer();
  await expect
    .poll(async () => (await letters(world)).filter(({ state }) => state === 'sent').length, {
      timeout: 40_000,
    })
    .toBe(waiting);
  expect(new Set(fake.messages().map(({ messageId }) => messageId)).size).toBe(waiting);
  expect(fake.messages()).toHaveLength(waiting);

  const page = await world.open('doctor', `/orders/${versionId}`);
  await expect(page.locator('main').getByText('Awaiting check').first()).toBeVisible();
  const database = openDatabase(world.place.appUrl);
  expect((await verifyChain(database, world.hospital.id)).whole).toBe(true);
  await database.close();
});
