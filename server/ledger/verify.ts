import { asc, eq, gt } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import type { Database } from '../db/client';
import { readInHospital } from '../db/in-hospital';
import { ledger, ledgerHeads } from '../db/schema/ledger';
import type { Tx } from '../db/transaction';

export type Fault =
  'row-missing' | 'row-unlinked' | 'row-changed' | 'head-missing' | 'head-ahead' | 'head-changed';

/** A chain's verdict. `seq` of a fault is the first row that is not what it was. */
export type ChainVerdict =
  { whole: true; rows: number; newest: string } | { whole: false; rows: number; fault: Fault; seq: number };

type Row = { seq: number; prev: string; hash: string; entry: string };
type Head = { seq: number; hash: string };

const GENESIS = '0'.repeat(64);
const BATCH = 2000;

/** SHA-256 over previous hash, sequence number (8 bytes, big-endian) and entry, as the database's CHECK has it. */
export function rowHash(prev: string, seq: number, entry: string): string {
  const number = Buffer.alloc(8);
  number.writeBigInt64BE(BigInt(seq));
  return createHash('sha256')
    .update(Buffer.from(prev, 'hex'))
    .update(number)
    .update(entry, 'utf8')
    .digest('hex');
}

/** Walks one chain from its first row and names the first break; works the hashes out by itself. */
export async function verifyChain(database: Database, hospitalId: string): Promise<ChainVerdict> {
  // the head is read first: rows appended meanwhile lie beyond it and are walked all the same
  const head = await readInHospital(database, { hospitalId }, (tx) => readHead(tx, hospitalId));
  let last: Head = { seq: 0, hash: GENESIS };
  let rows: Row[];
  do {
    const from = last.seq;
    rows = await readInHospital(database, { hospitalId }, (tx) => readRows(tx, from));
    for (const row of rows) {
      const broken = rowFault(row, last) ?? headFault(row, head);
      if (broken) return { whole: false, rows: last.seq, ...broken };
      last = row;
    }
  } while (rows.length === BATCH);
  return endOf(last, head);
}

function endOf(last: Head, head: Head | undefined): ChainVerdict {
  if (!head && last.seq > 0) return { whole: false, rows: last.seq, fault: 'head-missing', seq: last.seq };
  if (head && head.seq > last.seq)
    return { whole: false, rows: last.seq, fault: 'head-ahead', seq: last.seq + 1 };
  return { whole: true, rows: last.seq, newest: last.hash };
}

type Break = { fault: Fault; seq: number };

const headFault = (row: Row, head: Head | undefined): Break | undefined =>
  head?.seq === row.seq && head.hash !== row.hash ? { fault: 'head-changed', seq: row.seq } : undefined;

function rowFault(row: Row, last: Head): Break | undefined {
  if (row.seq !== last.seq + 1) return { fault: 'row-missing', seq: last.seq + 1 };
  if (row.prev !== last.hash) return { fault: 'row-unlinked', seq: row.seq };
  if (row.hash !== rowHash(row.prev, row.seq, row.entry)) return { fault: 'row-changed', seq: row.seq };
  return undefined;
}

async function readHead(tx: Tx, hospitalId: string): Promise<Head | undefined> {
  const [head] = await tx
    .select({ seq: ledgerHeads.seq, hash: ledgerHeads.hash })
    .from(ledgerHeads)
    .where(eq(ledgerHeads.hospitalId, hospitalId));
  return head;
}

const readRows = (tx: Tx, after: number): Promise<Row[]> =>
  tx
    .select({ seq: ledger.seq, prev: ledger.prev, hash: ledger.hash, entry: ledger.entry })
    .from(ledger)
    .where(gt(ledger.seq, after))
    .orderBy(asc(ledger.seq))
    .limit(BATCH);
