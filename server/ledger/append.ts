import { canonicalText } from '@shared/canonical';
import type { LedgerEntry } from './entries';

/** The part of the driver's transaction this needs. */
type Statements = {
  unsafe(
    query: string,
    parameters: string[],
    options: { prepare: boolean },
  ): PromiseLike<readonly Record<string, unknown>[]>;
};

const APPEND = `select ledger_append(array(
  select line from jsonb_array_elements_text($1::text::jsonb) with ordinality as t(line, place) order by place
)) as seq`;

const withoutAbsent = (entry: LedgerEntry): Record<string, unknown> =>
  Object.fromEntries(Object.entries(entry).filter(([, value]) => value !== undefined));

/** Appends to the chain of the transaction's hospital and returns the newest sequence number. Locks its head: call it last. */
export async function appendEntries(sql: Statements, entries: readonly LedgerEntry[]): Promise<number> {
  const lines = entries.map((entry) => canonicalText(withoutAbsent(entry)));
  const rows = await sql.unsafe(APPEND, [JSON.stringify(lines)], { prepare: true });
  return Number(rows[0]?.seq);
}
