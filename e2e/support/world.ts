import { AxeBuilder } from '@axe-core/playwright';
import {
  test as base,
  expect,
  type APIRequestContext,
  type Browser,
  type BrowserContext,
  type BrowserContextOptions,
  type Page,
} from '@playwright/test';
import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { fixedClock, systemClock } from '../../server/clock';
import { openDatabase, type Database } from '../../server/db/client';
import { inTransaction, type Tx } from '../../server/db/transaction';
import { makeHospital, type MadeHospital } from '../../server/demo/make-hospital';
import { hashPassword } from '../../server/auth/password';
import { CAST, type CastKey } from './cast';
import {
  insertChild,
  insertResults,
  insertWeight,
  type ChildChange,
  type MadeChild,
  type WeightChange,
} from './children';
import { readAppPlace } from './start-app';
import type { AppPlace } from './start-running';

/** Everybody in every story has it. */
export const PASSWORD = 'larch-ferry-48-kestrel';
let passwordHash: Promise<string> | undefined;

export type Mail = { to: string; subject: string; text: string };

/** A hospital of the story's own on a running Brimline, and hands at its screens. */
export type StoryWorld = {
  place: AppPlace;
  hospital: MadeHospital<CastKey>;
  /** A new browser window, signed in as that person; what goes wrong in it fails the story. */
  open(person: CastKey, path?: string): Promise<Page>;
  /** A window where nobody is signed in. */
  openSignedOut(path?: string): Promise<Page>;
  /** Signs a person in within a window that is open. */
  loginAs(context: BrowserContext, person: CastKey): Promise<void>;
  /** That person's session without a page. */
  requestAs(person: CastKey): Promise<APIRequestContext>;
  addChild(change?: ChildChange): Promise<MadeChild>;
  addWeight(childId: string, change: WeightChange): Promise<string>;
  addResults(childId: string, values: Record<string, number>): Promise<void>;
  /** Runs as the owner inside this hospital: to look, and to plant what no screen makes. */
  within<T>(work: (tx: Tx) => Promise<T>): Promise<T>;
  /** What idling does, or the lock of another window. */
  lockSessions(person: CastKey): Promise<void>;
  mail: { waitFor(person: CastKey, subject: string | RegExp): Promise<Mail> };
  /** No breach of WCAG 2.2 A and AA that a program can find. */
  axe(page: Page): Promise<void>;
};

/** A figure of a problem document is a refusal the page shows; the browser's own log of it is no fault. */
const EXPECTED_LOG = /^Failed to load resource: the server responded with a status of 4\d\d/;

/** Collects what a page says on its console and what it throws, reports of the content policy among them. */
function collectFaults(page: Page, faults: string[], ignore: readonly RegExp[]): void {
  page.on('console', (message) => {
    const text = message.text();
    const isFault = message.type() === 'error' || /Content[- ]Security[- ]Policy/i.test(text);
    if (isFault && ![EXPECTED_LOG, ...ignore].some((known) => known.test(text)))
      faults.push(`${page.url()}: ${text}`);
  });
  page.on('pageerror', (error) => faults.push(`${page.url()}: ${error.stack ?? error.message}`));
}

const INSERT_SESSION = `insert into auth.sessions (id, login_id, kind, made_at, idle_until, absolute_until, agent)
  values ($1, $2, 'own', $3::timestamptz, $4::timestamptz, $5::timestamptz, 'Story')`;
const HOUR = 3_600_000;

async function giveSession(owner: Database, context: BrowserContext, baseUrl: string, loginId: string) {
  const secret = randomBytes(20).toString('hex');
  const now = Date.now();
  const at = (ms: number) => new Date(now + ms).toISOString();
  const id = createHash('sha256').update(secret).digest('hex');
  await owner.sql.unsafe(INSERT_SESSION, [id, loginId, at(0), at(HOUR / 4), at(12 * HOUR)]);
  const { port } = new URL(baseUrl);
  await context.addCookies([
    { name: `brimline_session_${port}`, value: secret, url: baseUrl, httpOnly: true, sameSite: 'Strict' },
  ]);
}

async function readMail(place: AppPlace): Promise<Mail[]> {
  const response = await fetch(`${place.mailboxUrl}/messages.json`);
  const { messages } = (await response.json()) as { messages: Mail[] };
  return messages;
}

