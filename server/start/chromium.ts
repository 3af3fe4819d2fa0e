import { existsSync } from 'node:fs';
import { installPackages, installWords, isRoot } from './debian';
import { Told } from './tell';

/** Programs of the browser and PDF tests, with Debian's package for each. */
const PROGRAMS = {
  chromium: { path: '/usr/bin/chromium', debian: 'chromium', what: 'Chromium' },
  pdftotext: { path: '/usr/bin/pdftotext', debian: 'poppler-utils', what: 'pdftotext' },
} as const;

export type TestProgram = keyof typeof PROGRAMS;

export const CHROMIUM = PROGRAMS.chromium.path;

/** Installs Debian's packages of these programs where absent; as a plain user throws Told with what to run. */
export async function ensureTestPrograms(wanted: readonly TestProgram[]): Promise<void> {
  const missing = wanted.map((name) => PROGRAMS[name]).filter((program) => !existsSync(program.path));
  if (missing.length === 0) return;
  const what = missing.map((program) => program.what).join(' and ');
  const packages = missing.map((program) => program.debian);
  if (!isRoot()) throw new Told(installWords(what, packages));
  await installPackages(what, packages);
}
