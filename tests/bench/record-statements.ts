import type { Sql, TransactionSql } from 'postgres';
import type { Deps } from '../../server/http/deps';

export type Statement = { text: string; values: unknown[]; prepare: boolean };
/** Statements the program had under way at the same time; the next batch waited for them. */
export type Batch = Statement[];
/** One transaction with the words its BEGIN was followed by, or statements outside one. */
export type Work = { begin: string | null; batches: Batch[] };

type Unsafe = TransactionSql['unsafe'];

const unsafeOf =
  (sql: Pick<Sql, 'unsafe'>): Unsafe =>
  (text, values, options) =>
    sql.unsafe(text, values, options);

/** Statements are started when they are awaited, so the driver's own chaining (`.values()`) still comes first. */
function recorder(unsafe: Unsafe, batches: Batch[]): Unsafe {
  let underWay = 0;
  const settled = () => {
    underWay -= 1;
  };
  return (text, values, options) => {
    const statement = { text, values: [...(values ?? [])], prepare: options?.prepare === true };
    if (underWay === 0) batches.push([statement]);
    else batches.at(-1)!.push(statement);
    underWay += 1;
    const running = unsafe(text, values, options);
    running.then(settled, settled);
    return running as never;
  };
}

const overriding = <T extends object>(target: T, changes: Partial<T>): T =>
  new Proxy(target, {
    get: (at, name, receiver) =>
      name in changes
        ? (changes as Record<PropertyKey, unknown>)[name]
        : (Reflect.get(at, name, receiver) as unknown),
  });

type Begin = (opening: string, work: (sql: TransactionSql) => unknown) => Promise<unknown>;

/** The same dependencies, and what they are asked: every statement a request sends, in its order. */
export function recording(deps: Deps): { deps: Deps; works: Work[] } {
  const works: Work[] = [];
  const { sql } = deps.db;
  const outside: Unsafe = (text, values, options) => {
    const work: Work = { begin: null, batches: [] };
    works.push(work);
    return recorder(unsafeOf(sql), work.batches)(text, values, options) as never;
  };
  const begin: Begin = (opening, work) => {
    // the program answers the driver's cleaning of these words itself: see opening() in server/db
    const recorded: Work = { begin: opening.replace(/$/, ''), batches: [] };
    works.push(recorded);
    return (sql.begin as unknown as Begin)(opening, (inside) =>
      work(overriding(inside, { unsafe: recorder(unsafeOf(inside), recorded.batches) })),
    );
  };
  const watched = overriding(sql, { begin, unsafe: outside } as unknown as Partial<Sql>);
  return { deps: { ...deps, db: { ...deps.db, sql: watched } }, works };
}

/** Values of the recorded request that stand for another's in a replay, by what they are. */
export type Names = Readonly<Record<string, string>>;

export type Prepared = { begin: string | null; batches: PreparedStatement[][] };
export type PreparedStatement = { text: string; prepare: boolean; bind: (names: Names) => unknown[] };

/** Works out once which values hold a name, so that a replay only fills those in. */
export function prepareReplay(works: readonly Work[], recorded: Names): Prepared[] {
  const fill = (value: unknown) => {
    const held = Object.entries(recorded).filter(
      ([, text]) => typeof value === 'string' && value.includes(text),
    );
    if (held.length === 0) return () => value;
    return (names: Names) =>
      held.reduce((text, [name, was]) => text.replaceAll(was, names[name] ?? was), value as string);
  };
  const statement = ({ text, values, prepare }: Statement): PreparedStatement => {
    const fills = values.map(fill);
    return { text, prepare, bind: (names) => fills.map((one) => one(names)) };
  };
  return works.map(({ begin, batches }) => ({
    begin,
    batches: batches.map((batch) => batch.map(statement)),
  }));
}

type Rows = readonly Record<string, unknown>[];

async function send(sql: Pick<Sql, 'unsafe'>, batch: PreparedStatement[], names: Names): Promise<Rows[]> {
  return Promise.all(
    batch.map(async ({ text, prepare, bind }) => await sql.unsafe(text, bind(names) as never[], { prepare })),
  );
}

/** Sends the statements of one recorded piece of work as a bare handler would: in its order, and nothing between. */
export async function replay(sql: Sql, { begin, batches }: Prepared, names: Names): Promise<Rows[]> {
  const all = async (on: Pick<Sql, 'unsafe'>) => {
    const rows: Rows[] = [];
    for (const batch of batches) rows.push(...(await send(on, batch, names)));
    return rows;
  };
  if (begin === null) return all(sql);
  const opening = { replace: () => begin } as unknown as string;
  return await sql.begin<Rows[]>(opening, all);
}
