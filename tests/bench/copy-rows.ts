import type { Sql } from 'postgres';

export type Copy = {
  table: string;
  /** Where-clause on the table that finds the one row copied, as `p`. */
  of: string;
  /** A table of new rows, as `s`: one copy each. */
  each: string;
  /** Columns that differ, as SQL over `p` and `s`. */
  set: Readonly<Record<string, string>>;
};

/** Inserts one copy of a row for each row of another table, in one statement; returns how many. */
export async function copyRows(sql: Sql, { table, of, each, set }: Copy): Promise<number> {
  const columns = await sql<{ name: string }[]>`
    select attname as name from pg_attribute
    where attrelid = ${table}::regclass and attnum > 0 and not attisdropped and attgenerated = ''
    order by attnum`;
  const names = columns.map(({ name }) => `"${name}"`).join(', ');
  const values = columns.map(({ name }) => set[name] ?? `p."${name}"`).join(', ');
  const made = await sql.unsafe(
    `insert into ${table} (${names}) select ${values} from (select * from ${table} p where ${of} limit 1) p
     cross join ${each} s`,
  );
  return made.count;
}
