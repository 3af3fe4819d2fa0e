import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import type { TransactionSql } from 'postgres';
import { appendEntries } from '../ledger/append';
import type { LedgerEntry, LedgerNote } from '../ledger/entries';
import { claimKey, keepAnswer, type AnswerKey } from './answers';
import type { Database } from './client';
import { constraintRefusal, DatabaseUnavailable, isUnavailable, withoutValues } from './faults';
import { refused, type Answer, type Outcome, type Refused } from './outcome';
import { nearMisses } from './schema/near-misses';
import { outbox } from './schema/outbox';
import { inTransaction, INSTALLATION, type Tx } from './transaction';

/** Who acts, as far as the database needs to know; `id` null is the program itself. */
export type Acting = Pick<Actor, 'hospitalId' | 'name' | 'roles'> & { id: string | null };

/** The clock, the sweep, the mailer: no person. */
export const theProgram = (hospitalId: string = INSTALLATION): Acting => ({
  id: null,
  hospitalId,
  name: 'Brimline',
  roles: [],
});

export type RunOptions = {
  /** Made by the client, one per intended act: a repeat gets the first answer. Needs a person. */
  key?: string | undefined;
  /** What the key stands for; a `password` in it is left out of the hash. */
  request?: unknown;
  /** What is being tried: logged as refused when the command or a constraint refuses without saying so. */
  attempt?: LedgerNote;
};

export type Command<T> = (tx: Tx, now: Instant) => Promise<Outcome<T>>;

type Run = { database: Database; actor: Acting; now: Instant; options: RunOptions };

/**
 * The only way to change a hospital's data: key → command → mail → ledger → commit, in one transaction. A refusal
 * is returned and recorded while its writes are undone; the value must be plain JSON, since a repeated key gets it
 * from storage. Throws DatabaseUnavailable when nothing was recorded, and whatever else is our own fault.
 */
export async function inHospital<T>(
  database: Database,
  actor: Acting,
  options: RunOptions,
  command: Command<T>,
): Promise<Answer<T>> {
  const run: Run = { database, actor, now: database.clock.now(), options };
  try {
    return await inTransaction(database, actor.hospitalId, 'read write', (tx, sql) =>
      act(run, tx, sql, command),
    );
  } catch (error) {
    const broken = constraintRefusal(error);
    if (!broken) throw thrown(error);
    return await orUnavailable(recordBroken(run, broken));
  }
}

/** The only way to read a hospital's data: a read-only transaction. Throws DatabaseUnavailable. */
export function readInHospital<T>(
  database: Database,
  actor: Pick<Acting, 'hospitalId'>,
  query: (tx: Tx, now: Instant) => Promise<T>,
): Promise<T> {
  const now = database.clock.now();
  return orUnavailable(inTransaction(database, actor.hospitalId, 'read only', (tx) => query(tx, now)));
}

const thrown = (error: unknown): unknown =>
  isUnavailable(error) ? new DatabaseUnavailable(withoutValues(error)) : withoutValues(error);

async function orUnavailable<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    throw thrown(error);
  }
}

async function act<T>(run: Run, tx: Tx, sql: TransactionSql, command: Command<T>): Promise<Answer<T>> {
  const key = keyOf(run);
  const earlier = key && (await claimKey(tx, key, run.now));
  if (earlier) return earlier as Answer<T>;

  await sql.unsafe('savepoint command');
  const outcome = await command(tx, run.now);
  if (!outcome.ok) await sql.unsafe('rollback to savepoint command');
  return await settle(run, tx, sql, outcome);
}

/** Everything after the command, ledger head last. */
async function settle<T>(run: Run, tx: Tx, sql: TransactionSql, outcome: Outcome<T>): Promise<Answer<T>> {
  const answer = answerOf(outcome);
  const key = keyOf(run);
  if (outcome.ok && outcome.mails.length > 0) {
    await tx
      .insert(outbox)
      .values(
        outcome.mails.map(({ dueAt, ...mail }) => ({ ...mail, madeAt: run.now, dueAt: dueAt ?? run.now })),
      );
  }
  if (outcome.nearMisses?.length) {
    await tx
      .insert(nearMisses)
      .values(outcome.nearMisses.map((miss) => ({ ...miss, by: run.actor.id, at: run.now })))
      .onConflictDoNothing();
  }
  if (key) await keepAnswer(tx, key, answer);
  const entries = entriesOf(run, outcome);
  if (entries.length > 0) await appendEntries(sql, entries);
  return answer;
}

/** A constraint rolled everything back: the refusal is recorded in a transaction of its own. */
function recordBroken<T>(
  run: Run,
  broken: NonNullable<ReturnType<typeof constraintRefusal>>,
): Promise<Answer<T>> {
  const entry: LedgerNote = run.options.attempt ?? {
    act: 'write-refused',
    subject: { kind: 'constraint', id: broken.constraint },
  };
  return inTransaction(run.database, run.actor.hospitalId, 'read write', async (tx, sql) => {
    const key = keyOf(run);
    const earlier = key && (await claimKey(tx, key, run.now));
    if (earlier) return earlier as Answer<T>;
    return await settle<T>(run, tx, sql, refused(broken.code, { entries: [entry] }));
  });
}

function keyOf({ actor, options }: Run): AnswerKey | undefined {
  if (options.key === undefined) return undefined;
  if (actor.id === null) throw new TypeError('an idempotency key belongs to a person');
  return { accountId: actor.id, key: options.key, request: options.request };
}

function answerOf<T>(outcome: Outcome<T>): Answer<T> {
  if (outcome.ok) return { ok: true, value: outcome.value, replayed: false };
  const { code, detail, errors, data } = outcome;
  return {
    ok: false,
    code,
    ...(detail === undefined ? {} : { detail }),
    ...(errors === undefined ? {} : { errors }),
    ...(data === undefined ? {} : { data }),
    replayed: false,
  };
}

function entriesOf(run: Run, outcome: Outcome<unknown>): LedgerEntry[] {
  const { id, name, roles } = run.actor;
  return notesOf(run, outcome).map((note) => ({
    ...note,
    at: new Date(run.now).toISOString(),
    actor: id === null ? null : { id, name, roles: [...roles] },
    ...(outcome.ok ? { outcome: 'done' as const } : { outcome: 'refused' as const, refusal: outcome.code }),
  }));
}

const notesOf = (run: Run, outcome: Outcome<unknown>): readonly LedgerNote[] => {
  if (outcome.entries && outcome.entries.length > 0) return outcome.entries;
  return !outcome.ok && run.options.attempt ? [run.options.attempt] : [];
};

export type { Answer, Outcome, Refused };
export { done, refused } from './outcome';
