import postgres, { type Sql } from 'postgres';
import { seedDemo } from '../../server/demo/seed';

const setting = (name: string): string => {
  const value = process.env[name];
  if (value === undefined || value === '') throw new Error(`${name} is not set: run it by npm run bench.`);
  return value;
};

const urlOf = (base: string, database: string): string => {
  const url = new URL(base);
  url.pathname = `/${database}`;
  return url.href;
};

export type BenchDatabase = { name: string; appUrl: string; ownerUrl: string; superUrl: string };

/** The migrated, empty database the start program made; every other one is a copy. */
const migrated = (): string => new URL(setting('DATABASE_URL')).pathname.slice(1);

/** Runs one piece of work with a superuser's connection: what a bench plants goes in past triggers and the ledger. */
export async function asSuper<T>(superUrl: string, work: (sql: Sql) => Promise<T>): Promise<T> {
  const sql = postgres(superUrl, { max: 1, onnotice: () => undefined });
  try {
    return await work(sql);
  } finally {
    await sql.end({ timeout: 5 });
  }
}

/** Copies a database nobody is connected to, replacing an earlier copy of that name. */
async function copyDatabase(name: string, template: string): Promise<BenchDatabase> {
  const { username: owner } = new URL(setting('DATABASE_OWNER_URL'));
  const superUrl = setting('BRIMLINE_SUPER_URL');
  await asSuper(superUrl, async (sql) => {
    await sql.unsafe(`drop database if exists ${name} with (force)`);
    await sql.unsafe(`create database ${name} owner ${owner} template ${template}`);
  });
  return {
    name,
    appUrl: urlOf(setting('DATABASE_URL'), name),
    ownerUrl: urlOf(setting('DATABASE_OWNER_URL'), name),
    superUrl: urlOf(superUrl, name),
  };
}

export const dropDatabase = (name: string): Promise<void> =>
  asSuper(setting('BRIMLINE_SUPER_URL'), async (sql) => {
    await sql.unsafe(`drop database if exists ${name} with (force)`);
  });

let seeded: Promise<string> | undefined;

/** A copy of the demo hospital, which is played once per run of the bench. */
export async function demoDatabase(name: string): Promise<BenchDatabase> {
  seeded ??= copyDatabase('brimline_bench_demo', migrated()).then(async (made) => {
    await seedDemo({ ...made, now: Date.now() });
    return made.name;
  });
  return copyDatabase(name, await seeded);
}
