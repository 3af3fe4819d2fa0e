import { spawn } from 'node:child_process';
import { setTimeout as sleep } from 'node:timers/promises';
import { isAlive, processFacts } from './lock.mjs';
import type { ProcessFacts } from './lock.mjs';

const LEFT_OVER_MS = 5000;

export type Ran = { code: number; stdout: string; stderr: string };

export type RunOptions = {
  input?: string;
  env?: NodeJS.ProcessEnv;
  cwd?: string;
  uid?: number;
  gid?: number;
};

/** Runs a command to its end and gives what it wrote; a code other than 0 is a value, not a throw. */
export function run(command: string, args: readonly string[], options: RunOptions = {}): Promise<Ran> {
  const { input, ...rest } = options;
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { ...rest, stdio: ['pipe', 'pipe', 'pipe'] });
    let stdout = '';
    let stderr = '';
    child.stdout.setEncoding('utf8').on('data', (text: string) => (stdout += text));
    child.stderr.setEncoding('utf8').on('data', (text: string) => (stderr += text));
    // a command that ends without reading its input is judged by its code
    child.stdin.on('error', () => undefined);
    child.stdin.end(input ?? '');
    child.on('error', reject);
    child.on('close', (code) => resolve({ code: code ?? 1, stdout, stderr }));
  });
}

/** A long-running process in a process group of its own, so that its own children end with it. */
export type Child = {
  pid: number;
  facts: ProcessFacts;
  /** Resolves with the exit code, 1 after a signal. */
  exited: Promise<number>;
  hasExited(): boolean;
  /** Asks with SIGTERM, insists with SIGKILL after `graceMs` (0: kills at once); the second call waits for the first. */
  stop(graceMs?: number): Promise<void>;
};

function signalGroup(pid: number, signal: NodeJS.Signals): void {
  try {
    process.kill(-pid, signal);
  } catch {
    // already gone
  }
}

export type ChildOptions = { env?: NodeJS.ProcessEnv; cwd?: string; quiet?: boolean };

/** Starts a process in its own group; its words go to our terminal unless `quiet`. */
export function startChild(command: string, args: readonly string[], options: ChildOptions = {}): Child {
  const { quiet, ...rest } = options;
  const out = quiet ? 'ignore' : 'inherit';
  const spawned = spawn(command, args, {
    ...rest,
    detached: true,
    stdio: ['ignore', out, quiet ? 'ignore' : 'inherit'],
  });
  let gone = false;
  const exited = new Promise<number>((resolve) => {
    const end = (code: number) => {
      gone = true;
      resolve(code);
    };
    spawned.on('exit', (code) => end(code ?? 1));
    spawned.on('error', () => end(1));
  });
  // 0 would name our own group
  const pid = spawned.pid ?? -1;
  let stopping: Promise<void> | undefined;
  const stop = async (graceMs: number) => {
    if (gone || pid <= 0) return;
    if (graceMs > 0) signalGroup(pid, 'SIGTERM');
    const timer = setTimeout(() => signalGroup(pid, 'SIGKILL'), graceMs);
    await exited;
    clearTimeout(timer);
  };
  return {
    pid,
    facts: processFacts(pid),
    exited,
    hasExited: () => gone,
    stop: (graceMs = 10_000) => (stopping ??= stop(graceMs)),
  };
}

/** Ends the process groups a killed start program left behind, if they are still the same processes. */
export async function endLeftOvers(left: readonly ProcessFacts[]): Promise<void> {
  const living = () => left.filter((child) => child.pid > 1 && isAlive(child));
  for (const child of living()) signalGroup(child.pid, 'SIGTERM');
  const until = Date.now() + LEFT_OVER_MS;
  while (living().length > 0 && Date.now() < until) await sleep(50);
  for (const child of living()) signalGroup(child.pid, 'SIGKILL');
}
