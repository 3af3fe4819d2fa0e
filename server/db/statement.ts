import { Column, fillPlaceholders, is, SQL } from 'drizzle-orm';
import type { TransactionSql } from 'postgres';
import type { Tx } from './transaction';

type Values = Readonly<Record<string, string>>;
type Buildable<Rows> = { prepare(name: string): { execute(): Promise<Rows> } };

type Decoder = { mapFromDriverValue(value: unknown): unknown };
/** What drizzle keeps of a query it has put together, and does not show. */
type Built = { queryString: string; params: unknown[]; fields: { path: string[]; field: unknown }[] };
type Nested = { client: unknown; execute(values: Values): Promise<unknown> };

const clientOf = (tx: Tx): Pick<TransactionSql, 'unsafe'> =>
  (tx as unknown as { session: { client: TransactionSql } }).session.client;

function decoderOf(field: unknown): Decoder {
  if (is(field, Column)) return field;
  const { decoder } = (is(field, SQL) ? field : (field as SQL.Aliased).sql) as unknown as {
    decoder: Decoder;
  };
  return decoder;
}

/** Names of the columns and how each is read; null where rows have parts of their own, which drizzle maps. */
function columnsOf({ fields }: Built): { name: string; decoder: Decoder }[] | null {
  if (fields.some(({ path }) => path.length !== 1)) return null;
  return fields.map(({ path, field }) => ({ name: path[0] ?? '', decoder: decoderOf(field) }));
}

type Run = (tx: Tx, values: Values) => Promise<unknown>;

function runner(prepared: Nested & Built): Run {
  // it would keep the connection it was built on for ever
  prepared.client = undefined;
  const { queryString, params } = prepared;
  const columns = columnsOf(prepared);
  if (columns === null) {
    return (tx, values) =>
      (Object.create(prepared, { client: { value: clientOf(tx) } }) as Nested).execute(values);
  }
  return async (tx, values) => {
    const bound = fillPlaceholders(params, values) as string[];
    const rows = await clientOf(tx).unsafe(queryString, bound).values();
    return rows.map((row) => {
      const read: Record<string, unknown> = {};
      columns.forEach(({ name, decoder }, at) => {
        const value: unknown = row[at];
        read[name] = value === null ? null : decoder.mapFromDriverValue(value);
      });
      return read;
    });
  };
}

/**
 * A select put together once per process; its values come by name (`sql.placeholder`). Putting one together anew
 * costs several times what sending it does, and a page sends two dozen.
 */
export function statement<Rows>(
  build: (tx: Tx) => Buildable<Rows>,
): (tx: Tx, values: Values) => Promise<Rows> {
  let run: Run | undefined;
  return (tx, values) => {
    run ??= runner(build(tx).prepare('') as unknown as Nested & Built);
    return run(tx, values) as Promise<Rows>;
  };
}
