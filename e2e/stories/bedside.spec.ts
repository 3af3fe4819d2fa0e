import { eq } from 'drizzle-orm';
import { nearMisses } from '../../server/db/schema/near-misses';
import { compareBag, compareChild, comparePump, timelineLine } from '../support/hands';
import { button } from '../support/words';
import { SALINE_GLUCOSE_K, signedOrder } from '../support/signed-order';
import { expect, test } from '../support/world';

test('a pump at ten times the order is refused with what differs, and nothing starts', async ({ world }) => {
  const child = await world.addChild();
  await world.addResults(child.id, { sodium: 138, potassium: 4.1 });
  const versionId = await signedOrder(world, child);

  const nurse = await world.open('nurse', `/orders/${versionId}/bedside`);
  await compareChild(nurse, child);
  await compareBag(nurse, { fluid: SALINE_GLUCOSE_K, rate: '', volume: '' });
  await comparePump(nurse, { rate: '440', volume: '176' });
  await expect(nurse.getByRole('alert').filter({ hasText: 'Ten times the order.' })).toBeVisible();
  await expect(nurse.getByText(/the pump shows 440 mL\/h, the order says 44/)).toBeVisible();
  await expect(button(nurse, 'Record start')).toHaveAttribute('aria-disabled', 'true');

  const [miss] = await world.within((tx) =>
    tx.select().from(nearMisses).where(eq(nearMisses.versionId, versionId)),
  );
  expect(miss).toMatchObject({ class: 'bedside', limitCode: 'pump-ten-times', value: '440 mL/h' });

  await nurse.getByLabel('Rate the pump shows').fill('44');
  await button(nurse, 'Compare with the order').click();
  await expect(nurse.getByText('Ten times the order.')).toHaveCount(0);

  await nurse.goto(`/orders/${versionId}`);
  await expect(nurse.locator('main').getByText('Signed', { exact: true }).first()).toBeVisible();
  await expect(timelineLine(nurse, 'Compared at the bedside')).toContainText('Ten times the order');
});
