import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ensureBuilt } from '../build';
import { ensureTestPrograms } from '../chromium';
import { startChild } from '../children';
import { remakeDatabase, seed } from '../demo-data';
import { root, stateFolder } from '../paths';
import { choosePort } from '../ports';
import { startCluster } from '../postgres';
import { holdPurpose } from '../purpose-lock';
import { BUNDLED, serve } from '../serve';
import { privateSettings } from '../settings';
import type { Stops } from '../stops';
import { Told } from '../tell';

/** The pictures' moment: always the same, so that two runs differ only where the program does. */
const FROZEN_AT = '2026-06-10T10:20:00.000Z';

/** `npm run shots`: pictures of every screen from the running program with its clock standing still. */
export async function shots(stops: Stops, args: readonly string[]): Promise<number> {
  const held = await holdPurpose('shots', stops);
  if (!held.taken) throw new Told(`Process ${held.holder.pid} is taking pictures already.`);
  await ensureTestPrograms(['chromium']);
  const cluster = await stops.track(startCluster('shots'), (started) => started.stop());
  const now = Number(process.env.BRIMLINE_SHOTS_AT ?? Date.parse(FROZEN_AT));
  await remakeDatabase(cluster);
  await seed(cluster, now);
  await ensureBuilt();

  const folder = stateFolder('shots');
  const clockFile = join(folder, 'clock');
  writeFileSync(clockFile, String(now));
  const port = await choosePort(folder, 'http');
  const env = {
    ...privateSettings(cluster, { nodeEnv: 'test', port }),
    BRIMLINE_CLOCK_FILE: clockFile,
    BRIMLINE_SHOTS_AT: String(now),
  };
  await stops.track(serve(BUNDLED, env), (started) => started.stop());
  const child = startChild(process.execPath, ['--import', 'tsx', 'e2e/screenshots/run.ts', ...args], {
    cwd: root,
    env,
  });
  stops.onStop(() => child.stop());
  return child.exited;
}
