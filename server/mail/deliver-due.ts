import { and, asc, eq, lte } from 'drizzle-orm';
import type { Transporter } from 'nodemailer';
import { formatDateTime, parseInstant, type Instant } from '@shared/time';
import { emailOf } from '../auth/addresses';
import type { Database } from '../db/client';
import { done, inHospital, theProgram, type Outcome } from '../db/in-hospital';
import { hospitals } from '../db/schema/hospitals';
import { outbox } from '../db/schema/outbox';
import type { Tx } from '../db/transaction';
import type { LedgerNote } from '../ledger/entries';
import { isMailKind, writeLetter, type MailRef } from './letters';

/** Given up after this many tries; what is dead shows on the due list. */
export const MAX_ATTEMPTS = 8;

/** Wait before the next try: 5 s, doubling, at most 10 min. */
export const backoffMs = (attempts: number): number =>
  Math.min(600_000, 5_000 * 2 ** Math.max(0, attempts - 1));

export type Post = { transporter: Transporter; from: string; publicUrl: string };

type Row = typeof outbox.$inferSelect;

const claim = async (tx: Tx, now: Instant): Promise<Row | undefined> => {
  const [row] = await tx
    .select()
    .from(outbox)
    .where(and(eq(outbox.state, 'due'), lte(outbox.dueAt, now)))
    .orderBy(asc(outbox.dueAt))
    .limit(1)
    .for('update', { skipLocked: true });
  return row;
};

const note = (act: 'mail-sent' | 'mail-dead', row: Row): LedgerNote => ({
  act,
  subject: { kind: 'mail', id: row.id },
  ...(row.ref.code ? { code: row.ref.code } : {}),
  to: row.kind,
});

const letterOf = (row: Row, zone: string, publicUrl: string) => {
  if (!isMailKind(row.kind)) throw new TypeError(`no letter for ${row.kind}`);
  return writeLetter(row.kind, row.ref as MailRef, publicUrl, (at) => {
    const due = parseInstant(at);
    return due === undefined ? at : `${formatDateTime(due, zone)} (${zone})`;
  });
};

/** One letter: sent, put off, or given up. At least once, with a fixed Message-ID so that a second copy is known. */
async function sendOne(
  post: Post,
  zone: string,
  tx: Tx,
  row: Row,
  now: Instant,
): Promise<Outcome<'sent' | 'later' | 'dead'>> {
  const attempts = row.attempts + 1;
  const here = and(eq(outbox.hospitalId, row.hospitalId), eq(outbox.id, row.id));
  try {
    const to = await emailOf(tx, row.toAccount);
    if (to === undefined) throw new Error('the account has no usable address');
    const { subject, text } = letterOf(row, zone, post.publicUrl);
    await post.transporter.sendMail({
      from: post.from,
      to,
      subject,
      text,
      messageId: `<${row.id}@brimline.invalid>`,
      headers: { 'Auto-Submitted': 'auto-generated' },
    });
    await tx.update(outbox).set({ state: 'sent', attempts, sentAt: now, lastError: null }).where(here);
    return done('sent', { entries: [note('mail-sent', row)] });
  } catch (error) {
    // the reason without the address: it goes to the log and the due list
    const lastError =
      error instanceof Error ? error.message.replace(/\S+@\S+/g, '…').slice(0, 300) : 'unknown';
    if (attempts >= MAX_ATTEMPTS) {
      await tx.update(outbox).set({ state: 'dead', attempts, lastError }).where(here);
      return done('dead', { entries: [note('mail-dead', row)] });
    }
    await tx
      .update(outbox)
      .set({ attempts, lastError, dueAt: (now + backoffMs(attempts)) as Instant })
      .where(here);
    return done('later');
  }
}

/** Sends what is due in one hospital, one letter a transaction, until nothing is; returns how many were sent. */
export async function deliverDue(
  database: Database,
  post: Post,
  hospital: { id: string; zone: string },
  limit = 200,
): Promise<number> {
  let sent = 0;
  for (let tries = 0; tries < limit; tries += 1) {
    const answer = await inHospital(
      database,
      theProgram(hospital.id),
      {},
      async (tx, now): Promise<Outcome<'sent' | 'later' | 'dead' | 'none'>> => {
        const row = await claim(tx, now);
        return row ? await sendOne(post, hospital.zone, tx, row, now) : done('none');
      },
    );
    if (!answer.ok || answer.value === 'none') return sent;
    if (answer.value === 'sent') sent += 1;
  }
  return sent;
}

export const listHospitals = (database: Database): Promise<{ id: string; zone: string }[]> =>
  database.db.select({ id: hospitals.id, zone: hospitals.zone }).from(hospitals);
