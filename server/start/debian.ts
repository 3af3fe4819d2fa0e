import { existsSync } from 'node:fs';
import { run } from './children';
import { say, Told } from './tell';

export const isRoot = (): boolean => process.getuid?.() === 0;

/** What to do about a missing Debian package, in words. */
export const installWords = (
  what: string,
  packages: readonly string[],
  first: readonly string[] = [],
): string =>
  [
    `${what} is missing and only root can install it. Run:`,
    '',
    ...first.map((line) => `  ${line}`),
    `  sudo apt-get install --no-install-recommends ${packages.join(' ')}`,
    '',
    'and start again.',
  ].join('\n');

/** Installs Debian packages as root. Throws Told with apt's own words when it cannot. */
export async function installPackages(what: string, packages: readonly string[]): Promise<void> {
  if (!existsSync('/usr/bin/apt-get')) {
    throw new Told(`${what} is missing and this is no Debian: install ${packages.join(', ')} by hand.`);
  }
  say(`Installing ${what} (Debian: ${packages.join(', ')}) …`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const wait = ['-o', 'DPkg::Lock::Timeout=300'];
  const update = await run('apt-get', [...wait, 'update', '-qq'], { env });
  const install = await run(
    'apt-get',
    [...wait, 'install', '-y', '-qq', '--no-install-recommends', ...packages],
    { env },
  );
  if (install.code !== 0)
    throw new Told(`${what} could not be installed:\n${update.stderr}${install.stderr}`);
}
