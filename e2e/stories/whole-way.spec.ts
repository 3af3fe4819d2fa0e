import { execFileSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { countHands, keepCount } from '../support/count-hands';
import { expect, PASSWORD, test } from '../support/world';
import {
  compareBedside,
  fillCheck,
  fillMaintenance,
  lockIn,
  openChart,
  signAndAsk,
  signCheck,
  timelineLine,
} from '../support/hands';
import { button } from '../support/words';

/** Figures and names a checker must not meet before lock-in. */
const AUTHORS = ['44 mL/h', '1056', 'Imogen Valehart', '80% of'];

function textOf(pdf: Buffer): string {
  const folder = mkdtempSync(join(tmpdir(), 'story-paper-'));
  const file = join(folder, 'order.pdf');
  writeFileSync(file, pdf);
  return execFileSync('pdftotext', ['-layout', file, '-'], { encoding: 'utf8' });
}

test('a weight becomes a signed, printed, running order through a blind check', async ({ world }) => {
  const child = await world.addChild();
  await world.addResults(child.id, { sodium: 138, potassium: 4.1 });

  const author = await world.open('doctor', `/wards/${world.hospital.wards.Heron}`);
  await openChart(author, child);
  const orderHands = await countHands(author.context());
  await button(author, 'Draft maintenance fluids').click();
  await expect(author.getByRole('heading', { name: 'Maintenance order' })).toBeVisible();
  await fillMaintenance(author, {});
  await expect(author.getByRole('row', { name: /^on the pump/ })).toContainText('44');
  const versionId = await signAndAsk(author, 'Tobias Rennick');
  const orderSeconds = keepCount('maintenance order', orderHands());
  expect(orderSeconds).toBeLessThan(60);

  const mail = await world.mail.waitFor('checker', 'waits for your check');
  // the code, the due time and the link may hold any digits
  const letter = `${mail.subject} ${mail.text}`.replaceAll(/BL-\d+-\d+|^Due: .*$|https?:\S+/gm, '');
  for (const told of ['Hartnoll', 'Edie', 'Sodium', '44', '1056', '16.4', 'Valehart'])
    expect(letter).not.toContain(told);
  const link = /https?:\S+/.exec(mail.text)?.[0] ?? '';
  expect(new URL(link).pathname).toBe(`/checks/${versionId}`);

  const checker = await world.openSignedOut(link);
  await checker.getByLabel('E-mail address').fill(world.hospital.people.checker.email);
  await checker.getByLabel('Password').fill(PASSWORD);
  await button(checker, 'Sign in').click();
  await expect(checker.getByRole('heading', { name: 'Your own figures', exact: true })).toBeVisible();
  const shown = await checker.locator('body').innerText();
  for (const figure of AUTHORS) expect(shown).not.toContain(figure);

  const checkHands = await countHands(checker.context());
  await fillCheck(checker);
  await lockIn(checker);
  await expect(checker.getByRole('heading', { name: 'Both sets agree' })).toBeVisible();
  await expect(checker.getByText('Imogen Valehart').first()).toBeVisible();
  await signCheck(checker);
  await expect(checker.getByText('signed').first()).toBeVisible();
  expect(keepCount('independent check', checkHands())).toBeLessThan(60);

  await author.reload();
  await expect(author.locator('main').getByText('Signed', { exact: true }).first()).toBeVisible();
  await expect(timelineLine(author, 'Checked and signed')).toBeVisible();
  await world.mail.waitFor('doctor', 'An order is signed');

  const [paper] = await Promise.all([
    author.waitForResponse((response) => response.url().includes('/prints') && response.status() === 200),
    button(author, 'Print').click(),
  ]);
  const { href } = (await paper.json()) as { href: string };
  const pdf = await author.request.get(href);
  expect(pdf.headers()['content-type']).toContain('application/pdf');
  const text = textOf(await pdf.body());
  for (const printed of ['Hartnoll', '44', 'Imogen Valehart', 'Tobias Rennick'])
    expect(text).toContain(printed);
  expect(text).not.toContain('NOT VALID');

  const nurse = await world.open('nurse', `/orders/${versionId}/bedside`);
  await compareBedside(nurse, child, {
    fluid: 'Sodium chloride 0.9% + glucose 5% + potassium chloride 20 mmol/L',
    rate: '44',
    volume: '176',
  });
  await button(nurse, 'Record start').click();
  await expect(nurse.getByText('Running').first()).toBeVisible();

  await author.reload();
  await expect(author.locator('main').getByText('Running').first()).toBeVisible();
  await expect(timelineLine(author, /^.*Started/).first()).toBeVisible();
});
