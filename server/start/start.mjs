/*
 * What `npm start`, `npm test` and the others run. Plain JavaScript with Node's own modules only, as it
 * comes before the packages: it installs them if needed and hands over to main.ts.
 */
import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { ensureInstalled } from './install.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url));

try {
  await ensureInstalled(root);
} catch (error) {
  console.error(error.message);
  process.exit(1);
}

const main = ['--import', 'tsx', 'server/start/main.ts', ...process.argv.slice(2)];
// the channel tells main.ts to stop when this process dies without a word
const child = spawn(process.execPath, main, { cwd: root, stdio: ['inherit', 'inherit', 'inherit', 'ipc'] });

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => child.kill(signal));
if (process.env.npm_lifecycle_event) {
  // npm's shell dies of a signal without passing it on; then this process has another parent
  const parent = process.ppid;
  setInterval(() => process.ppid !== parent && child.kill('SIGTERM'), 500).unref();
}
child.on('error', (error) => {
  console.error(error.message);
  process.exit(1);
});
child.on('exit', (code, signal) => process.exit(code ?? (signal ? 1 : 0)));
