import { benchBundle } from './bundle';
import { benchHttp } from './http';
import { benchKeystrokes } from './keystrokes';
import { benchPdf } from './pdf';
import { benchStart } from './second-start';
import { benchWard } from './ward';
import { benchWorkOut } from './work-out';

const SUBJECTS: Readonly<Record<string, () => Promise<void> | void>> = {
  'work-out': benchWorkOut,
  pdf: benchPdf,
  bundle: benchBundle,
  http: benchHttp,
  ward: benchWard,
  start: benchStart,
  keystrokes: benchKeystrokes,
};

const asked = process.argv.slice(2);
const names = asked.length > 0 ? asked : Object.keys(SUBJECTS);
for (const name of names) {
  const subject = SUBJECTS[name];
  if (!subject)
    throw new Error(`No such measurement: ${name}. There are ${Object.keys(SUBJECTS).join(', ')}.`);
  try {
    await subject();
  } catch (error) {
    console.error(`${name}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`);
    process.exitCode = 1;
  }
}
process.exit();
