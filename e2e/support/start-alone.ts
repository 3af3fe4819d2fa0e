import { test as base } from '@playwright/test';
import { startRunning } from './start-running';
import type { RunningApp } from './start-running';

export type AloneFixtures = { alone: RunningApp; serverChanges: NodeJS.ProcessEnv };

/**
 * For stories in `e2e/stories/alone`, which restart PostgreSQL, kill the server or take the mail away:
 * each gets a Brimline and a cluster of its own. `test.use({ serverChanges: { … } })` changes the
 * server's settings.
 */
export const test = base.extend<AloneFixtures>({
  serverChanges: [{}, { option: true }],
  alone: async ({ serverChanges }, use) => {
    const app = await startRunning(serverChanges);
    await use(app);
    await app.stop();
  },
  baseURL: async ({ alone }, use) => use(alone.place.baseUrl),
});
