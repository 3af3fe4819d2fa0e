import { rmSync } from 'node:fs';
import { join } from 'node:path';
import { run } from './children';
import { fingerprint, isFresh, writeStamp } from './fingerprint';
import { waitForLock } from './lock.mjs';
import { root } from './paths';
import { say, Told } from './tell';

const BUILD_MINUTES = 5;

type Product = {
  name: string;
  sources: readonly string[];
  stamp: string;
  product: string;
  make(): Promise<void>;
};

/** Packages and compiler settings go into everything. */
const COMMON = ['shared', 'package-lock.json', 'tsconfig.json', 'vite.config.ts'];

async function buildClient(): Promise<void> {
  const vite = join(root, 'node_modules/vite/bin/vite.js');
  // a development build of React would come out under any other NODE_ENV
  const env = { ...process.env, NODE_ENV: 'production' };
  const built = await run(process.execPath, [vite, 'build', '--logLevel', 'warn'], { cwd: root, env });
  if (built.code !== 0) throw new Told(`The client does not build.\n${built.stdout}${built.stderr}`);
}

async function buildServer(): Promise<void> {
  const { build, formatMessages } = await import('esbuild');
  const outcome = await build({
    absWorkingDir: root,
    entryPoints: ['server/main.ts'],
    outfile: 'dist/server/main.js',
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    packages: 'external',
    alias: { '@shared': join(root, 'shared') },
    sourcemap: true,
    logLevel: 'silent',
  }).catch(async (error: Error & { errors?: Parameters<typeof formatMessages>[0] }) => {
    const lines = await formatMessages(error.errors ?? [], { kind: 'error' });
    throw new Told(`The server does not build.\n${lines.length > 0 ? lines.join('') : error.message}`);
  });
  for (const warning of await formatMessages(outcome.warnings, { kind: 'warning' })) say(warning);
}

const PRODUCTS: readonly Product[] = [
  {
    name: 'client',
    sources: [...COMMON, 'src', 'index.html'],
    stamp: join(root, 'dist/.client-stamp'),
    product: join(root, 'dist/web/index.html'),
    make: buildClient,
  },
  {
    name: 'server',
    sources: [...COMMON, 'server'],
    stamp: join(root, 'dist/.server-stamp'),
    product: join(root, 'dist/server/main.js'),
    make: buildServer,
  },
];

async function ensureProduct(part: Product): Promise<void> {
  const print = fingerprint(root, part.sources);
  if (isFresh(part.stamp, print, part.product)) return;
  say(`Building the ${part.name} …`);
  rmSync(part.stamp, { force: true });
  await part.make();
  writeStamp(part.stamp, print);
}

/** Builds client and server into `dist/` where their sources have changed. Throws Told with the compiler's words. */
export async function ensureBuilt(): Promise<void> {
  const lock = await waitForLock(join(root, '.state/build.lock'), {
    timeoutMs: BUILD_MINUTES * 60_000,
    onWait: (holder) => say(`Process ${holder.pid} is building; waiting.`),
  });
  try {
    for (const part of PRODUCTS) await ensureProduct(part);
  } finally {
    lock.release();
  }
}
