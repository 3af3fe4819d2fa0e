import { fillCheck, lockIn, signAndAsk, signCheck, timelineLine } from '../support/hands';
import { button, pick, typeInto } from '../support/words';
import { draftByApi, signByApi } from '../support/signed-order';
import { expect, PASSWORD, test, type StoryWorld } from '../support/world';
import type { MadeChild } from '../support/children';

/** 14.6 kg: 1000 + 4.6 × 50 = 1230 mL; 80 % is 984 mL, 41 mL/h. */
const LIGHTER = { weight: '14.6', rate: '41', volume: '984' };

async function disputed(world: StoryWorld): Promise<{ child: MadeChild; versionId: string }> {
  const child = await world.addChild();
  await world.addResults(child.id, { sodium: 138, potassium: 4.1 });
  const versionId = await draftByApi(world, child);
  await signByApi(world, versionId);
  const checker = await world.open('checker', `/checks/${versionId}`);
  await fillCheck(checker, LIGHTER);
  await lockIn(checker);
  await expect(checker.getByRole('heading', { name: 'The weights do not agree' })).toBeVisible();
  await expect(checker.getByText('Neither set counts until both agree.')).toBeVisible();
  await expect(button(checker, 'Sign this check')).toHaveCount(0);
  return { child, versionId };
}

test('facts differ: the author works it out again and another person checks', async ({ world }) => {
  const { child, versionId } = await disputed(world);
  const weightId = await world.addWeight(child.id, { kg: 14.6, hoursAgo: 0 });
  expect(weightId).not.toBe('');

  await world.mail.waitFor('doctor', 'An order is disputed');
  const author = await world.open('doctor', `/orders/${versionId}`);
  await expect(author.getByText('You cannot overrule a checker.')).toBeVisible();
  await button(author, 'Revise: make version 2').click();
  const panel = author.getByRole('region', { name: 'Make version 2?' });
  await button(panel, 'Revise: make version 2').click();
  await author.waitForURL(/\/drafts\//);
  await expect(author.getByText('version 2')).toBeVisible();
  const weights = author.getByLabel('Weight', { exact: true });
  const label = await weights
    .locator('option')
    .filter({ hasText: /^14\.6/ })
    .textContent();
  await pick(weights, label ?? '');
  await expect(author.getByRole('row', { name: /^on the pump/ })).toContainText('41');
  const second = await signAndAsk(author, 'Maud Ferrierson');

  const other = await world.open('otherChecker', `/checks/${second}`);
  await fillCheck(other, LIGHTER);
  await lockIn(other);
  await expect(other.getByRole('heading', { name: 'Both sets agree' })).toBeVisible();
  await signCheck(other);

  await expect
    .poll(async () => {
      await author.reload();
      return timelineLine(author, 'Checked and signed').count();
    })
    .toBe(1);
  await author.goto(`/orders/${versionId}`);
  await expect(author.locator('main').getByText('Revised').first()).toBeVisible();
  await expect(author.getByText('void: the order is not what was signed').first()).toBeVisible();
  await expect(timelineLine(author, 'Revised: the next version was begun')).toBeVisible();
});

test('facts differ: a pharmacist settles it and it goes back to its author', async ({ world }) => {
  const { versionId } = await disputed(world);
  const pharmacist = await world.open('pharmacist', `/orders/${versionId}`);
  await expect(pharmacist.getByText('1056')).toHaveCount(0);
  await button(pharmacist, 'Open the dispute to settle it').click();
  await expect(pharmacist.getByText('Two sets of figures differ.')).toBeVisible();
  await button(pharmacist, 'Settle the dispute').click();
  const panel = pharmacist.getByRole('region', { name: 'Settle the dispute' });
  await typeInto(panel, 'What you found, and what has to change', 'The scales say 14.6 kg: use that.');
  await typeInto(panel, 'Your password, again', PASSWORD);
  await button(panel, 'Return it to the prescriber with this reason').click();
  await expect(pharmacist.locator('main').getByText('Returned').first()).toBeVisible();

  const author = await world.open('doctor', `/orders/${versionId}`);
  await expect(timelineLine(author, 'Dispute settled, returned to its author')).toContainText('14.6 kg');
});
