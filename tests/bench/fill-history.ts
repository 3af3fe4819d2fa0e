import type { Sql } from 'postgres';
import { copyRows } from './copy-rows';

const OLD_ORDERS_ON_THE_WARD = 20;
const ORDERS_A_CHILD = 20;
/** Old content is read by nobody who opens a ward page; a short one keeps the copying to minutes. */
const SHORT = `'{"schema":1}'`;
const content = `case when s.on_ward then p.content else ${SHORT} end`;

/** The ended order every old one is a copy of. */
type Proto = { version: string; order: string; child: string; check: string };

async function makeTables(sql: Sql, wardId: string, orders: number): Promise<void> {
  await sql.unsafe(`
    create temp table former as
    select n, gen_random_uuid() as child_id, now() - make_interval(days => 4 + n % 1800) as came
    from generate_series(1, greatest(10, ${orders} / ${ORDERS_A_CHILD})) n`);
  await sql.unsafe(`
    create temp table history as
    with present as (
      select child_id, row_number() over () - 1 as place, count(*) over () as of
      from stays where to_at is null and ward_id = '${wardId}'),
    numbered as (
      select n, n <= ${OLD_ORDERS_ON_THE_WARD} * (select of from present limit 1) as on_ward
      from generate_series(1, ${orders}) n)
    select o.n, o.on_ward, gen_random_uuid() as order_id, gen_random_uuid() as version_id,
      coalesce(p.child_id, f.child_id) as child_id,
      coalesce(f.came, now() - make_interval(hours => 36 + 12 * (o.n / p.of)::int)) as signed_at,
      (array['finished', 'finished', 'finished', 'stopped', 'replaced', 'lapsed'])[1 + o.n % 6] as state
    from numbered o
    left join present p on on_ward and p.place = o.n % p.of
    left join former f on not on_ward and f.n = 1 + o.n % (select count(*) from former)`);
}

async function copyChildren(sql: Sql, { child }: Proto): Promise<void> {
  const each = 'former';
  await copyRows(sql, {
    table: 'children',
    of: `p.id = '${child}'`,
    each,
    set: { id: 's.child_id', number: `'OLD-' || s.n`, surname: `'Former ' || s.n` },
  });
  await copyRows(sql, {
    table: 'stays',
    of: `p.child_id = '${child}'`,
    each,
    set: {
      id: 'gen_random_uuid()',
      child_id: 's.child_id',
      from_at: 's.came',
      to_at: `s.came + interval '3 days'`,
    },
  });
  await copyRows(sql, {
    table: 'weights',
    of: `p.child_id = '${child}'`,
    each: '(select child_id, came, k from former cross join generate_series(1, 3) k)',
    set: {
      id: 'gen_random_uuid()',
      child_id: 's.child_id',
      at: 's.came + make_interval(days => s.k)',
      superseded_by: 'null',
    },
  });
}

async function copyOrders(sql: Sql, proto: Proto): Promise<void> {
  const each = 'history';
  const own = { id: 'gen_random_uuid()', version_id: 's.version_id' };
  await copyRows(sql, {
    table: 'orders',
    of: `p.id = '${proto.order}'`,
    each,
    set: {
      id: 's.order_id',
      child_id: 's.child_id',
      code: `to_char(s.signed_at, '"BL-"YYMMDD"-"') || 1000000 + s.n`,
      made_at: 's.signed_at',
      follows: 'null',
    },
  });
  const ended = `s.signed_at + interval '20 hours'`;
  await copyRows(sql, {
    table: 'order_versions',
    of: `p.id = '${proto.version}'`,
    each,
    set: {
      id: 's.version_id',
      order_id: 's.order_id',
      child_id: 's.child_id',
      state: 's.state',
      state_since: ended,
      ended_at: ended,
      signed_at: 's.signed_at',
      checked_at: `s.signed_at + interval '20 minutes'`,
      check_due_at: `s.signed_at + interval '1 hour'`,
      asked_checker: 'null',
      content,
      content_sha256: `sha256(convert_to(${content}, 'UTF8'))`,
    },
  });
  await copyRows(sql, { table: 'checks', of: `p.id = '${proto.check}'`, each, set: own });
  for (const meaning of ['author', 'independent-check']) {
    const of = `p.version_id = '${proto.version}' and p.meaning = '${meaning}'`;
    await copyRows(sql, { table: 'signatures', of, each, set: own });
  }
  const of = `p.version_id = '${proto.version}'`;
  await copyRows(sql, { table: 'seen_figures', of, each, set: own });
}

/**
 * Brings a copy of the demo to so many orders, copied in by SQL past triggers and outside the ledger: twenty old
 * ones for each child now on the ward, the rest on discharged children of the last five years.
 */
export async function fillHistory(sql: Sql, wardId: string, total: number): Promise<void> {
  const [proto] = await sql<(Proto & { orders: number })[]>`
    select v.id as version, v.order_id as "order", v.child_id as child, c.id as check,
      (select count(*)::int from orders) as orders
    from order_versions v join checks c on c.version_id = v.id and c.state = 'agreed'
    where v.kind = 'maintenance' and v.given_at is null
      and exists (select from seen_figures f where f.version_id = v.id)
    order by v.signed_at limit 1`;
  if (proto === undefined) throw new Error('the demo has no checked maintenance order');
  await sql.unsafe('set session_replication_role = replica');
  await sql.unsafe('set synchronous_commit = off');
  await makeTables(sql, wardId, total - proto.orders);
  await copyChildren(sql, proto);
  await copyOrders(sql, proto);
  await sql.unsafe('vacuum analyze');
}
