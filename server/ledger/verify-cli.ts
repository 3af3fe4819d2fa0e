import { asc } from 'drizzle-orm';
import { openDatabase, type Database } from '../db/client';
import { hospitals } from '../db/schema/hospitals';
import { INSTALLATION } from '../db/transaction';
import { verifyChain, type ChainVerdict, type Fault } from './verify';

const WORDS: Readonly<Record<Fault, string>> = {
  'row-missing': 'is missing',
  'row-unlinked': 'does not continue the row before it',
  'row-changed': 'is not what it was',
  'head-missing': 'is the last, and the note of the newest row is gone',
  'head-ahead': 'is missing at the end',
  'head-changed': 'differs from the note of the newest row',
};

const lineOf = (name: string, verdict: ChainVerdict): string =>
  verdict.whole
    ? `${name}: ${verdict.rows} rows, chain whole, newest hash ${verdict.newest}`
    : `${name}: CHAIN BROKEN at row ${verdict.seq}: it ${WORDS[verdict.fault]}`;

async function verifyAll(database: Database): Promise<boolean> {
  const found = await database.db.select().from(hospitals).orderBy(asc(hospitals.name));
  let whole = true;
  for (const { id, name } of [...found, { id: INSTALLATION, name: 'The installation' }]) {
    const verdict = await verifyChain(database, id);
    whole &&= verdict.whole;
    console.log(lineOf(name, verdict));
  }
  return whole;
}

const url = process.env.DATABASE_URL;
if (!url) {
  console.error('DATABASE_URL is not set.');
  process.exitCode = 2;
} else {
  const database = openDatabase(url, { max: 2, applicationName: 'brimline-ledger-verify' });
  try {
    process.exitCode = (await verifyAll(database)) ? 0 : 1;
  } finally {
    await database.close();
  }
}
