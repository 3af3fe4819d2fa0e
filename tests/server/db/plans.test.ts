import { beforeAll, describe, expect, it } from 'vitest';
import { inTransaction } from '../../../server/db/transaction';
import { freshDatabase } from '../support/database';
import { makeHospital, openAll, type Hospital } from './make-hospital';

const { app, owner, superuser } = openAll(await freshDatabase());
let hospital: Hospital;

/** 20,000 versions that nearly all ended, past the constraints: something for a plan to avoid. */
beforeAll(async () => {
  hospital = await makeHospital(owner);
  await superuser.sql.begin(async (sql) => {
    await sql.unsafe(
      `set local session_replication_role = replica; set local app.hospital_id = '${hospital.id}'`,
    );
    await sql.unsafe(`
      insert into orders (code, child_id, kind, made_by, made_at)
      select 'BL-260101-' || lpad(i::text, 6, '0'), gen_random_uuid(), 'maintenance', gen_random_uuid(), now()
        from generate_series(1, 20000) i;
      insert into order_versions (order_id, version, child_id, kind, state, state_since, author_id, content,
        content_sha256, signed_at, weight_kg, rate_ml_h)
      select id, 1, child_id, kind, case when code like '%00' then 'awaiting-check' else 'stopped' end, now(),
        made_by, 'x', sha256('x'), now(), 16, 44 from orders;
      insert into children (number, surname, given, born_on, allergies, registered_by, registered_at)
      select 'N' || i, 'Surname' || i, 'G', '2020-01-01', 'x', gen_random_uuid(), now()
        from generate_series(1, 5000) i;
      insert into stays (child_id, ward_id, from_at, to_at)
      select id, '${hospital.wardId}', now(), case when number like '%499' then null else now() end from children;
      analyze`);
  });
}, 60_000);

describe('lists go through their index, as the server’s role, under row-level security', () => {
  it.each([
    [
      'the ward',
      `select c.surname, v.state from stays s
       join children c on c.hospital_id = s.hospital_id and c.id = s.child_id
       left join order_versions v on v.hospital_id = s.hospital_id and v.child_id = s.child_id and v.live
       where s.ward_id = '$WARD' and s.to_at is null`,
      ['stays_o', 'order_versions_live_by_child'],
    ],
    [
      'the queue of checks',
      `select code from covered_versions where live and state = 'awaiting-check' order by check_due_at`,
      ['order_versions_queue'],
    ],
    [
      'search by the beginning of a surname',
      `select id from children where surname_key >= 'surname499' and surname_key < 'surname49:'`,
      ['children_surname_key'],
    ],
  ])('%s', async (_name, query, indexes) => {
    const lines = await inTransaction(app, hospital.id, 'read only', (tx) =>
      tx.execute<{ 'QUERY PLAN': string }>(`explain (costs off) ${query.replace('$WARD', hospital.wardId)}`),
    );
    const plan = lines.map((line) => line['QUERY PLAN']).join('\n');
    for (const index of indexes) expect(plan).toMatch(new RegExp(`(using|on) ${index}`));
    expect(plan).not.toMatch(/Seq Scan on order_versions/);
  });
});
