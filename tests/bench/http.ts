import { randomUUID } from 'node:crypto';
import { hashOfSecret } from '../../server/auth/session-adapter';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '../../server/demo/people';
import { bareAct, barePool, bareRead } from './bare-handler';
import { asSuper, demoDatabase, dropDatabase, type BenchDatabase } from './databases';
import { interleave, percentile, round, tell } from './interleave';
import { Generator, type Report, type Shot } from './load';
import { plantChecks, type Planted } from './plant-checks';
import { prepareReplay, recording, type Names, type Prepared } from './record-statements';
import { appOn, depsFor, PUBLIC_URL, serve, sessionOf, type Served } from './serve-app';

const ROUNDS = 6;
const READ_MS = 2000;
const READERS = 8;
const ACTS_A_ROUND = 100;
const ACTORS = 4;

type Rig = { database: BenchDatabase; deps: ReturnType<typeof depsFor>; generator: Generator };

/** Fires one shot at the application and keeps what it asks of the database. */
async function record(rig: Rig, shot: Shot, names: Names): Promise<Prepared[]> {
  const { deps, works } = recording(rig.deps);
  const app = await serve(appOn(deps));
  const { method, headers, body } = shot;
  const response = await fetch(`${app.origin}${shot.path}`, { method, headers, ...(body && { body }) });
  const text = await response.text();
  await app.close();
  if (!response.ok) throw new Error(`${shot.path}: ${response.status} ${text}`);
  return prepareReplay(works, names);
}

type Lane = { name: string; server: Served; runs: Report[] };

const lane = (name: string, server: Served): Lane => ({ name, server, runs: [] });

async function fire(
  rig: Rig,
  { name, server, runs }: Lane,
  order: { shots: Shot[]; connections: number; ms?: number },
) {
  const report = await rig.generator.fire({ origin: server.origin, ...order });
  if (report.failures.length > 0)
    throw new Error(`${name}: ${report.failures.length} failed, ${report.failures[0]}`);
  runs.push(report);
  return report.perSecond;
}

/** The warm-up run does not count. */
const p99 = ({ runs }: Lane): number =>
  percentile(
    runs.slice(1).flatMap(({ latencies }) => latencies),
    99,
  );

async function compare(
  what: string,
  ours: Lane,
  bare: Lane,
  run: (lane: Lane) => Promise<number>,
): Promise<void> {
  const { subject, baseline, ratio } = await interleave(
    ROUNDS,
    () => run(ours),
    () => run(bare),
  );
  tell(
    what,
    `${round(subject)}/s, p99 ${round(p99(ours))} ms; bare ${round(baseline)}/s, p99 ${round(p99(bare))} ms; ratio ${round(ratio)}`,
    '≥ 0.7',
  );
}

const statementsIn = (works: readonly Prepared[]): number =>
  works.reduce((sum, { batches }) => sum + batches.reduce((n, batch) => n + batch.length, 0), 0);

const hashOfCookie = (cookie: string): string => hashOfSecret(cookie.split('=')[1] ?? '');

/** One signed order, read by a nurse who did not write it. */
async function benchRead(rig: Rig): Promise<void> {
  const version = await asSuper(rig.database.superUrl, async (sql) => {
    const [row] = await sql<{ id: string }[]>`
      select id from order_versions where kind = 'maintenance' and state = 'running' order by signed_at limit 1`;
    return row!.id;
  });
  const cookie = await sessionOf(rig.deps, DEMO_PEOPLE.nurse.email);
  const shot: Shot = { path: `/api/versions/${version}`, method: 'GET', headers: { cookie } };
  const works = await record(rig, shot, { version, session: hashOfCookie(cookie) });
  const pool = barePool(rig.database.appUrl);
  const ours = lane('order read', await serve(appOn(rig.deps)));
  const bare = lane('bare read', await serve(bareRead(pool, works)));
  await compare(`order read (${statementsIn(works)} statements)`, ours, bare, (at) =>
    fire(rig, at, { shots: [shot], connections: READERS, ms: READ_MS }),
  );
  await Promise.all([ours.server.close(), bare.server.close()]);
  await pool.end({ timeout: 5 });
}

/** A check signed after its figures agreed, with the password typed again. */
async function benchAct(rig: Rig): Promise<void> {
  const count = 1 + 2 * (ROUNDS + 1) * ACTS_A_ROUND;
  const { planted, checkerEmail, contentSha256 } = await asSuper(rig.database.superUrl, (sql) =>
    plantChecks(sql, count),
  );
  const cookie = await sessionOf(rig.deps, checkerEmail);
  const body = JSON.stringify({ contentSha256, acceptReason: null, password: DEMO_PASSWORD });
  const shotAt = ({ version }: Planted): Shot => ({
    path: `/api/checks/${version}/sign`,
    method: 'POST',
    headers: {
      cookie,
      origin: PUBLIC_URL,
      'content-type': 'application/json',
      'idempotency-key': randomUUID(),
    },
    body,
  });
  const first = planted.pop()!;
  const shot = shotAt(first);
  const works = await record(rig, shot, {
    ...first,
    session: hashOfCookie(cookie),
    key: shot.headers['idempotency-key']!,
  });
  const byVersion = new Map(planted.map((one) => [one.version, one]));
  const pool = barePool(rig.database.appUrl);
  const ours = lane('check signed', await serve(appOn(rig.deps)));
  const bare = lane('bare act', await serve(bareAct(pool, works, (version) => byVersion.get(version) ?? {})));
  await compare(`check signed (${statementsIn(works)} statements)`, ours, bare, (at) =>
    fire(rig, at, { shots: planted.splice(-ACTS_A_ROUND).map(shotAt), connections: ACTORS }),
  );
  await Promise.all([ours.server.close(), bare.server.close()]);
  await pool.end({ timeout: 5 });
}

/** Order read and one signed transition, against a bare Express handler that sends the same statements. */
export async function benchHttp(): Promise<void> {
  const database = await demoDatabase('brimline_bench_http');
  const rig: Rig = { database, deps: depsFor(database), generator: new Generator() };
  try {
    await benchRead(rig);
    await benchAct(rig);
  } finally {
    rig.generator.stop();
    await rig.deps.db.close();
    await dropDatabase(database.name);
  }
}
