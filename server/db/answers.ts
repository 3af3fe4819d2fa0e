import type { Instant } from '@shared/time';
import { and, eq, lt } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import type { Answer } from './outcome';
import { answers } from './schema/outbox';
import type { Tx } from './transaction';

export type AnswerKey = { accountId: string; key: string; request: unknown };

/** Passwords stay out: a quick hash of one must not lie about for a day. */
const hashOf = (request: unknown): string =>
  createHash('sha256')
    .update(
      JSON.stringify(request ?? null, (name, value: unknown) => (name === 'password' ? undefined : value)),
    )
    .digest('hex');

const rowOf = ({ accountId, key }: AnswerKey) => and(eq(answers.accountId, accountId), eq(answers.key, key));

/**
 * Takes the key for this transaction, waiting for another one that holds it. Returns the first answer when there
 * is one, a `key-reused` refusal when the key came with another request, and undefined when the act is ours to do.
 */
export async function claimKey(tx: Tx, key: AnswerKey, now: Instant): Promise<Answer<unknown> | undefined> {
  const requestSha256 = hashOf(key.request);
  const taken = await tx
    .insert(answers)
    .values({ accountId: key.accountId, key: key.key, requestSha256, at: now })
    .onConflictDoNothing()
    .returning({ key: answers.key });
  if (taken.length > 0) return undefined;

  const [first] = await tx.select().from(answers).where(rowOf(key));
  if (!first || first.requestSha256 !== requestSha256 || first.body === null) {
    return { ok: false, code: 'key-reused', replayed: false };
  }
  return { ...(JSON.parse(first.body) as Answer<unknown>), replayed: true };
}

/** Keeps the answer beside its key. */
export async function keepAnswer(tx: Tx, key: AnswerKey, answer: Answer<unknown>): Promise<void> {
  await tx
    .update(answers)
    .set({ status: answer.ok ? 'done' : 'refused', body: JSON.stringify(answer) })
    .where(rowOf(key));
}

/** Forgets the answers made before `before`; returns nothing, runs in the hospital's sweep. */
export async function forgetAnswers(tx: Tx, before: Instant): Promise<void> {
  await tx.delete(answers).where(lt(answers.at, before));
}
