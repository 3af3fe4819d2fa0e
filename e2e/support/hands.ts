import { expect, type Page } from '@playwright/test';
import type { MadeChild } from './children';
import { button, choose, pick, typeInto } from './words';
import { PASSWORD, type StoryWorld } from './world';

/** What people do at their screens, by the words that stand there. Typing is typing: key by key. */

export async function openChart(page: Page, child: MadeChild): Promise<void> {
  await page
    .getByRole('link', { name: `${child.surname}, ${child.given}` })
    .first()
    .click();
  await expect(
    button(page, 'Draft maintenance fluids')
      .or(page.getByRole('heading', { name: 'Weights' }))
      .first(),
  ).toBeVisible();
}

export type MaintenanceWords = {
  reason?: string;
  fraction?: '100%' | '80%' | '66.7%' | '50%';
  feeds?: string;
  drugs?: string;
};

/** Drafts maintenance from the child's chart and fills in what has to be stated. */
export async function draftMaintenance(
  page: Page,
  child: MadeChild,
  words: MaintenanceWords = {},
): Promise<void> {
  await page.goto(`/children/${child.id}`);
  await button(page, 'Draft maintenance fluids').click();
  await expect(page.getByRole('heading', { name: 'Maintenance order' })).toBeVisible();
  await fillMaintenance(page, words);
}

export async function fillMaintenance(page: Page, words: MaintenanceWords): Promise<void> {
  const { reason = 'Too breathless to drink enough', fraction = '80%', feeds = '0', drugs = '0' } = words;
  await typeInto(page, 'Reason for fluids', reason);
  await choose(page, 'Fraction of full maintenance', fraction);
  await typeInto(page, 'Feeds and drinks, mL in 24 hours', feeds);
  await typeInto(page, 'Drug volumes, mL in 24 hours', drugs);
}

/** Reads back, chooses the checker, types the password, signs; gives the version's id. */
export async function signAndAsk(page: Page, checker = ''): Promise<string> {
  await button(page, 'Sign and ask for a check').click();
  const panel = page.getByRole('region', { name: 'Sign, and ask for a check' });
  if (checker !== '') {
    const option = panel.getByLabel('Who checks').locator('option').filter({ hasText: checker });
    await panel.getByLabel('Who checks').selectOption({ label: (await option.textContent()) ?? '' });
  }
  await typeInto(panel, 'Your password, again', PASSWORD);
  await button(panel, 'Sign and ask for a check').click();
  await page.waitForURL(/\/orders\/[0-9a-f-]{36}$/);
  await expect(page.locator('main').getByText('Awaiting check').first()).toBeVisible();
  return page.url().split('/').at(-1) ?? '';
}

export type OwnFigures = {
  initials?: string;
  sex?: string;
  age?: string;
  weight?: string;
  feeds?: string;
  drugs?: string;
  method?: string;
  fraction?: string;
  fluid?: string;
  potassium?: string;
  hours?: string;
  rate?: string;
  volume?: string;
};

/** Edie's order as a second person works it out: 16.4 kg, 80 % of 1320 mL is 1056 mL, 44 mL/h. */
const EDIE: Required<OwnFigures> = {
  initials: 'EH',
  sex: 'Female',
  age: '4',
  weight: '16.4',
  feeds: '0',
  drugs: '0',
  method: 'Weight bands, per day',
  fraction: '80%',
  fluid: 'Sodium chloride 0.9% + glucose 5%',
  potassium: 'Potassium chloride 20 mmol/L',
  hours: '24',
  rate: '44',
  volume: '1056',
};

