import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { DATABASE } from './databases';
import type { Databases } from './databases';
import { stateFolder } from './paths';
import { replaceFile } from './replace-file';
import { say, Told } from './tell';

const DAY_MS = 86_400_000;

/** Where the seeding of a database stands; kept beside it, as a killed seeding leaves half a hospital. */
type SeedNote = { state: 'running' | 'done'; at: number };

const notePath = (folder: string) => join(folder, 'seed.json');

function readNote(folder: string): SeedNote | null {
  try {
    return JSON.parse(readFileSync(notePath(folder), 'utf8')) as SeedNote;
  } catch {
    return null;
  }
}

const writeNote = (folder: string, note: SeedNote) =>
  replaceFile(notePath(folder), `${JSON.stringify(note)}\n`);

/** Brings the schema of a database up to date. */
export async function migrateDatabase(ownerUrl: string): Promise<void> {
  const { migrate, SchemaNewer } = await import('../db/migrate');
  try {
    await migrate(ownerUrl);
  } catch (error) {
    throw error instanceof SchemaNewer ? new Told(error.message) : error;
  }
}

async function makeDatabase(databases: Databases): Promise<void> {
  if (!(await databases.hasDatabase(DATABASE))) await databases.createDatabase(DATABASE);
  await migrateDatabase(databases.ownerUrl(DATABASE));
}

/** The superuser reads past row-level security, so this sees every hospital. */
const hasHospitals = async (databases: Databases) =>
  (await databases.query('select exists (select from hospitals);', DATABASE)) === 't';

/** Drops and remakes the database, migrated and empty. */
export async function remakeDatabase(databases: Databases): Promise<void> {
  await databases.dropDatabase(DATABASE);
  await makeDatabase(databases);
}

/** Plays the demo timeline up to `now` (epoch ms) into an empty, migrated database. */
export async function seed(databases: Databases, now: number): Promise<void> {
  const { seedDemo } = await import('../demo/seed');
  await seedDemo({ ownerUrl: databases.ownerUrl(DATABASE), appUrl: databases.appUrl(DATABASE), now });
}

/** Makes, migrates and, if it holds no hospital yet, seeds the demo database. */
export async function prepareDemo(databases: Databases, now: number): Promise<void> {
  const folder = stateFolder('demo');
  if (readNote(folder)?.state === 'running') await databases.dropDatabase(DATABASE);
  await makeDatabase(databases);
  if (await hasHospitals(databases)) return;
  say('Playing the demo hospital’s last days …');
  writeNote(folder, { state: 'running', at: now });
  await seed(databases, now);
  writeNote(folder, { state: 'done', at: now });
}

/** Drops the demo and makes it anew. */
export async function freshDemo(databases: Databases, now: number): Promise<void> {
  await databases.dropDatabase(DATABASE);
  await prepareDemo(databases, now);
}

/** Whole days since the demo was made; 0 when nobody knows. */
export function demoAgeInDays(now: number): number {
  const at = readNote(stateFolder('demo'))?.at;
  return at === undefined ? 0 : Math.max(0, Math.floor((now - at) / DAY_MS));
}
