import { openChart, signAndAsk, timelineLine } from '../support/hands';
import { button, choose, pick, typeInto } from '../support/words';
import { expect, PASSWORD, test } from '../support/world';

test('an emergency bolus is checked beside its author, blind, on the same screen', async ({ world }) => {
  const child = await world.addChild();
  const page = await world.open('doctor', `/wards/${world.hospital.wards.Heron}`);
  await openChart(page, child);
  await button(page, 'Draft a bolus').click();
  await expect(page.getByRole('heading', { name: 'Bolus order' })).toBeVisible();
  await typeInto(page, 'Reason for fluids', 'Septic shock');
  await choose(page, 'How urgent', 'Emergency');
  await expect(page.getByText('164 mL').first()).toBeVisible();
  const versionId = await signAndAsk(page);

  await button(page, 'Check beside me').click();
  const hand = page.getByRole('region', { name: 'Check beside me' });
  await typeInto(hand, 'Their e-mail address', world.hospital.people.checkingNurse.email);
  await typeInto(hand, 'Their password', PASSWORD);
  await button(hand, 'Open the check for them').click();
  await page.waitForURL(/\/beside$/);
  await expect(page.getByText('Samir Lundquay').first()).toBeVisible();
  const shown = await page.locator('body').innerText();
  for (const figure of ['164', 'Imogen Valehart']) expect(shown).not.toContain(figure);

  await typeInto(page, 'Initials', 'EH');
  await pick(page.getByLabel('Sex'), 'Female');
  await page.getByRole('textbox', { name: 'Age', exact: true }).pressSequentially('4');
  await pick(page.getByLabel('Age in'), 'years');
  await typeInto(page, 'Dosing weight', '16.4');
  await pick(page.getByRole('combobox', { name: 'Fluid' }), 'Sodium chloride 0.9%');
  await typeInto(page, 'Total volume', '164');
  await page.getByRole('textbox', { name: 'Over' }).pressSequentially('10');
  await button(page, 'Lock in my figures').click();
  const panel = page.getByRole('region', { name: 'Lock in these figures?' });
  await button(panel, 'Lock in my figures').click();
  await expect(page.getByRole('heading', { name: 'Both sets agree' })).toBeVisible();
  await typeInto(page, 'Your password, again', PASSWORD);
  await button(page, 'Sign this check').click();

  await button(page.locator('main'), 'Close and give the screen back').click();
  await page.waitForURL(new RegExp(`/orders/${versionId}$`));
  await expect(page.getByText('Imogen Valehart').first()).toBeVisible();
  await expect(page.locator('main').getByText('Signed', { exact: true }).first()).toBeVisible();
  await expect(timelineLine(page, 'Checked and signed')).toContainText('Samir Lundquay');
});
