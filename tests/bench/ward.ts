import { Agent, get } from 'node:http';
import { DEMO_PEOPLE } from '../../server/demo/people';
import { asSuper, demoDatabase, dropDatabase, type BenchDatabase } from './databases';
import { fillHistory } from './fill-history';
import { interleave, median, round, tell } from './interleave';
import { recording, type Work } from './record-statements';
import { appOn, depsFor, serve, sessionOf } from './serve-app';

const FEW = 1000;
const MANY = 1_000_000;
const ROUNDS = 40;
const PAGES_A_ROUND = 5;

async function makeDatabase(name: string, orders: number): Promise<BenchDatabase & { wardId: string }> {
  const database = await demoDatabase(name);
  const started = performance.now();
  const wardId = await asSuper(database.superUrl, async (sql) => {
    const [ward] = await sql<{ id: string }[]>`select id from wards where name = 'Heron'`;
    await fillHistory(sql, ward!.id, orders);
    return ward!.id;
  });
  console.log(`  ${orders} orders copied in within ${round((performance.now() - started) / 1000)} s`);
  return { ...database, wardId };
}

type Page = { ms: number; text: string };

function fetchPage(agent: Agent, url: string, cookie: string): Promise<Page> {
  const started = performance.now();
  return new Promise((done, failed) => {
    const sent = get(url, { agent, headers: { cookie } }, (response) => {
      const parts: Buffer[] = [];
      response.on('data', (part: Buffer) => parts.push(part));
      response.once('end', () => {
        const text = Buffer.concat(parts).toString();
        if (response.statusCode !== 200) return failed(new Error(`${response.statusCode} ${text}`));
        done({ ms: performance.now() - started, text });
      });
    });
    sent.once('error', failed);
  });
}

const LONG_ROWS = 10_000;

/** Long tables of which a statement of the page would read every row. */
async function tablesScanned(database: BenchDatabase, works: readonly Work[]): Promise<string[]> {
  const inTransactions = works.filter(({ begin }) => begin?.includes('hospital_id'));
  const statements = inTransactions.flatMap(({ begin, batches }) =>
    batches.flat().map((statement) => ({ ...statement, setting: begin!.split(';')[1]! })),
  );
  const { db } = depsFor(database);
  const scanned = new Set<string>();
  for (const { text, values, setting } of statements) {
    const plan = await db.sql.begin(async (sql) => {
      await sql.unsafe(setting);
      return sql.unsafe<{ 'QUERY PLAN': string }[]>(`explain ${text}`, values as never[]);
    });
    for (const { 'QUERY PLAN': line } of plan) {
      const table = /Seq Scan on (\w+)/.exec(line)?.[1];
      if (table !== undefined) scanned.add(table);
    }
  }
  const long = await db.sql<{ table: string }[]>`
    select relname as table from pg_class where relkind = 'r' and reltuples > ${LONG_ROWS}`;
  await db.close();
  return long.map(({ table }) => table).filter((table) => scanned.has(table));
}

async function open(database: BenchDatabase & { wardId: string }) {
  const deps = depsFor(database);
  const cookie = await sessionOf(deps, DEMO_PEOPLE.registrar.email);
  const path = `/api/wards/${database.wardId}`;
  const agent = new Agent({ keepAlive: true });
  const watched = recording(deps);
  const watching = await serve(appOn(watched.deps));
  const first = await fetchPage(agent, `${watching.origin}${path}`, cookie);
  await watching.close();
  const server = await serve(appOn(deps));
  return {
    first,
    scanned: await tablesScanned(database, watched.works),
    /** Median of a few pages, ms. */
    pages: async () => {
      const pages: number[] = [];
      for (let i = 0; i < PAGES_A_ROUND; i += 1)
        pages.push((await fetchPage(agent, `${server.origin}${path}`, cookie)).ms);
      return median(pages);
    },
    close: async () => {
      agent.destroy();
      await server.close();
      await deps.db.close();
    },
  };
}

/** The ward page with a thousand and with a million orders behind it, page by page in turn. */
export async function benchWard(): Promise<void> {
  const few = await makeDatabase('brimline_bench_few', FEW);
  const many = await makeDatabase('brimline_bench_many', MANY);
  const [small, large] = [await open(few), await open(many)];
  try {
    const rowsOf = ({ text }: Page) => (JSON.parse(text) as { rows: { orders: unknown[] }[] }).rows;
    const linesOf = (page: Page) => rowsOf(page).reduce((sum, { orders }) => sum + orders.length, 0);
    if (linesOf(small.first) !== linesOf(large.first)) throw new Error('the two wards show different orders');
    const { subject, baseline, ratio } = await interleave(ROUNDS, large.pages, small.pages);
    tell(
      'ward page, a million orders',
      `${round(subject)} ms; a thousand ${round(baseline)} ms; ratio ${round(ratio)}; ` +
        `${rowsOf(large.first).length} children, ${linesOf(large.first)} orders shown; ` +
        `read from end to end: ${large.scanned.join(', ') || 'no long table'}`,
      '≤ 1.3',
    );
  } finally {
    await Promise.all([small.close(), large.close()]);
    await dropDatabase(few.name);
    await dropDatabase(many.name);
  }
}
