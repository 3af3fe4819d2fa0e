import { expect, it } from 'vitest';
import { installedMatches } from '../../server/start/install.mjs';

const pack = (version: string, more = {}) => ({ version, integrity: `sha512-${version}`, ...more });
const wanted = {
  packages: {
    '': {},
    'node_modules/a': pack('1.0.0'),
    'node_modules/b': pack('2.0.0', { optional: true }),
  },
};
const installed = (packages: Record<string, object>) => installedMatches(wanted, { packages });

it.each<[string, Record<string, object>, boolean]>([
  ['everything', { 'node_modules/a': pack('1.0.0'), 'node_modules/b': pack('2.0.0') }, true],
  ['all but another platform’s', { 'node_modules/a': pack('1.0.0') }, true],
  ['nothing', {}, false],
  ['another version', { 'node_modules/a': pack('1.0.1') }, false],
  ['another content', { 'node_modules/a': pack('1.0.0', { integrity: 'sha512-other' }) }, false],
  ['another optional version', { 'node_modules/a': pack('1.0.0'), 'node_modules/b': pack('2.1.0') }, false],
  ['one too many', { 'node_modules/a': pack('1.0.0'), 'node_modules/c': pack('1.0.0') }, false],
])('compares the lock file with %s', (_what, packages, matches) => expect(installed(packages)).toBe(matches));
