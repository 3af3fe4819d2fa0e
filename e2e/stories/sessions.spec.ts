import { eq } from 'drizzle-orm';
import { drafts } from '../../server/db/schema/orders';
import { signAndAsk } from '../support/hands';
import { button, typeInto } from '../support/words';
import { draftByApi } from '../support/signed-order';
import { expect, PASSWORD, test } from '../support/world';

test('two tabs edit one draft: both texts are shown and nothing is overwritten', async ({ world }) => {
  const child = await world.addChild();
  const versionId = await draftByApi(world, child);
  const one = await world.open('doctor', `/drafts/${versionId}`);
  const two = await one.context().newPage();
  await two.goto(`/drafts/${versionId}`);

  await one.getByLabel('Reason for fluids').fill('Written in the first tab');
  await expect
    .poll(async () => {
      const [row] = await world.within((tx) =>
        tx.select({ form: drafts.form }).from(drafts).where(eq(drafts.versionId, versionId)),
      );
      return row?.form.reason;
    })
    .toBe('Written in the first tab');
  await two.getByLabel('Reason for fluids').fill('Written in the second tab');

  const panel = two.getByRole('region', { name: 'This draft was changed in another place' });
  await expect(panel).toBeVisible();
  await expect(panel.getByText('Written in the first tab')).toBeVisible();
  await expect(panel.getByText('Written in the second tab')).toBeVisible();
  await button(panel, 'Take all of the other place').click();
  await expect(panel).toBeHidden();
  await expect(two.getByLabel('Reason for fluids')).toHaveValue('Written in the first tab');
});

test('a session that locks while signing keeps the page, and the signature goes through afterwards', async ({
  world,
}) => {
  const child = await world.addChild();
  await world.addResults(child.id, { sodium: 138, potassium: 4.1 });
  const versionId = await draftByApi(world, child);
  const page = await world.open('doctor', `/drafts/${versionId}`);
  await button(page, 'Sign and ask for a check').click();
  const panel = page.getByRole('region', { name: 'Sign, and ask for a check' });
  await typeInto(panel, 'Your password, again', PASSWORD);
  await world.lockSessions('doctor');
  await button(panel, 'Sign and ask for a check').click();

  await expect(page.getByRole('heading', { name: 'Locked' })).toBeVisible();
  await page.getByRole('main').getByLabel('Password', { exact: true }).fill(PASSWORD);
  await button(page, 'Unlock').click();
  await expect(page.getByRole('heading', { name: 'Locked' })).toBeHidden();
  await expect(page.getByLabel('Reason for fluids')).toHaveValue('Too breathless to drink enough');
  if (await panel.isVisible()) await button(panel, 'Not now').click();
  await signAndAsk(page);
});
