import { readFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { replaceFile } from './replace-file';

const LOOPBACK = '127.0.0.1';

/** Whether a TCP port of the loopback address can be listened on now. */
export function isFree(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen({ port, host: LOOPBACK, exclusive: true }, () => probe.close(() => resolve(true)));
  });
}

/** A port of the loopback address nobody listens on. */
export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen({ port: 0, host: LOOPBACK }, () => {
      const address = probe.address();
      const port = typeof address === 'object' && address ? address.port : 0;
      probe.close(() => resolve(port));
    });
  });
}

const isPort = (value: unknown): value is number =>
  typeof value === 'number' && Number.isInteger(value) && value > 0 && value < 65_536;

function readPorts(path: string): Record<string, number> {
  try {
    const found = JSON.parse(readFileSync(path, 'utf8')) as Record<string, unknown>;
    return Object.fromEntries(
      Object.entries(found).filter((entry): entry is [string, number] => isPort(entry[1])),
    );
  } catch {
    return {};
  }
}

const memoryPath = (folder: string) => join(folder, 'ports.json');

/** The port remembered under this name, whether free or not. */
export const rememberedPort = (folder: string, name: string): number | undefined =>
  readPorts(memoryPath(folder))[name];

/** Keeps a port for the next start. */
export function rememberPort(folder: string, name: string, port: number): void {
  const path = memoryPath(folder);
  const ports = { ...readPorts(path), [name]: port };
  replaceFile(path, `${JSON.stringify(ports, null, 2)}\n`);
}

/** The remembered port if free, else the preferred one if free, else any free one; remembered. */
export async function choosePort(folder: string, name: string, preferred?: number): Promise<number> {
  for (const port of [rememberedPort(folder, name), preferred]) {
    if (port === undefined || !(await isFree(port))) continue;
    rememberPort(folder, name, port);
    return port;
  }
  const port = await freePort();
  rememberPort(folder, name, port);
  return port;
}
