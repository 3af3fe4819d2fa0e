import { defineConfig } from '@playwright/test';
import { CHROMIUM } from './server/start/chromium';

const report = process.env.BRIMLINE_E2E_REPORT;

export default defineConfig({
  testDir: 'e2e/stories',
  outputDir: 'test-results',
  globalSetup: './e2e/support/start-app.ts',
  // every story makes its own hospital, so two run side by side on one server
  workers: 2,
  forbidOnly: report !== undefined,
  timeout: 90_000,
  expect: { timeout: 10_000 },
  reporter: report ? [['list'], ['json', { outputFile: report }]] : [['list']],
  use: {
    // set by the global set-up, before the workers read this file
    baseURL: process.env.BRIMLINE_E2E_URL,
    locale: 'en-GB',
    timezoneId: 'Europe/London',
    viewport: { width: 1440, height: 900 },
    trace: 'off',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: CHROMIUM,
      args: [
        '--disable-gpu',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
  projects: [
    { name: 'stories', testIgnore: 'alone/**' },
    // each of these starts, and breaks, a Brimline of its own
    { name: 'alone', testMatch: 'alone/**/*.spec.ts', workers: 1 },
  ],
});
