import type { Database } from './client';

/** What is wrong with the role the pool runs as; empty when the database guards itself. */
export async function roleFaults({ sql }: Database): Promise<string[]> {
  const rows = await sql<{ fault: string }[]>`
    with me as (select * from pg_roles where rolname = current_user),
    mine as (
      select c.oid, n.nspname, c.relname, c.relowner, c.relrowsecurity and c.relforcerowsecurity as forced
      from pg_class c join pg_namespace n on n.oid = c.relnamespace
      where c.relkind in ('r', 'p') and n.nspname in ('public', 'auth'))
    select 'the role is a superuser' as fault from me where rolsuper
    union all select 'the role bypasses row-level security' from me where rolbypassrls
    union all select 'the role owns table ' || nspname || '.' || relname
      from mine where relowner = (select oid from me)
    union all select 'the role may change ' || table_name
      from unnest(array['ledger', 'signatures', 'infusion_events']) as table_name
      where to_regclass('public.' || table_name) is null
        or has_table_privilege('public.' || table_name, 'update, delete, truncate')
    union all select 'table ' || relname || ' does not force row-level security'
      from mine where nspname = 'public' and not forced and exists (
        select from pg_attribute a where a.attrelid = mine.oid and a.attname = 'hospital_id' and not a.attisdropped)
    order by 1`;
  return rows.map((row) => row.fault);
}

/** Throws, naming every fault, unless the pool's role can do no more than the program needs. */
export async function assertSafeRole(database: Database): Promise<void> {
  const faults = await roleFaults(database);
  if (faults.length === 0) return;
  throw new Error(
    `The database role is not safe to run with:\n  ${faults.join('\n  ')}\n` +
      'DATABASE_URL must name a login that is a member of brimline_app and owns nothing.',
  );
}
