import { describe, expect, it } from 'vitest';
import {
  closingLine,
  exitCode,
  sum,
  tallyCheck,
  tallyPlaywright,
  tallyVitest,
} from '../../server/start/test-results';

const file = (status: string, tests: number) => ({
  status,
  assertionResults: Array.from({ length: tests }, () => ({})),
});

const vitest = (passed: number, total: number, files = [file('passed', total)]) =>
  JSON.stringify({ numPassedTests: passed, numTotalTests: total, testResults: files });

const playwright = (stats: object, errors: object[] = []) =>
  JSON.stringify({ stats: { expected: 0, unexpected: 0, flaky: 0, skipped: 0, ...stats }, errors });

describe('tallyVitest', () => {
  it.each([
    ['all pass', vitest(7, 7), 0, { passed: 7, failed: 0 }],
    ['two fail', vitest(5, 7), 1, { passed: 5, failed: 2 }],
    ['one is skipped although the runner is content', vitest(6, 7), 0, { passed: 6, failed: 1 }],
    [
      'a file does not load',
      vitest(7, 7, [file('passed', 7), file('failed', 0)]),
      1,
      { passed: 7, failed: 1 },
    ],
    ['an error outside all tests', vitest(7, 7), 1, { passed: 7, failed: 1 }],
    ['no test at all', vitest(0, 0, []), 0, { passed: 0, failed: 1 }],
    ['no report', null, 0, { passed: 0, failed: 1 }],
    ['half a report', '{"numPassed', 1, { passed: 0, failed: 1 }],
  ])('%s', (_what, report, code, tally) => expect(tallyVitest(report, code)).toEqual(tally));
});

describe('tallyPlaywright', () => {
  it.each([
    ['all pass', playwright({ expected: 8 }), 0, { passed: 8, failed: 0 }],
    [
      'fail, flaky and skipped',
      playwright({ expected: 4, unexpected: 1, flaky: 2, skipped: 3 }),
      1,
      { passed: 4, failed: 6 },
    ],
    ['the set-up fails', playwright({}, [{ message: 'no server' }]), 1, { passed: 0, failed: 1 }],
    ['killed after its report', playwright({ expected: 8 }), 137, { passed: 8, failed: 1 }],
    ['no story', playwright({}), 0, { passed: 0, failed: 1 }],
    ['no report', null, 1, { passed: 0, failed: 1 }],
  ])('%s', (_what, report, code, tally) => expect(tallyPlaywright(report, code)).toEqual(tally));
});

it('counts a check as one', () => {
  expect(tallyCheck(0)).toEqual({ passed: 1, failed: 0 });
  expect(tallyCheck(2)).toEqual({ passed: 0, failed: 1 });
});

it('sums into the closing line', () => {
  const all = sum([tallyCheck(0), tallyCheck(1), { passed: 40, failed: 0 }]);
  expect(closingLine(all)).toBe('41 passed, 1 failed');
});

it.each([
  [{ passed: 3, failed: 0 }, 0],
  [{ passed: 3, failed: 1 }, 1],
  [{ passed: 0, failed: 0 }, 1],
])('ends %o with %i', (tally, code) => expect(exitCode(tally)).toBe(code));
