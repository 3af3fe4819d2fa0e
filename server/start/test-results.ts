/** What one step of the test run came to. */
export type Tally = { passed: number; failed: number };

export const NOTHING: Tally = { passed: 0, failed: 0 };
export const ONE_PASSED: Tally = { passed: 1, failed: 0 };
export const ONE_FAILED: Tally = { passed: 0, failed: 1 };

/** A check that is passed or failed as a whole, by its exit code. */
export const tallyCheck = (code: number): Tally => (code === 0 ? ONE_PASSED : ONE_FAILED);

export const sum = (tallies: readonly Tally[]): Tally =>
  tallies.reduce(
    (all, one) => ({ passed: all.passed + one.passed, failed: all.failed + one.failed }),
    NOTHING,
  );

/** A runner that fails without naming a failed test, or without a report, counts as one failure. */
function withExitCode(tally: Tally, code: number): Tally {
  const hidden = code !== 0 && tally.failed === 0;
  const empty = tally.passed + tally.failed === 0;
  return hidden || empty ? { ...tally, failed: tally.failed + 1 } : tally;
}

type VitestReport = {
  numPassedTests: number;
  numTotalTests: number;
  testResults: { status: string; assertionResults: unknown[] }[];
};

type PlaywrightReport = {
  stats: { expected: number; unexpected: number; flaky: number; skipped: number };
  errors: unknown[];
};

function parse<T>(report: string | null): T | null {
  if (report === null) return null;
  try {
    return JSON.parse(report) as T;
  } catch {
    return null;
  }
}

/** Sums vitest's JSON report (null: none was written). Skipped tests and files that do not load have failed. */
export function tallyVitest(report: string | null, code: number): Tally {
  const found = parse<VitestReport>(report);
  if (!found) return ONE_FAILED;
  const unloaded = found.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.length === 0,
  ).length;
  const passed = found.numPassedTests;
  return withExitCode({ passed, failed: found.numTotalTests - passed + unloaded }, code);
}

/** Sums Playwright's JSON report (null: none was written). Skipped and flaky stories have failed. */
export function tallyPlaywright(report: string | null, code: number): Tally {
  const found = parse<PlaywrightReport>(report);
  if (!found) return ONE_FAILED;
  const { expected, unexpected, flaky, skipped } = found.stats;
  return withExitCode({ passed: expected, failed: unexpected + flaky + skipped + found.errors.length }, code);
}

/** The closing line; runners of continuous integration read it. */
export const closingLine = (tally: Tally): string => `${tally.passed} passed, ${tally.failed} failed`;

/** 0 only when something ran and nothing failed. */
export const exitCode = (tally: Tally): number => (tally.failed === 0 && tally.passed > 0 ? 0 : 1);
