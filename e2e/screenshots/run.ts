import type { BedsidePage } from '../../shared/routes/bedside';
import type { Me } from '../../shared/routes/accounts';
import { chromium, type Browser, type BrowserContext, type Page } from '@playwright/test';
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { DEMO_PASSWORD, DEMO_PEOPLE, type DemoPersonKey } from '../../server/demo/people';
import { CHROMIUM } from '../../server/start/chromium';
import { button, choose, pick, typeInto } from '../support/words';

/** The pictures of README, taken from the running program with its clock standing still. */
const FOLDER = fileURLToPath(new URL('.', import.meta.url));
const SALINE_GLUCOSE_K = 'Sodium chloride 0.9% + glucose 5% + potassium chloride 20 mmol/L';
const WIDE = { width: 1440, height: 900 };
const TABLET = { width: 1024, height: 768 };
const PHONE = { width: 390, height: 844 };

type Look = { viewport?: { width: number; height: number }; night?: boolean };
type Booth = { browser: Browser; baseURL: string; sessions: Map<DemoPersonKey, string> };

async function openAs(booth: Booth, who: DemoPersonKey | null, look: Look = {}): Promise<Page> {
  const { browser, baseURL, sessions } = booth;
  const known = who === null ? undefined : sessions.get(who);
  const context = await browser.newContext({
    baseURL,
    viewport: look.viewport ?? WIDE,
    colorScheme: look.night ? 'dark' : 'light',
    reducedMotion: 'reduce',
    locale: 'en-GB',
    timezoneId: 'Europe/London',
    ...(known === undefined ? {} : { storageState: JSON.parse(known) as never }),
  });
  const page = await context.newPage();
  if (who !== null && known === undefined) sessions.set(who, await signIn(context, page, who));
  return page;
}

/** Each person signs in once; later windows carry the same session. */
async function signIn(context: BrowserContext, page: Page, who: DemoPersonKey): Promise<string> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').fill(DEMO_PEOPLE[who].email);
  await page.getByLabel('Password').fill(DEMO_PASSWORD);
  await button(page, 'Sign in').click();
  await page.waitForURL((url) => url.pathname !== '/sign-in');
  return JSON.stringify(await context.storageState());
}

async function shoot(page: Page, name: string): Promise<void> {
  await page.waitForLoadState('networkidle');
  await page.evaluate(() => document.fonts.ready);
  await page.mouse.move(0, 0);
  await page.screenshot({ path: join(FOLDER, `${name}.png`), animations: 'disabled', caret: 'hide' });
  process.stdout.write(`${name}.png\n`);
}

async function toWard(page: Page, ward: string): Promise<void> {
  const { wards } = (await (await page.request.get('/api/me')).json()) as Me;
  await page.goto(`/wards/${wards.find(({ name }) => name === ward)?.id ?? ''}`);
  await page.getByRole('heading', { name: `${ward} ward` }).waitFor();
}

async function toChart(page: Page, ward: string, surname: string): Promise<string> {
  await toWard(page, ward);
  await page
    .getByRole('link', { name: new RegExp(`^${surname}`) })
    .first()
    .click();
  await page.getByRole('heading', { name: 'Weights' }).waitFor();
  return new URL(page.url()).pathname;
}

