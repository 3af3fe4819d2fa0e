import type { Instant } from '@shared/time';
import { sql, type SQL } from 'drizzle-orm';
import {
  check,
  customType,
  foreignKey,
  pgPolicy,
  uuid,
  type AnyPgColumn,
  type ForeignKeyBuilder,
} from 'drizzle-orm/pg-core';

/** Throws when a number cannot be stored at that precision without changing it. */
const atScale = (value: number, precision: number, scale: number): string => {
  const text = value.toFixed(scale);
  if (!Number.isFinite(value) || Number(text) !== value || Math.abs(value) >= 10 ** (precision - scale)) {
    throw new RangeError(`numeric(${precision},${scale}) cannot hold ${value} exactly`);
  }
  return text;
};

/**
 * An exact decimal: a number in the program, numeric(p,s) in the database, at most 15 digits. A value with more
 * decimals is refused with a RangeError, because PostgreSQL would round it without a word.
 */
export const decimal = <T extends number = number>(name: string, precision: number, scale: number) =>
  customType<{ data: T; driverData: string }>({
    dataType: () => `numeric(${precision}, ${scale})`,
    toDriver: (value) => atScale(value, precision, scale),
    fromDriver: (value) => Number(value) as T,
  })(name);

/** A moment: epoch milliseconds in the program, timestamptz in the database. Connections run in UTC. */
export const instant = customType<{ data: Instant; driverData: string }>({
  dataType: () => 'timestamp (3) with time zone',
  toDriver: (value) => new Date(value).toISOString(),
  fromDriver: (value) => readInstant(value),
});

/** The driver's text of a timestamptz ("2026-06-10 07:50:00.123+00") as an instant; throws on anything else. */
export function readInstant(text: string): Instant {
  const match = /^(\d{4,}-\d\d-\d\d)[ T](\d\d:\d\d:\d\d(?:\.\d{1,3})?)(?:\+00|Z)$/.exec(text);
  const ms = match ? Date.parse(`${match[1]}T${match[2]}Z`) : NaN;
  if (Number.isNaN(ms)) throw new RangeError(`not an instant in UTC: ${text}`);
  return ms as Instant;
}

/** Text ordered by code unit whatever the cluster's locale, so that a prefix is a range. */
export const codeUnitText = customType<{ data: string; driverData: string }>({
  dataType: () => 'text collate "C"',
});

/** A SHA-256: lower-case hex in the program, bytea in the database. */
export const sha256 = customType<{ data: string; driverData: Buffer }>({
  dataType: () => 'bytea',
  toDriver: (hex) => {
    if (!/^[0-9a-f]{64}$/.test(hex)) throw new RangeError('not a SHA-256 in lower-case hex');
    return Buffer.from(hex, 'hex');
  },
  fromDriver: (bytes) => Buffer.from(bytes).toString('hex'),
});

const CURRENT_HOSPITAL = sql`nullif(current_setting('app.hospital_id', true), '')::uuid`;

/** The tenant column of every table outside `auth`; filled from the transaction's hospital. */
export const hospitalId = () => uuid('hospital_id').notNull().default(CURRENT_HOSPITAL);

/** Second half of the composite primary key. */
export const rowId = () =>
  uuid('id')
    .notNull()
    .default(sql`gen_random_uuid()`);

/** Rows of the transaction's hospital only; FORCE is added by the migration that guards the table. */
export const ownHospital = () => {
  const rule = sql`hospital_id = ${CURRENT_HOSPITAL}`;
  return pgPolicy('own_hospital', { for: 'all', using: rule, withCheck: rule });
};

type Tenanted = { hospitalId: AnyPgColumn };

/** A foreign key that carries the hospital: foreign keys look past row-level security, so the key itself must not. */
export const within = (
  name: string,
  own: Tenanted,
  column: AnyPgColumn,
  foreign: Tenanted & { id: AnyPgColumn },
): ForeignKeyBuilder =>
  foreignKey({
    name: `${name}_fk`,
    columns: [own.hospitalId, column] as [AnyPgColumn, AnyPgColumn],
    foreignColumns: [foreign.hospitalId, foreign.id] as [AnyPgColumn, AnyPgColumn],
  });

const quoted = (values: readonly string[]): SQL =>
  sql.raw(values.map((value) => `'${value.replaceAll("'", "''")}'`).join(', '));

/** CHECK that a text column holds one of a closed list. */
export const oneOf = (name: string, column: AnyPgColumn, values: readonly string[]) =>
  check(name, sql`${column} in (${quoted(values)})`);

/** CHECK that a text[] column holds nothing outside a closed list. */
export const someOf = (name: string, column: AnyPgColumn, values: readonly string[]) =>
  check(name, sql`${column} <@ array[${quoted(values)}]::text[]`);

/** The list as SQL literals, for partial indexes. */
export const inList = (column: AnyPgColumn | SQL, values: readonly string[]): SQL =>
  sql`${column} in (${quoted(values)})`;

/** A number as an SQL literal: constraints take no parameters. */
export const literal = (value: number): SQL => sql.raw(String(value));

/** CHECK that canonical text and its hash belong together, or are both absent. */
export const hashMatches = (name: string, text: AnyPgColumn, hash: AnyPgColumn) =>
  check(
    name,
    sql`(${text} is null) = (${hash} is null) and (${text} is null or ${hash} = sha256(convert_to(${text}, 'UTF8')))`,
  );
