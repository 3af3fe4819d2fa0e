import { expect, type Locator, type Page } from '@playwright/test';

/** Finding and using the parts of a page by the words that stand there. */

export const button = (page: Page | Locator, name: string | RegExp) => page.getByRole('button', { name });
export const typeInto = (page: Page | Locator, label: string | RegExp, text: string) =>
  page.getByLabel(label).and(page.locator('input, textarea')).pressSequentially(text);

/** Ticks a choice of a strip as a finger does: by its words. */
export async function choose(page: Page | Locator, group: string | RegExp, name: string | RegExp) {
  await page.getByRole('radiogroup', { name: group }).locator('label').filter({ hasText: name }).click();
}

/** Chooses from a native select by its keys: the arrows. */
export async function pick(select: Locator, label: string): Promise<void> {
  await expect(select).toBeEnabled();
  const options = (await select.locator('option:not([hidden])').allTextContents()).map((text) => text.trim());
  const at = options.indexOf(label);
  if (at < 0) throw new Error(`no "${label}" among ${options.join(', ')}`);
  await select.focus();
  const now = await select.evaluate((element: HTMLSelectElement) => element.selectedOptions[0]?.text.trim());
  // from the placeholder the first arrow goes to the first option
  const steps = at - options.indexOf(now ?? '');
  const key = steps < 0 ? 'ArrowUp' : 'ArrowDown';
  for (let step = 0; step < Math.abs(steps); step += 1) await select.press(key);
  await expect(select.locator('option:checked')).toHaveText(label);
}
