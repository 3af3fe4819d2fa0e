import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { setTimeout as sleep } from 'node:timers/promises';
import { median, round, tell } from './interleave';

/** One `npm start` of the demo from nothing running to the first page's bytes, seconds. */
async function startOnce(): Promise<number> {
  const started = performance.now();
  const child = spawn(process.execPath, ['server/start/start.mjs'], {
    stdio: ['ignore', 'pipe', 'inherit'],
    env: { ...process.env, DATABASE_URL: '', DATABASE_OWNER_URL: '', SMTP_URL: '', PORT: '', PUBLIC_URL: '' },
  });
  let said = '';
  let seconds = 0;
  for await (const chunk of child.stdout) {
    said += String(chunk);
    const address = /http:\/\/127\.0\.0\.1:\d+/.exec(said)?.[0];
    if (!address) continue;
    const page = await fetch(address);
    await page.text();
    seconds = (performance.now() - started) / 1000;
    break;
  }
  // a start beside a running demo only tells its address and ends
  await sleep(500);
  if (child.exitCode !== null)
    throw new Error(`no start of its own, is the demo running? ${said.slice(-400)}`);
  child.kill('SIGTERM');
  await once(child, 'exit');
  if (seconds === 0) throw new Error(`the demo did not start: ${said.slice(-400)}`);
  return seconds;
}

/** Second start to first page; the first of the runs may install, build and seed and does not count. */
export async function benchStart(): Promise<void> {
  await startOnce();
  const runs: number[] = [];
  for (let i = 0; i < 5; i += 1) runs.push(await startOnce());
  tell(
    'second start to first page',
    `${round(median(runs))} s (${runs.map((run) => round(run, 2)).join(', ')})`,
    '≤ 4 s',
  );
}
