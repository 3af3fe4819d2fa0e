import type { Page } from '@playwright/test';
import { draftByApi, signByApi, signedOrder } from '../support/signed-order';
import { expect, test, type StoryWorld } from '../support/world';

type Sight = [path: string, heading: string | RegExp];

/** Day and night on a desk, day on a phone: no breach of WCAG 2.2 AA, and no sideways scrolling anywhere. */
async function look(world: StoryWorld, page: Page, sights: readonly Sight[]): Promise<void> {
  for (const [path, heading] of sights) {
    for (const [width, colorScheme] of [
      [1440, 'light'],
      [1440, 'dark'],
      [390, 'light'],
    ] as const) {
      await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
      await page.setViewportSize({ width, height: 900 });
      if (new URL(page.url()).pathname !== path) await page.goto(path);
      await expect(page.getByRole('heading', { name: heading }).first()).toBeVisible();
      await world.axe(page);
      const over = await page.evaluate(
        () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
      );
      expect(over, `sideways scrolling of ${path} at ${width}`).toBeLessThanOrEqual(0);
    }
  }
}

test('the prescriber’s pages keep to WCAG 2.2 AA and fit a phone', async ({ world }) => {
  const child = await world.addChild();
  await world.addResults(child.id, { sodium: 138, potassium: 4.1 });
  const draft = await draftByApi(world, child);
  const waiting = await draftByApi(world, child);
  await signByApi(world, waiting);
  const page = await world.open('doctor');
  await look(world, page, [
    [`/wards/${world.hospital.wards.Heron}`, 'Heron ward'],
    [`/children/${child.id}`, 'Fluids'],
    [`/drafts/${draft}`, 'Maintenance order'],
    [`/orders/${waiting}`, 'Maintenance order'],
  ]);
});

test('the checker’s and the nurse’s pages keep to WCAG 2.2 AA and fit a phone', async ({ world }) => {
  const child = await world.addChild();
  await world.addResults(child.id, { sodium: 138, potassium: 4.1 });
  const waiting = await draftByApi(world, child);
  await signByApi(world, waiting);
  const signed = await signedOrder(world, child);
  await look(world, await world.open('otherChecker'), [
    ['/checks', 'My checks'],
    [`/checks/${waiting}`, 'Your own figures'],
  ]);
  await look(world, await world.open('nurse'), [
    [`/orders/${signed}/bedside`, /At the bedside/],
    [`/orders/${signed}`, 'Maintenance order'],
  ]);
});

test('sign-in, finding, registering and the account keep to WCAG 2.2 AA and fit a phone', async ({
  world,
}) => {
  const child = await world.addChild();
  await look(world, await world.openSignedOut('/sign-in'), [['/sign-in', 'Sign in']]);
  await look(world, await world.open('nurse'), [
    ['/children', 'Find a child'],
    ['/children/new', 'Register a child'],
    ['/account', 'Orla Finchampton'],
    [`/children/${child.id}/given`, 'Given in an emergency'],
  ]);
});
