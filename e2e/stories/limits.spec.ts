import { eq } from 'drizzle-orm';
import { nearMisses } from '../../server/db/schema/near-misses';
import { draftMaintenance, openChart, signAndAsk, timelineLine } from '../support/hands';
import { button, choose, pick, typeInto } from '../support/words';
import { expect, PASSWORD, test } from '../support/world';

test('over the brim: the sign button goes, a legal volume is offered, the near miss is kept', async ({
  world,
}) => {
  const child = await world.addChild({
    surname: 'Brackenbury',
    given: 'Otis',
    sex: 'male',
    ageDays: 14 * 366,
    kg: 62,
  });
  const author = await world.open('doctor', `/wards/${world.hospital.wards.Heron}`);
  await openChart(author, child);
  await button(author, 'Draft a bolus').click();
  await expect(author.getByRole('heading', { name: 'Bolus order' })).toBeVisible();
  await typeInto(author, 'Reason for fluids', 'Shock, cold hands and feet');
  await author.getByLabel('Dose by weight').fill('10');
  await expect(author.getByText(/620 mL is 120 mL over the brim/).first()).toBeVisible();
  await expect(button(author, 'Sign and ask for a check')).toHaveCount(0);

  await expect
    .poll(() => world.within((tx) => tx.select().from(nearMisses).where(eq(nearMisses.childId, child.id))))
    .toMatchObject([{ limitCode: 'bolus-volume' }]);

  await button(author.getByRole('contentinfo'), /^Set to 500 mL/).click();
  await expect(author.getByText('over the brim')).toHaveCount(0);
  await expect(button(author, 'Sign and ask for a check')).toBeVisible();
  await choose(author, 'How urgent', 'Urgent');
  const versionId = await signAndAsk(author);
  await author.goto(`/orders/${versionId}`);
  await expect(timelineLine(author, 'Signed by its author, a check asked for')).toBeVisible();
});

test('a senior matter: asked, opened, agreed to with a reason, and then signed', async ({ world }) => {
  const child = await world.addChild({ kg: null });
  await world.addResults(child.id, { sodium: 138, potassium: 4.1 });
  await world.addWeight(child.id, { kg: 16.4, hoursAgo: 9 * 24 });
  const author = await world.open('doctor');
  await draftMaintenance(author, child);
  await expect(author.getByText('A senior has to agree before you sign:')).toBeVisible();
  await button(author, 'Ask a senior to agree').click();
  const panel = author.getByRole('region', { name: 'A senior has to agree' });
  await expect(panel.getByText('Old weight')).toBeVisible();
  await pick(panel.getByLabel('Who is asked'), 'Any senior on the ward');
  await typeInto(panel, 'Why this order needs it', 'In plaster; bed scales come this afternoon.');
  await button(panel, 'Ask for agreement').click();
  await expect(panel).toBeHidden();

  await world.mail.waitFor('consultant', 'A senior decision is asked of you');
  const senior = await world.open('consultant', '/exceptions');
  await senior.getByRole('link', { name: 'Look at it' }).click();
  await button(senior, 'Open the matter').click();
  await expect(senior.getByText('In plaster; bed scales come this afternoon.')).toBeVisible();
  await button(senior, 'Agree, with a reason').click();
  const decision = senior.getByRole('region', { name: 'Agree to this exception' });
  await typeInto(decision, 'Why you agree', 'Agreed for twelve hours.');
  await typeInto(decision, 'Your password, again', PASSWORD);
  await button(decision, 'Agree, with my password').click();
  await expect(decision).toBeHidden();

  await author.reload();
  const versionId = await signAndAsk(author);
  await author.goto(`/orders/${versionId}`);
  await expect(timelineLine(author, 'A senior agreed')).toBeVisible();
});

test('a weight in pounds is caught, and no order can use it until it is measured again', async ({
  world,
}) => {
  const child = await world.addChild({
    surname: 'Bellwether',
    given: 'Gus',
    sex: 'male',
    ageDays: 366,
    kg: null,
  });
  const nurse = await world.open('nurse', `/children/${child.id}`);
  await button(nurse, 'Record a weight').click();
  const weigh = (page: typeof nurse) => page.getByRole('region', { name: 'Record a weight' });
  await typeInto(weigh(nurse), 'Weight', '22');
  await pick(weigh(nurse).getByLabel('How'), 'baby scales');
  await button(weigh(nurse), 'Record this weight').click();
  await expect(nurse.getByText(/22 looks like pounds: 22 lb is 9.98 kg/).first()).toBeVisible();

  const doctor = await world.open('doctor', `/children/${child.id}`);
  await expect(doctor.getByText('Record a weight that can be used first.')).toBeVisible();

  const again = await world.open('checkingNurse', `/children/${child.id}`);
  await button(again, 'Measure again').click();
  const panel = again.getByRole('region', { name: 'Measure this weight again' });
  await typeInto(panel, 'Weight', '10');
  await pick(panel.getByLabel('How'), 'baby scales');
  await button(panel, 'Record this weight').click();
  await expect(again.getByRole('row', { name: /10 kg/ })).toContainText('Dosing weight');

  await doctor.reload();
  await button(doctor, 'Draft maintenance fluids').click();
  await expect(doctor.getByRole('heading', { name: 'Maintenance order' })).toBeVisible();
  await expect(doctor.getByLabel('Weight', { exact: true }).locator('option:checked')).toContainText('10 kg');
});
