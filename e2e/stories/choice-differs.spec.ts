import { fillCheck, lockIn, timelineLine } from '../support/hands';
import { button, typeInto } from '../support/words';
import { draftByApi, signByApi } from '../support/signed-order';
import { expect, PASSWORD, test } from '../support/world';

test('only a choice differs: the checker accepts it with a reason, which stays with the order', async ({
  world,
}) => {
  const child = await world.addChild();
  await world.addResults(child.id, { sodium: 138, potassium: 4.1 });
  const versionId = await draftByApi(world, child);
  await signByApi(world, versionId);

  const checker = await world.open('checker', `/checks/${versionId}`);
  await fillCheck(checker, { fraction: 'Full', rate: '55', volume: '1320' });
  await lockIn(checker);
  await expect(checker.getByRole('heading', { name: 'One choice differs' })).toBeVisible();

  const accept = button(checker, 'Accept this choice and sign');
  await typeInto(checker, 'Your password, again', PASSWORD);
  await accept.click();
  await expect(checker.getByText('Say why, in a few words.')).toBeVisible();
  await typeInto(checker, 'Your reason, in a sentence', 'She drinks a fifth by herself.');
  await accept.click();
  await expect(checker.getByRole('link', { name: 'Back to my checks' })).toBeVisible();

  const author = await world.open('doctor', `/orders/${versionId}`);
  await expect(author.locator('main').getByText('Signed', { exact: true }).first()).toBeVisible();
  await expect(author.getByText('She drinks a fifth by herself.').first()).toBeVisible();
  await expect(timelineLine(author, 'Checked and signed')).toBeVisible();
});
