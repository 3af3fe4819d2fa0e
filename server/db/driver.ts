import postgres, { type Options, type Sql, type TransactionSql } from 'postgres';
import { isLost } from './faults';

/**
 * The driver with three faults of its pinned version mended; all showed when a connection was cut under load.
 *
 * 1. Every statement on a cut connection is rejected with one shared error object, on which the driver defines
 *    read-only details of the statement; the second statement throws there, outside any promise, and ends the
 *    process. `mendRejection` lets all statements define the same details: none. (They hold bound values, which
 *    do not belong into a log anyway.)
 * 2. A transaction holds its connection by object, and the pool opens that object again after a cut. What the old
 *    transaction still sends then runs inside the next one, possibly of another hospital. `guardBegin` refuses
 *    statements after a cut, and lets such a transaction end without the driver's ROLLBACK or COMMIT.
 * 3. A new connection first asks for the array types, and nobody waits for that question: cut in between, its
 *    rejection ends the process. `mendRejection` lets it go unanswered; the next connection asks again, and the
 *    statement that the connection was opened for is rejected by itself.
 */
export function openDriver(url: string, options: Options<Record<string, never>>): Sql {
  const sql = postgres(url, options);
  mendRejection(sql);
  guardBegin(sql);
  return sql;
}

type StatementDetails = {
  string?: unknown;
  parameters?: unknown;
  args?: unknown;
  statement?: unknown;
  strings?: readonly string[];
  reject: (error: unknown) => void;
};

/** The driver's own question of a new connection. */
const asksForTypes = ({ strings }: StatementDetails): boolean =>
  strings?.[0]?.includes('select b.oid, b.typarray') === true;

/** `origin` is read in one place of the driver: first thing when it rejects a statement. */
function mendRejection(sql: Sql): void {
  // made and never run: statements start when they are awaited
  const prototype = Object.getPrototypeOf(sql.unsafe('select 1')) as object;
  Object.defineProperty(prototype, 'origin', {
    configurable: true,
    get(this: StatementDetails) {
      this.string = this.parameters = this.args = this.statement = undefined;
      if (asksForTypes(this)) this.reject = () => undefined;
      return '';
    },
  });
}

type Begin = (settings: string, work: (sql: TransactionSql) => unknown) => Promise<unknown>;

function guardBegin(sql: Sql): void {
  const begin = sql.begin.bind(sql) as unknown as Begin;
  const guarded = (
    ...call: [string, (sql: TransactionSql) => unknown] | [(sql: TransactionSql) => unknown]
  ) => (call.length === 2 ? runGuarded(begin, call[0], call[1]) : runGuarded(begin, '', call[0]));
  sql.begin = guarded as Sql['begin'];
}

type Line = { lost?: unknown };

async function runGuarded(
  begin: Begin,
  settings: string,
  work: (sql: TransactionSql) => unknown,
): Promise<unknown> {
  const line: Line = {};
  try {
    return await begin(settings, async (sql) => {
      try {
        const result = await work(watch(sql, line));
        return 'lost' in line ? await never() : result;
      } catch (error) {
        if ('lost' in line || isLost(error)) return await never();
        throw error;
      }
    });
  } catch (error) {
    // also tells a command that still runs that its connection is gone
    line.lost = error;
    throw error;
  }
}

/** The caller has its answer from the closed connection; what is left of the transaction is let go. */
const never = () => new Promise<never>(() => undefined);

/** Notices a cut connection, and sends nothing more on it. */
function watch(sql: TransactionSql, line: Line): TransactionSql {
  const unsafe: TransactionSql['unsafe'] = (query, parameters, options) => {
    if ('lost' in line) throw line.lost;
    const statement = sql.unsafe(query, parameters ?? [], options);
    statement.then(undefined, (error: unknown) => {
      if (isLost(error)) line.lost = error;
    });
    return statement as never;
  };
  return new Proxy(sql, {
    get: (target, name, receiver) =>
      name === 'unsafe' ? unsafe : (Reflect.get(target, name, receiver) as unknown),
  });
}
