import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import type { AddressInfo, Server } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { choosePort, freePort, isFree, rememberedPort, rememberPort } from '../../server/start/ports';

let folder: string;
let taken: Server;
let takenPort: number;
beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), 'brimline-ports-'));
  taken = createServer();
  await new Promise<void>((resolve) => taken.listen(0, '127.0.0.1', resolve));
  takenPort = (taken.address() as AddressInfo).port;
});
afterEach(async () => {
  await new Promise((resolve) => taken.close(resolve));
  rmSync(folder, { recursive: true, force: true });
});

it('tells a free port from a taken one', async () => {
  expect(await isFree(takenPort)).toBe(false);
  expect(await isFree(await freePort())).toBe(true);
});

it('takes the remembered port before the preferred one', async () => {
  const [remembered, preferred] = [await freePort(), await freePort()];
  rememberPort(folder, 'http', remembered);
  expect(await choosePort(folder, 'http', preferred)).toBe(remembered);
});

it('takes the preferred port the first time and remembers it', async () => {
  const preferred = await freePort();
  expect(await choosePort(folder, 'http', preferred)).toBe(preferred);
  expect(rememberedPort(folder, 'http')).toBe(preferred);
});

it('takes another port when both are in use, and remembers that', async () => {
  rememberPort(folder, 'http', takenPort);
  const port = await choosePort(folder, 'http', takenPort);
  expect(port).not.toBe(takenPort);
  expect(rememberedPort(folder, 'http')).toBe(port);
});

it('keeps the ports of other names', () => {
  rememberPort(folder, 'http', 4480);
  rememberPort(folder, 'postgres', 40_001);
  expect(rememberedPort(folder, 'http')).toBe(4480);
  expect(rememberedPort(folder, 'postgres')).toBe(40_001);
});

it.each(['not json', '{"http":"4480"}', '{"http":0}', '{"http":70000}', '{"http":44.5}', 'null'])(
  'remembers nothing from a spoilt memory: %s',
  (text) => {
    writeFileSync(join(folder, 'ports.json'), text);
    expect(rememberedPort(folder, 'http')).toBeUndefined();
  },
);