async function makeStoryHospital(owner: Database): Promise<MadeHospital<CastKey>> {
  passwordHash ??= hashPassword(PASSWORD);
  const run = randomUUID().slice(0, 8);
  const people = Object.fromEntries(
    Object.entries(CAST).map(([key, person]) => [
      key,
      { ...person, email: `${key}.${run}@brimline.example` },
    ]),
  ) as Record<CastKey, (typeof CAST)[CastKey] & { email: string }>;
  return makeHospital<CastKey>(
    { ...owner, clock: fixedClock(Date.now() - 30 * 24 * HOUR) },
    {
      name: `Story Hospital ${run}`,
      zone: 'Europe/London',
      wards: [{ name: 'Heron' }, { name: 'Curlew' }],
      people,
      rulebookBy: ['consultant', 'pharmacist'],
      passwordHash: await passwordHash,
    },
  );
}

type Windows = { contexts: BrowserContext[]; faults: string[]; ignore: readonly RegExp[] };

async function makeStoryWorld(
  place: AppPlace,
  browser: Browser,
  windows: Windows,
  contextOptions: BrowserContextOptions,
): Promise<{ world: StoryWorld; close: () => Promise<void> }> {
  const owner = openDatabase(place.ownerUrl, { max: 2, applicationName: 'story', clock: systemClock });
  const hospital = await makeStoryHospital(owner);
  const within: StoryWorld['within'] = (work) => inTransaction(owner, hospital.id, 'read write', work);
  const scene = { within, hospital };

  const openSignedOut = async (path = '/', person?: CastKey): Promise<Page> => {
    const context = await browser.newContext({ ...contextOptions, baseURL: place.baseUrl });
    windows.contexts.push(context);
    context.on('page', (page) => collectFaults(page, windows.faults, windows.ignore));
    if (person !== undefined) await world.loginAs(context, person);
    const page = await context.newPage();
    await page.goto(path);
    return page;
  };

  const requests = new Map<CastKey, APIRequestContext>();
  const world: StoryWorld = {
    place,
    hospital,
    within,
    open: (person, path = '/') => openSignedOut(path, person),
    openSignedOut: (path) => openSignedOut(path),
    loginAs: (context, person) => giveSession(owner, context, place.baseUrl, hospital.people[person].loginId),
    async requestAs(person) {
      const known = requests.get(person);
      if (known) return known;
      const context = await browser.newContext({ baseURL: place.baseUrl });
      windows.contexts.push(context);
      await world.loginAs(context, person);
      requests.set(person, context.request);
      return context.request;
    },
    async lockSessions(person) {
      const { loginId } = hospital.people[person];
      await owner.sql.unsafe('update auth.sessions set locked_at = now() where login_id = $1', [loginId]);
    },
    addChild: (change) => insertChild(scene, change),
    addWeight: (childId, change) => insertWeight(scene, childId, change),
    addResults: (childId, values) => insertResults(scene, childId, values),
    mail: {
      async waitFor(person, subject) {
        const { email } = hospital.people[person];
        let found: Mail | undefined;
        await expect
          .poll(
            async () => {
              const all = await readMail(place);
              found = all.find(
                (mail) =>
                  mail.to === email &&
                  (typeof subject === 'string' ? mail.subject.includes(subject) : subject.test(mail.subject)),
              );
              return found !== undefined;
            },
            { timeout: 15_000, message: `mail to ${person}: ${String(subject)}` },
          )
          .toBe(true);
        return found!;
      },
    },
    async axe(page) {
      const { violations } = await new AxeBuilder({ page })
        .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
        .analyze();
      const said = violations.map(({ id, help, nodes }) => `${id}: ${help} (${nodes[0]?.html ?? ''})`);
      expect(said, `accessibility of ${page.url()}`).toEqual([]);
    },
  };
  return { world, close: () => owner.close() };
}

type StoryFixtures = {
  place: AppPlace;
  /** Console messages that this story brings about on purpose. */
  expectedFaults: RegExp[];
  world: StoryWorld;
};

type Story = { expectedFaults: readonly RegExp[]; options?: BrowserContextOptions };

/** Gives a story its hospital, closes its windows, and fails it for whatever went wrong in one of them. */
export async function storyWorld(
  place: AppPlace,
  browser: Browser,
  { expectedFaults, options = {} }: Story,
  use: (world: StoryWorld) => Promise<void>,
): Promise<void> {
  const windows: Windows = { contexts: [], faults: [], ignore: expectedFaults };
  const { world, close } = await makeStoryWorld(place, browser, windows, options);
  await use(world);
  await Promise.all(windows.contexts.map((context) => context.close()));
  await close();
  expect(windows.faults, 'faults on the pages of this story').toEqual([]);
}

/** A story: its own hospital, and no fault on any page it opened. */
export const test = base.extend<StoryFixtures>({
  place: async ({}, use) => use(readAppPlace()),
  expectedFaults: [[], { option: true }],
  world: async ({ place, browser, expectedFaults, viewport, locale, timezoneId }, use) =>
    storyWorld(place, browser, { expectedFaults, options: { viewport, locale, timezoneId } }, use),
});

export { expect };
