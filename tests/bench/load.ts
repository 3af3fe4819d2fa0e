import { fork } from 'node:child_process';
import { Agent, request } from 'node:http';
import { performance } from 'node:perf_hooks';
import { fileURLToPath } from 'node:url';

export type Shot = { path: string; method: 'GET' | 'POST'; headers: Record<string, string>; body?: string };
/** Shots are fired over and over for `ms`, or each once where it is absent. */
export type Order = { origin: string; shots: Shot[]; connections: number; ms?: number };
export type Report = { perSecond: number; latencies: number[]; failures: string[] };

/** The generator is a process of its own, so that its work is not the server's. */
export class Generator {
  readonly #child = fork(fileURLToPath(import.meta.url), [], { execArgv: ['--import', 'tsx'] });

  fire(order: Order): Promise<Report> {
    return new Promise((done, failed) => {
      const gone = () => failed(new Error('the load generator ended'));
      this.#child.once('exit', gone);
      this.#child.once('message', (report) => {
        this.#child.off('exit', gone);
        done(report as Report);
      });
      this.#child.send(order);
    });
  }

  stop(): void {
    this.#child.removeAllListeners('exit');
    this.#child.kill();
  }
}

function once(agent: Agent, origin: string, shot: Shot): Promise<{ status: number; text: string }> {
  return new Promise((done, failed) => {
    const sent = request(`${origin}${shot.path}`, { agent, method: shot.method, headers: shot.headers });
    sent.once('error', failed);
    sent.once('response', (response) => {
      const parts: Buffer[] = [];
      response.on('data', (part: Buffer) => parts.push(part));
      response.once('end', () =>
        done({ status: response.statusCode ?? 0, text: Buffer.concat(parts).toString() }),
      );
    });
    sent.end(shot.body);
  });
}

async function carryOut({ origin, shots, connections, ms }: Order): Promise<Report> {
  const agent = new Agent({ keepAlive: true, maxSockets: connections });
  const latencies: number[] = [];
  const failures: string[] = [];
  const began = performance.now();
  let next = 0;
  const mayGoOn = () => (ms === undefined ? next < shots.length : performance.now() - began < ms);
  const gun = async () => {
    while (mayGoOn()) {
      const shot = shots[next % shots.length]!;
      next += 1;
      const fired = performance.now();
      const { status, text } = await once(agent, origin, shot);
      latencies.push(performance.now() - fired);
      if (status !== 200) failures.push(`${status} ${text.slice(0, 300)}`);
    }
  };
  await Promise.all(Array.from({ length: connections }, gun));
  const seconds = (performance.now() - began) / 1000;
  agent.destroy();
  return { perSecond: latencies.length / seconds, latencies, failures };
}

if (process.argv[1] === fileURLToPath(import.meta.url) && process.send !== undefined) {
  process.on('message', (order) => {
    void carryOut(order as Order).then((report) => process.send?.(report));
  });
}
