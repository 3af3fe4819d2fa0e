/** Statements on the auth schema, prepared once per connection. */

const columns = `
  s.id as "hash", s.login_id as "loginId", l.hospital_id as "hospitalId", l.email,
  l.disabled_at is not null as "isDisabled", s.kind,
  s.made_at::text as "madeAt", s.idle_until::text as "idleUntil", s.absolute_until::text as "absoluteUntil",
  s.locked_at::text as "lockedAt", s.suspended_by as "suspendedBy", b.absolute_until::text as "suspendedUntil",
  s.beside_of as "besideOf", s.version_id as "versionId", coalesce(s.agent, '') as "agent"`;

const tables = `
  auth.sessions s
  join auth.logins l on l.id = s.login_id
  left join auth.sessions b on b.id = s.suspended_by`;

/** Also names the hospital to the transaction, for the statement that follows in the same message. */
export const SESSION_BY_ID = `
  select ${columns}, set_config('app.hospital_id', l.hospital_id::text, true) as "hospitalSet"
  from ${tables} where s.id = $1`;

export const ACCOUNT_OF_SESSION = `
  select a.id, a.name, a.title, a.roles, a.registration_no as "registrationNumber",
    json_build_object('id', h.id, 'name', h.name, 'zone', h.zone) as hospital,
    coalesce((
      select json_agg(json_build_object('wardId', m.ward_id, 'name', w.name, 'entitlements', m.entitlements)
        order by w.name)
      from memberships m join wards w on w.hospital_id = m.hospital_id and w.id = m.ward_id
      where m.hospital_id = a.hospital_id and m.account_id = a.id and w.closed_at is null), '[]'::json) as wards
  from auth.sessions s
  join auth.logins l on l.id = s.login_id
  join accounts a on a.hospital_id = l.hospital_id and a.login_id = l.id and a.deactivated_at is null
  join hospitals h on h.id = l.hospital_id
  where s.id = $1`;

export const SESSIONS_OF_LOGIN = `
  select ${columns} from ${tables}
  where s.login_id = $1 and s.kind = 'own' and s.absolute_until > $2::timestamptz
  order by s.made_at desc`;

export const INSERT_SESSION = `
  insert into auth.sessions
    (id, login_id, kind, made_at, idle_until, absolute_until, beside_of, version_id, agent)
  values ($1, $2, $3, $4::timestamptz, $5::timestamptz, $6::timestamptz, $7, $8::uuid, $9)`;

export const DELETE_SESSION = `delete from auth.sessions where id = $1`;
export const DELETE_OF_LOGIN = `delete from auth.sessions where login_id = $1`;
export const DELETE_EXPIRED = `delete from auth.sessions where absolute_until <= $1::timestamptz`;

export const TOUCH_SESSION = `
  update auth.sessions set idle_until = $2::timestamptz where id = $1 and locked_at is null`;
export const LOCK_SESSION = `
  update auth.sessions set locked_at = $2::timestamptz where id = $1 and locked_at is null`;
export const UNLOCK_SESSION = `
  update auth.sessions set locked_at = null, suspended_by = null, idle_until = $2::timestamptz where id = $1`;
export const REVOKE_SESSION = `
  delete from auth.sessions where id = $1 and login_id = $2 and kind = 'own' returning id`;

export const SUSPEND_SESSION = `
  update auth.sessions set suspended_by = $2 where id = $1 and kind = 'own' returning id`;
export const RELEASE_SESSION = `
  update auth.sessions set suspended_by = null where suspended_by = $1`;

export const LOGIN_BY_EMAIL = `
  select id, hospital_id as "hospitalId" from auth.logins where lower(email) = lower($1)`;
export const PASSWORD_OF_LOGIN = `
  select password_hash as "passwordHash", coalesce(locked_until > $2::timestamptz, false) as "isLocked",
    disabled_at is not null as "isDisabled", failed_count as "failedCount"
  from auth.logins where id = $1`;
export const LOGIN_OF_SESSION = `select login_id as "loginId" from auth.sessions where id = $1`;

/** A try after a lock has run out counts from one again. */
export const COUNT_FAILURE = `
  update auth.logins set
    failed_count = case when locked_until is null then failed_count + 1 else 1 end,
    locked_until = case
      when (case when locked_until is null then failed_count + 1 else 1 end) >= $3::int then $4::timestamptz end
  where id = $1 and (locked_until is null or locked_until <= $2::timestamptz)
  returning locked_until is not null as "isLocked"`;
export const CLEAR_FAILURES = `
  update auth.logins set failed_count = 0, locked_until = null where id = $1 and failed_count > 0`;
