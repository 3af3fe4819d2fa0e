import { describe, expect, it } from 'vitest';
import { majorFor } from '../../server/start/postgres-programs';
import { parsePidFile } from '../../server/start/postmaster';

describe('majorFor', () => {
  it.each([
    ['a new cluster takes the highest', null, [17, 15], 17],
    ['an old one keeps its own', 15, [17, 15], 15],
  ])('%s', (_what, made, installed, major) => expect(majorFor('/data/pg', made, installed)).toBe(major));

  it('refuses a folder of a major that is not installed, with the commands to move it', () => {
    const refused = () => majorFor('/data/pg', 15, [17]);
    expect(refused).toThrow(/made by PostgreSQL 15, but only PostgreSQL 17/);
    expect(refused).toThrow(/15\/bin\/pg_dump .*-Fc -f brimline\.dump brimline/);
    expect(refused).toThrow(/17\/bin\/pg_restore .*-d brimline brimline\.dump/);
  });
});

describe('parsePidFile', () => {
  // layout of PostgreSQL 15: pid, data folder, start time, port, socket folder, address, memory key, status
  const text = '4711\n/data/pg\n1781078400\n40123\n\n127.0.0.1\n  1234  5\nready   \n';

  it('reads process and port', () => expect(parsePidFile(text)).toEqual({ pid: 4711, port: 40_123 }));

  it.each(['', 'x\n\n\n5432\n', '-1\n\n\n5432\n', '0\n/data\n1\n1\n'])('takes %j for nothing', (spoilt) =>
    expect(parsePidFile(spoilt)).toBeNull(),
  );
});
