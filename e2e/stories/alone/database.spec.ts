import { expect, test } from '../../support/alone-world';
import { signAndAsk } from '../../support/hands';
import { button } from '../../support/words';
import { draftByApi } from '../../support/signed-order';

// while it is away the server answers 503, and the browser writes that down
test.use({ expectedFaults: [/status of 503/] });

test('the database restarts under load: the server lives on, and nothing typed is lost', async ({
  alone,
  world,
}) => {
  const child = await world.addChild();
  await world.addResults(child.id, { sodium: 138, potassium: 4.1 });
  const versionId = await draftByApi(world, child);
  const page = await world.open('doctor', `/drafts/${versionId}`);
  await expect(button(page, 'Sign and ask for a check')).toBeVisible();

  const request = await world.requestAs('doctor');
  const statuses = new Set<number>();
  let isOver = false;
  const load = Array.from({ length: 8 }, async () => {
    while (!isOver) {
      const answer = await request.get(`/api/wards/${world.hospital.wards.Heron}`);
      statuses.add(answer.status());
    }
  });
  await page.getByLabel('Reason for fluids').fill('Written while the database went away');
  await alone.cluster.restart('immediate');
  await expect
    .poll(async () => (await request.get('/api/health')).json(), { timeout: 20_000 })
    .toEqual({ ok: true, database: true });
  isOver = true;
  await Promise.all(load);
  // nothing but answers and "try again": no half-done page, no crash
  expect([...statuses].filter((status) => status !== 200 && status !== 503)).toEqual([]);
  expect(statuses).toContain(200);

  await expect(page.getByLabel('Reason for fluids')).toHaveValue('Written while the database went away');
  await signAndAsk(page);
});
