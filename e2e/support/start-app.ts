import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { removeAbandoned } from '../../server/start/test-cluster';
import { startRunning } from './start-running';
import type { AppPlace } from './start-running';

/** Playwright's global set-up: one Brimline for all stories but those in `alone`. */
export default async function startApp(): Promise<() => Promise<void>> {
  await removeAbandoned();
  const app = await startRunning();
  const file = join(app.folder, 'env.json');
  writeFileSync(file, JSON.stringify(app.place), { mode: 0o600 });
  // the workers inherit both
  process.env.BRIMLINE_E2E_ENV = file;
  process.env.BRIMLINE_E2E_URL = app.place.baseUrl;
  return () => app.stop();
}

/** Where the shared Brimline of the stories is. */
export function readAppPlace(): AppPlace {
  const file = process.env.BRIMLINE_E2E_ENV;
  if (file === undefined) throw new Error('BRIMLINE_E2E_ENV is not set: run the stories through Playwright.');
  return JSON.parse(readFileSync(file, 'utf8')) as AppPlace;
}