/** The first order of the child's chart in that state. */
async function toOrder(page: Page, state: RegExp): Promise<void> {
  const row = page.getByRole('table', { name: 'Orders' }).getByRole('row').filter({ hasText: state });
  await row.getByRole('link').first().click();
  await page.waitForURL(/\/(orders|drafts)\//);
}

async function shootWards(booth: Booth): Promise<void> {
  const cold = await openAs(booth, null);
  await cold.goto('/sign-in');
  await shoot(cold, 'sign-in');
  const day = await openAs(booth, 'registrar');
  await toWard(day, 'Heron');
  await shoot(day, 'ward');
  const night = await openAs(booth, 'registrar', { night: true });
  await toWard(night, 'Heron');
  await shoot(night, 'ward-night');
  await toChart(day, 'Heron', 'Hartnoll');
  await shoot(day, 'chart');
}

async function shootOrders(booth: Booth): Promise<void> {
  const page = await openAs(booth, 'junior');
  await toChart(page, 'Heron', 'Hartnoll');
  await toOrder(page, /Draft/);
  await typeInto(page, 'Drug volumes, mL in 24 hours', '0');
  await page.getByRole('row', { name: /^on the pump/ }).waitFor();
  await page.waitForTimeout(1500);
  await shoot(page, 'order-form');
  const draftPath = new URL(page.url()).pathname;

  const phone = await openAs(booth, 'junior', { viewport: PHONE });
  await phone.goto(draftPath);
  await phone.getByRole('heading', { name: 'Maintenance order' }).waitFor();
  await shoot(phone, 'order-form-phone');

  const over = await openAs(booth, 'registrar');
  await toChart(over, 'Heron', 'Brackenbury');
  await toOrder(over, /Draft/);
  await over
    .getByText(/over the brim/)
    .first()
    .waitFor();
  await shoot(over, 'over-the-brim');

  const signed = await openAs(booth, 'registrar');
  await toChart(signed, 'Curlew', 'Sarpong');
  await toOrder(signed, /Running/);
  await signed.getByRole('heading', { name: 'Maintenance order' }).waitFor();
  await shoot(signed, 'signed-order');
}

async function shootChecks(booth: Booth): Promise<void> {
  const page = await openAs(booth, 'registrar');
  await page.goto('/checks');
  await page.getByRole('link', { name: /Ekström/ }).click();
  await page.getByRole('heading', { name: 'Your own figures', exact: true }).waitFor();
  const checkPath = new URL(page.url()).pathname;
  const phone = await openAs(booth, 'registrar', { viewport: PHONE });
  await phone.goto(checkPath);
  await phone.getByRole('heading', { name: 'Your own figures', exact: true }).waitFor();
  await shoot(phone, 'check-phone');

  await typeInto(page, 'Initials', 'LE');
  await pick(page.getByRole('combobox', { name: 'Sex' }), 'Female');
  await page.getByRole('textbox', { name: 'Age', exact: true }).fill('9');
  await pick(page.getByRole('combobox', { name: 'Age in' }), 'years');
  await typeInto(page, 'Dosing weight', '28');
  await pick(page.getByLabel('Where it is from'), 'Read from the scales');
  await typeInto(page, /^Feeds and drinks/, '0');
  await typeInto(page, /^Drugs and other lines/, '0');
  await pick(page.getByRole('combobox', { name: 'Method' }), 'Weight bands, per day');
  await choose(page, 'Fraction of full maintenance', '80%');
  await shoot(page, 'check');
}

async function shootMismatch(booth: Booth): Promise<void> {
  const page = await openAs(booth, 'nurse');
  await toChart(page, 'Curlew', 'Quennell');
  await toOrder(page, /Disputed/);
  const id = new URL(page.url()).pathname.split('/').at(-1) ?? '';
  await page.goto(`/checks/${id}`);
  await page.getByRole('heading', { name: /do not agree/ }).waitFor();
  await shoot(page, 'mismatch');
}

/** The date on the wristband, which the chart has too. */
async function bornOn(page: Page): Promise<string> {
  const id = new URL(page.url()).pathname.split('/').at(-2) ?? '';
  const read = (await (await page.request.get(`/api/versions/${id}/bedside`)).json()) as BedsidePage;
  return read.child.bornOn;
}

async function shootBedside(booth: Booth): Promise<void> {
  const page = await openAs(booth, 'nurse', { viewport: TABLET });
  await toChart(page, 'Heron', 'Moyo');
  await toOrder(page, /Signed/);
  const id = new URL(page.url()).pathname.split('/').at(-1) ?? '';
  await page.goto(`/orders/${id}/bedside`);
  await page.getByRole('heading', { name: /At the bedside/ }).waitFor({ state: 'attached' });
  await page.getByLabel('Hospital no. on the band').fill('SM 398 116');
  await page.getByLabel('Date of birth on the band').fill(await bornOn(page));
  await pick(page.getByLabel('Who said name and date of birth'), 'The child');
  await button(page, 'Compare with the order').click();
  await pick(page.getByLabel('What is printed on the bag'), SALINE_GLUCOSE_K);
  await typeInto(page, 'Bag size', '1000');
  await page.getByLabel('Expires on').fill('2026-12-31');
  await button(page, 'Compare with the order').click();
  await typeInto(page, 'Pump number', 'P 12');
  await typeInto(page, 'Rate the pump shows', '833');
  await typeInto(page, 'Volume the pump shows', '333');
  await button(page, 'Compare with the order').click();
  await page.getByText('Ten times the order.').first().waitFor();
  await page.locator('#step-pump, li').filter({ hasText: 'Pump number' }).first().scrollIntoViewIfNeeded();
  await shoot(page, 'bedside');
  const phone = await openAs(booth, 'nurse', { viewport: PHONE });
  await phone.goto(`/orders/${id}/bedside`);
  await phone.getByRole('heading', { name: /At the bedside/ }).waitFor({ state: 'attached' });
  await shoot(phone, 'bedside-phone');
}

const SCENES = {
  wards: shootWards,
  orders: shootOrders,
  checks: shootChecks,
  mismatch: shootMismatch,
  bedside: shootBedside,
};

async function main(): Promise<void> {
  const baseURL = process.env.PUBLIC_URL;
  if (baseURL === undefined) throw new Error('PUBLIC_URL is not set: run npm run shots.');
  mkdirSync(FOLDER, { recursive: true });
  const browser = await chromium.launch({
    executablePath: CHROMIUM,
    args: ['--disable-gpu', '--disable-quic'],
  });
  try {
    const booth: Booth = { browser, baseURL, sessions: new Map() };
    const wanted = process.argv.slice(2);
    for (const [name, shootScene] of Object.entries(SCENES))
      if (wanted.length === 0 || wanted.includes(name)) await shootScene(booth);
  } finally {
    await browser.close();
  }
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exitCode = 1;
});
