import type { Sql } from 'postgres';
import { copyRows } from './copy-rows';

export type Planted = { version: string; order: string; child: string; code: string };
export type Plant = { planted: Planted[]; checkerEmail: string; contentSha256: string };

const NOT_YET = { ended_at: 'null', end_reason: 'null' };

/**
 * Copies one checked maintenance order `count` times, each with its checker's figures locked in and agreed and only
 * the signature missing; spread over the children now in hospital.
 */
export async function plantChecks(sql: Sql, count: number): Promise<Plant> {
  const [proto] = await sql<
    { version: string; order: string; check: string; email: string; sha256: string }[]
  >`
    select v.id as version, v.order_id as "order", c.id as check, l.email, encode(v.content_sha256, 'hex') as sha256
    from order_versions v join checks c on c.version_id = v.id and c.state = 'agreed' and not c.choices_differ
    join accounts a on a.id = c.checker_id join auth.logins l on l.id = a.login_id
    where v.kind = 'maintenance' and not v.is_high_risk and v.given_at is null
    order by v.signed_at limit 1`;
  if (proto === undefined) throw new Error('the demo has no checked maintenance order');
  await sql.unsafe(`set session_replication_role = replica`);
  await sql.unsafe(`
    create temp table acts as
    select gen_random_uuid() as order_id, gen_random_uuid() as version_id, child_id,
      'BL-990101-' || 100000 + n as code
    from generate_series(1, ${count}) n
    join (select child_id, row_number() over () - 1 as place, count(*) over () as of from stays where to_at is null) c
      on c.place = n % c.of`);
  const each = 'acts';
  await copyRows(sql, {
    table: 'orders',
    of: `p.id = '${proto.order}'`,
    each,
    set: { id: 's.order_id', code: 's.code', child_id: 's.child_id', follows: 'null' },
  });
  await copyRows(sql, {
    table: 'order_versions',
    of: `p.id = '${proto.version}'`,
    each,
    set: {
      ...NOT_YET,
      id: 's.version_id',
      order_id: 's.order_id',
      child_id: 's.child_id',
      version: '1',
      state: `'awaiting-check'`,
      state_since: 'now()',
      checked_at: 'null',
      asked_checker: 'null',
      check_due_at: `now() + interval '1 hour'`,
      start_by: `now() + interval '1 day'`,
      lapses_at: `now() + interval '1 day'`,
    },
  });
  await copyRows(sql, {
    table: 'checks',
    of: `p.id = '${proto.check}'`,
    each,
    set: {
      id: 'gen_random_uuid()',
      version_id: 's.version_id',
      state: `'locked-agreed'`,
      reserved_until: `now() + interval '1 day'`,
      decided_at: 'null',
    },
  });
  await copyRows(sql, {
    table: 'signatures',
    of: `p.version_id = '${proto.version}' and p.meaning = 'author'`,
    each,
    set: { id: 'gen_random_uuid()', version_id: 's.version_id' },
  });
  const planted = await sql<Planted[]>`
    select version_id as version, order_id as "order", child_id as child, code from acts`;
  await sql.unsafe('analyze');
  return { planted: [...planted], checkerEmail: proto.email, contentSha256: proto.sha256 };
}