/** Types one's own figures into the covered check. */
export async function fillCheck(page: Page, change: OwnFigures = {}): Promise<void> {
  const own = { ...EDIE, ...change };
  await typeInto(page, 'Initials', own.initials);
  await pick(page.getByRole('combobox', { name: 'Sex' }), own.sex);
  await page.getByRole('textbox', { name: 'Age', exact: true }).pressSequentially(own.age);
  await pick(page.getByRole('combobox', { name: 'Age in' }), 'years');
  await typeInto(page, 'Dosing weight', own.weight);
  await pick(page.getByLabel('Where it is from'), 'Read from the chart');
  await typeInto(page, /^Feeds and drinks/, own.feeds);
  await typeInto(page, /^Drugs and other lines/, own.drugs);
  await pick(page.getByRole('combobox', { name: 'Method' }), own.method);
  await choose(page, 'Fraction of full maintenance', own.fraction);
  await pick(page.getByRole('combobox', { name: 'Fluid' }), own.fluid);
  await pick(page.getByLabel('Potassium in the bag'), own.potassium);
  await page.getByRole('textbox', { name: 'Over' }).pressSequentially(own.hours);
  await choose(page, 'Worked out', 'By hand');
  await typeInto(page, 'Rate on the pump', own.rate);
  await typeInto(page, 'Total volume', own.volume);
}

export async function lockIn(page: Page): Promise<void> {
  await button(page, 'Lock in my figures').click();
  const panel = page.getByRole('region', { name: 'Lock in these figures?' });
  await button(panel, 'Lock in my figures').click();
  await expect(panel).toBeHidden();
}

export async function signCheck(page: Page): Promise<void> {
  await typeInto(page, 'Your password, again', PASSWORD);
  await button(page, 'Sign this check').click();
}

/** The line of the order's timeline with these words. */
export const timelineLine = (page: Page, words: string | RegExp) =>
  page.getByRole('listitem').filter({ hasText: words });

export type BagWords = { fluid: string; size?: string; rate: string; volume: string };

/** The four comparisons at the bedside; each compares itself once its last field is left. */
export async function compareBedside(page: Page, child: MadeChild, bag: BagWords): Promise<void> {
  await compareChild(page, child);
  await compareBag(page, bag);
  await comparePump(page, bag);
  await compareLine(page);
}

export async function compareChild(page: Page, child: MadeChild): Promise<void> {
  await typeInto(page, 'Hospital no. on the band', child.number);
  await page.getByLabel('Date of birth on the band').fill(child.bornOn);
  await pick(page.getByLabel('Who said name and date of birth'), 'A carer');
  await page.keyboard.press('Tab');
}

export async function compareBag(page: Page, { fluid, size = '500' }: BagWords): Promise<void> {
  await pick(page.getByLabel('What is printed on the bag'), fluid);
  await typeInto(page, 'Bag size', size);
  await typeInto(page, /^Batch/, 'LT0417');
  const next = new Date(Date.now() + 200 * 86_400_000).toISOString().slice(0, 10);
  await page.getByLabel('Expires on').fill(next);
  await button(page, 'Compare with the order').click();
}

export async function comparePump(
  page: Page,
  { rate, volume }: Pick<BagWords, 'rate' | 'volume'>,
): Promise<void> {
  await typeInto(page, 'Pump number', 'P 12');
  await typeInto(page, 'Rate the pump shows', rate);
  await typeInto(page, 'Volume the pump shows', volume);
  await page.keyboard.press('Tab');
}

export async function compareLine(page: Page): Promise<void> {
  await pick(page.getByLabel('Kind of line'), 'Peripheral');
  await typeInto(page, /^Where, for instance/, 'Left hand');
  for (const words of ['Traced from the bag', 'Clamp open', 'Site looks well'])
    await page.getByRole('checkbox', { name: words }).check();
  await page.keyboard.press('Tab');
}

/** An order of Edie's, drafted, signed and waiting; its author's page stays open. */
export async function orderThatWaits(
  world: StoryWorld,
  child: MadeChild,
  { checker = '', ...words }: MaintenanceWords & { checker?: string } = {},
): Promise<{ page: Page; versionId: string }> {
  const page = await world.open('doctor');
  await draftMaintenance(page, child, words);
  return { page, versionId: await signAndAsk(page, checker) };
}
