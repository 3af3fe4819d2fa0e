import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { ensureBuilt } from '../build';
import { startChild } from '../children';
import { ensureTestPrograms } from '../chromium';
import { root } from '../paths';
import { removeCluster } from '../postgres';
import { ensurePostgres } from '../postgres-programs';
import type { Stops } from '../stops';
import { say, Told } from '../tell';
import { ownTestFolder, removeAbandoned } from '../test-cluster';
import {
  closingLine,
  exitCode,
  ONE_FAILED,
  sum,
  tallyCheck,
  tallyPlaywright,
  tallyVitest,
} from '../test-results';
import type { Tally } from '../test-results';

const PARTS = ['types', 'lint', 'unit', 'client', 'server', 'e2e'] as const;
type Part = (typeof PARTS)[number];

type Run = { stops: Stops; folder: string };

const isPart = (name: string): name is Part => (PARTS as readonly string[]).includes(name);

function readReport(path: string): string | null {
  try {
    return readFileSync(path, 'utf8');
  } catch {
    return null;
  }
}

/** Runs a command of the test set in its own process group and gives its exit code. */
async function step({ stops }: Run, command: string, args: readonly string[], env: NodeJS.ProcessEnv = {}) {
  const child = startChild(command, args, { cwd: root, env: { ...process.env, ...env } });
  stops.onStop(() => child.stop());
  return child.exited;
}

/** What a part needs from the machine; in words when it cannot be had. */
async function preparePart(part: Part): Promise<void> {
  if (part === 'server' || part === 'e2e') {
    await ensurePostgres();
    await ensureTestPrograms(part === 'e2e' ? ['chromium', 'pdftotext'] : ['pdftotext']);
  }
}

async function runVitest(run: Run, projects: readonly Part[]): Promise<Tally> {
  const report = join(run.folder, 'vitest.json');
  const args = projects.flatMap((project) => ['--project', project]);
  const code = await step(
    run,
    process.execPath,
    [
      'node_modules/vitest/vitest.mjs',
      'run',
      ...args,
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${report}`,
    ],
    { NODE_ENV: 'test' },
  );
  return tallyVitest(readReport(report), code);
}

async function runStories(run: Run): Promise<Tally> {
  await ensureBuilt();
  const report = join(run.folder, 'playwright.json');
  const code = await step(run, process.execPath, ['node_modules/@playwright/test/cli.js', 'test'], {
    NODE_ENV: 'test',
    BRIMLINE_E2E_REPORT: report,
  });
  return tallyPlaywright(readReport(report), code);
}

const tellFailure = (error: unknown) =>
  say(error instanceof Told ? error.message : String(error instanceof Error ? error.stack : error));

/** Runs one step under a heading. What goes wrong outside its tests is told and counts as one failure. */
async function under(heading: string, work: () => Promise<Tally>): Promise<Tally> {
  say(`\n── ${heading}`);
  try {
    return await work();
  } catch (error) {
    tellFailure(error);
    return ONE_FAILED;
  }
}

async function canPrepare(part: Part): Promise<boolean> {
  try {
    await preparePart(part);
    return true;
  } catch (error) {
    say(`\n── ${part}`);
    tellFailure(error);
    return false;
  }
}

async function runParts(run: Run, wanted: readonly Part[]): Promise<Tally> {
  const tallies: Tally[] = [];
  const check = (script: string) => async () => tallyCheck(await step(run, 'npm', ['run', '-s', script]));
  if (wanted.includes('types')) tallies.push(await under('types', check('types')));
  if (wanted.includes('lint')) tallies.push(await under('lint', check('lint')));

  const projects: Part[] = [];
  for (const part of ['unit', 'client', 'server'] as const) {
    if (!wanted.includes(part)) continue;
    if (await canPrepare(part)) projects.push(part);
    else tallies.push(ONE_FAILED);
  }
  if (projects.length > 0) tallies.push(await under(projects.join(', '), () => runVitest(run, projects)));

  if (wanted.includes('e2e')) {
    tallies.push(
      await under('browser stories', async () => {
        await preparePart('e2e');
        return runStories(run);
      }),
    );
  }
  return sum(tallies);
}

/** `npm test`: every part, or those named; the last line is the sum of all. */
export async function test(stops: Stops, args: readonly string[]): Promise<number> {
  const unknown = args.filter((name) => !isPart(name));
  if (unknown.length > 0)
    throw new Told(`No part "${unknown.join(' ')}" in the tests; there are ${PARTS.join(', ')}.`);
  await removeAbandoned();
  const folder = await ownTestFolder();
  // also clears what a killed child process left
  stops.onStop(async () => {
    await removeCluster(`test-${process.pid}`);
    await removeAbandoned();
  });
  const named = args.filter(isPart);
  const tally = await runParts({ stops, folder }, named.length > 0 ? named : PARTS);
  say(`\n${closingLine(tally)}`);
  return exitCode(tally);
}
