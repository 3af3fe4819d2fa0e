import { mkdirSync, mkdtempSync, renameSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { fingerprint, isFresh, writeStamp } from '../../server/start/fingerprint';

let folder: string;
const at = (path: string) => join(folder, path);
const print = () => fingerprint(folder, ['src', 'index.html']);
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'brimline-print-'));
  mkdirSync(at('src/deep'), { recursive: true });
  writeFileSync(at('src/deep/a.ts'), 'a');
  writeFileSync(at('src/b.ts'), 'b');
  writeFileSync(at('index.html'), '<html>');
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

describe('fingerprint', () => {
  it.each<[string, () => void]>([
    ['a content', () => writeFileSync(at('src/deep/a.ts'), 'changed')],
    ['a name', () => renameSync(at('src/b.ts'), at('src/c.ts'))],
    ['a new file', () => writeFileSync(at('src/new.ts'), '')],
    ['a file gone', () => rmSync(at('src/b.ts'))],
    ['a single file', () => writeFileSync(at('index.html'), '<html lang>')],
    [
      'text moved from one file to the next',
      () => {
        writeFileSync(at('src/b.ts'), '');
        writeFileSync(at('src/deep/a.ts'), 'ba');
      },
    ],
  ])('sees %s', (_what, change) => {
    const before = print();
    change();
    expect(print()).not.toBe(before);
  });

  it('does not look at times, other files or missing sources', () => {
    const before = print();
    utimesSync(at('src/b.ts'), 1, 1);
    writeFileSync(at('README.md'), 'x');
    expect(print()).toBe(before);
    expect(fingerprint(folder, ['src', 'index.html', 'absent'])).toBe(before);
  });
});

describe('isFresh', () => {
  it('asks for the stamp, the same print and the product', () => {
    const [stamp, product] = [at('dist/.stamp'), at('dist/main.js')];
    expect(isFresh(stamp, 'one', product)).toBe(false);
    writeStamp(stamp, 'one');
    expect(isFresh(stamp, 'one', product)).toBe(false);
    writeFileSync(product, '');
    expect(isFresh(stamp, 'one', product)).toBe(true);
    expect(isFresh(stamp, 'two', product)).toBe(false);
  });
});
