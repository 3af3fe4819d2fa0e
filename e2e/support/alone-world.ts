import { createServer } from 'node:net';
import { startSmtpFake, type SmtpFake } from '../../server/mail/smtp-fake';
import { test as base } from './start-alone';
import { storyWorld, type StoryWorld } from './world';

type Fixtures = { expectedFaults: RegExp[]; world: StoryWorld };

/** A story on a Brimline of its own, which it may break: `alone` is the program, `world` the hospital in it. */
export const test = base.extend<Fixtures>({
  expectedFaults: [[], { option: true }],
  world: async ({ alone, browser, expectedFaults, viewport, locale, timezoneId }, use) =>
    storyWorld(alone.place, browser, { expectedFaults, options: { viewport, locale, timezoneId } }, use),
});

const freePort = (): Promise<number> =>
  new Promise((found) => {
    const probe = createServer().listen(0, '127.0.0.1', () => {
      const address = probe.address();
      const port = typeof address === 'object' && address !== null ? address.port : 0;
      probe.close(() => found(port));
    });
  });

/** A mail server that is down until the story starts it. */
export type PostOffice = { port: number; open(): Promise<SmtpFake> };

/** With mail by a server outside the program, which nobody has started yet. */
export const testWithPost = test.extend<{ post: PostOffice }>({
  post: async ({}, use) => {
    const port = await freePort();
    let fake: SmtpFake | undefined;
    await use({
      port,
      open: async () => (fake = await startSmtpFake(port)),
    });
    await fake?.stop();
  },
  serverChanges: async ({ post }, use) =>
    use({ BRIMLINE_MAILBOX: '', SMTP_URL: `smtp://127.0.0.1:${post.port}` }),
});

export { expect } from '@playwright/test';
