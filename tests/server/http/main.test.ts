import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { createServer, type AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import { afterEach, describe, expect, it } from 'vitest';
import { emptyDatabase, freshDatabase } from '../support/database';

const root = fileURLToPath(new URL('../../..', import.meta.url));
const fresh = await freshDatabase();
const empty = await emptyDatabase();
const started: ChildProcess[] = [];
afterEach(() => {
  for (const child of started.splice(0)) if (child.exitCode === null) child.kill('SIGKILL');
});

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  server.close();
  await once(server, 'close');
  return port;
}

async function start(change: Record<string, string | undefined> = {}) {
  const port = await freePort();
  const address = `http://127.0.0.1:${port}`;
  const env = {
    PATH: process.env.PATH,
    NODE_ENV: 'test',
    PORT: String(port),
    PUBLIC_URL: address,
    DATABASE_URL: fresh.appUrl,
    LOG_LEVEL: 'warn',
    BRIMLINE_MAILBOX: '1',
    ...change,
  } as unknown as NodeJS.ProcessEnv;
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], { cwd: root, env });
  started.push(child);
  let said = '';
  child.stdout.on('data', (text: Buffer) => (said += text.toString()));
  child.stderr.on('data', (text: Buffer) => (said += text.toString()));
  return { child, address, said: () => said };
}

const ended = async (child: ChildProcess): Promise<number | null> => {
  if (child.exitCode === null) await once(child, 'exit');
  return child.exitCode;
};

describe('the server program', () => {
  it('answers, shows its mailbox, and stops of itself on SIGTERM', async () => {
    const { child, address } = await start();
    const answer = async (path: string) => fetch(`${address}${path}`).catch(() => undefined);
    await expect.poll(async () => (await answer('/api/health'))?.status, { timeout: 25_000 }).toBe(200);
    expect(await (await answer('/api/health'))!.json()).toEqual({ ok: true, database: true });
    expect((await answer('/mailbox'))?.status).toBe(200);
    child.kill('SIGTERM');
    expect(await ended(child)).toBe(0);
  }, 40_000);

  it.each([
    ['the owner’s login', () => ({ DATABASE_URL: fresh.ownerUrl }), 'not safe to run with'],
    ['a database without schema', () => ({ DATABASE_URL: empty.appUrl }), 'run the migrations'],
    ['no public address', () => ({ PUBLIC_URL: undefined }), 'PUBLIC_URL'],
  ])(
    'refuses to start with %s, and says why',
    async (_name, change, words) => {
      const { child, said } = await start(change());
      expect(await ended(child)).toBe(1);
      expect(said()).toContain(words);
    },
    40_000,
  );
});
