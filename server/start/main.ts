import { makeStops } from './stops';
import type { Stops } from './stops';
import { Told } from './tell';

/** A mode does its work and gives the exit code; what must be closed at the end goes to `stops`. */
export type Mode = (stops: Stops, args: readonly string[]) => Promise<number>;

const MODES: Readonly<Record<string, () => Promise<Mode>>> = {
  demo: async () => (await import('./modes/demo')).demo,
  dev: async () => (await import('./modes/dev')).dev,
  test: async () => (await import('./modes/test')).test,
  fresh: async () => (await import('./modes/fresh')).fresh,
  'ledger-verify': async () => (await import('./modes/ledger-verify')).ledgerVerify,
  bench: async () => (await import('./modes/bench')).bench,
  shots: async () => (await import('./modes/shots')).shots,
};

function report(error: unknown): void {
  if (error instanceof Told) process.stderr.write(`${error.message}\n`);
  else process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
}

/** Modes that run until someone stops them: being stopped is their good end. */
const ENDLESS = new Set(['demo', 'dev']);

async function main(name: string, args: readonly string[]): Promise<never> {
  let isLeaving = false;
  const reportOnce = (error: unknown) => {
    // what is being stopped complains of being stopped
    if (!isLeaving) report(error);
  };
  const stops = makeStops(report);
  const leave = async (code: number): Promise<never> => {
    if (isLeaving) return new Promise<never>(() => undefined);
    isLeaving = true;
    await stops.stopAll();
    process.exit(code);
  };
  const stopped = (code: number) => void leave(ENDLESS.has(name) ? 0 : code);
  process.on('SIGINT', () => stopped(130));
  process.on('SIGTERM', () => stopped(143));
  process.on('SIGHUP', () => stopped(129));
  // the process above was killed without a word
  process.on('disconnect', () => stopped(1));

  const load = MODES[name];
  if (!load) {
    process.stderr.write(`"${name}" is no mode; there are ${Object.keys(MODES).join(', ')}.\n`);
    return leave(2);
  }
  try {
    const mode = await load();
    return await leave(await mode(stops, args));
  } catch (error) {
    reportOnce(error);
    return leave(1);
  }
}

const [name = 'demo', ...args] = process.argv.slice(2);
await main(name, args);
