import { FLAGS } from '@shared/calc/types';
import { readContent } from '@shared/orders/build-content';
import { columnsOf } from '@shared/orders/content-columns';
import { isOverdue, VERSION_STATES } from '@shared/orders/states';
import { HOUR, instant } from '@shared/time';
import { isNotNull, sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { fixedClock } from '../../../server/clock';
import { DEMO_PASSWORD, demoSignIns } from '../../../server/demo/people';
import { seedDemo } from '../../../server/demo/seed';
import { openDatabase, type Database } from '../../../server/db/client';
import { checks, exceptions } from '../../../server/db/schema/checks';
import { children, fluidPlans, intakes } from '../../../server/db/schema/children';
import { hospitals } from '../../../server/db/schema/hospitals';
import { nearMisses } from '../../../server/db/schema/near-misses';
import { drafts, orderVersions } from '../../../server/db/schema/orders';
import { outbox } from '../../../server/db/schema/outbox';
import { signatures } from '../../../server/db/schema/signatures';
import { weights } from '../../../server/db/schema/weights';
import { inTransaction, type Tx } from '../../../server/db/transaction';
import { verifyChain } from '../../../server/ledger/verify';
import { freshDatabase } from '../support/database';

/** The morning after a clock change in London: the hour that came twice lies in the timeline. */
const NOW = instant(Date.UTC(2026, 9, 25, 10, 20));

const place = await freshDatabase();
let database: Database;
let hospitalId: string;

const within = <T>(work: (tx: Tx) => Promise<T>): Promise<T> =>
  inTransaction(database, hospitalId, 'read only', work);

beforeAll(async () => {
  await seedDemo({ ...place, now: NOW });
  database = openDatabase(place.appUrl, { clock: fixedClock(NOW) });
  const [hospital] = await database.db.select().from(hospitals);
  hospitalId = hospital!.id;
}, 180_000);

afterAll(() => database?.close());

describe('the demo hospital', () => {
  it('has a ledger that holds', async () => {
    const verdict = await verifyChain(database, hospitalId);
    expect(verdict.whole).toBe(true);
    expect(verdict.rows).toBeGreaterThan(300);
  });

  it('shows every state the rulebook lets an order have', async () => {
    const rows = await within((tx) => tx.selectDistinct({ state: orderVersions.state }).from(orderVersions));
    // rulebook 1 asks no pharmacist to verify
    const expected = VERSION_STATES.filter((state) => state !== 'awaiting-pharmacist');
    expect(rows.map(({ state }) => state).sort()).toEqual([...expected].sort());
  });

  it('has a child with every flag', async () => {
    const rows = await within((tx) => tx.select({ flags: children.flags }).from(children));
    expect(new Set(rows.flatMap(({ flags }) => flags))).toEqual(new Set(FLAGS));
  });

  it('keeps the query columns of every signed version equal to its content', async () => {
    const rows = await within((tx) =>
      tx.select().from(orderVersions).where(isNotNull(orderVersions.content)),
    );
    expect(rows.length).toBeGreaterThan(15);
    for (const row of rows) expect(row).toMatchObject(columnsOf(readContent(row.content!)));
  });

  it('signs each version by its author with the hash of its content', async () => {
    const rows = await within((tx) =>
      tx
        .select({ by: signatures.by, sha256: signatures.contentSha256, version: orderVersions })
        .from(signatures)
        .innerJoin(orderVersions, sql`${orderVersions.id} = ${signatures.versionId}`)
        .where(sql`${signatures.meaning} = 'author'`),
    );
    for (const { by, sha256, version } of rows) {
      expect(by).toBe(version.authorId);
      expect(sha256).toBe(version.contentSha256);
    }
  });

  it('has an overdue order, and one that lapses within two hours', async () => {
    const rows = await within((tx) =>
      tx.select().from(orderVersions).where(isNotNull(orderVersions.lapsesAt)),
    );
    expect(rows.some(({ state, lapsesAt }) => isOverdue(state, lapsesAt, NOW))).toBe(true);
    const soon = rows.filter(
      ({ state, lapsesAt }) => state === 'running' && lapsesAt! > NOW && lapsesAt! < NOW + 2 * HOUR,
    );
    expect(soon).not.toHaveLength(0);
  });

  it('has a stale weight, one of no use yet, and a newborn under two days', async () => {
    const rows = await within((tx) => tx.select().from(weights));
    expect(rows.some(({ at }) => NOW - at > 7 * 24 * HOUR)).toBe(true);
    expect(rows.some(({ needs, confirmedAt }) => needs !== 'nothing' && confirmedAt === null)).toBe(true);
    const misses = await within((tx) => tx.select().from(nearMisses));
    expect(misses.some(({ limitCode }) => limitCode === 'looks-like-pounds')).toBe(true);
    const born = await within((tx) => tx.select({ bornAt: children.bornAt }).from(children));
    expect(born.some(({ bornAt }) => bornAt !== null && NOW - bornAt < 48 * HOUR)).toBe(true);
  });

  it('has a plan, a bolus from elsewhere, and every way an exception goes', async () => {
    const [plans, elsewhere, matters] = await within((tx) =>
      Promise.all([tx.select().from(fluidPlans), tx.select().from(intakes), tx.select().from(exceptions)]),
    );
    expect(plans).toHaveLength(1);
    expect(elsewhere).toHaveLength(1);
    expect(new Set(matters.map(({ state }) => state))).toEqual(new Set(['asked', 'granted', 'refused']));
    const owed = matters.filter(
      ({ how, countersignedAt }) => how === 'telephone' && countersignedAt === null,
    );
    expect(owed).toHaveLength(1);
  });

  it('has checks that agreed, differed, were returned and passed on, and near misses of each', async () => {
    const [rows, misses] = await within((tx) =>
      Promise.all([tx.select({ state: checks.state }).from(checks), tx.select().from(nearMisses)]),
    );
    const states = new Set(rows.map(({ state }) => state));
    for (const state of ['agreed', 'differed', 'returned', 'passed-on'] as const)
      expect(states).toContain(state);
    const classes = new Set(misses.map((miss) => miss.class));
    for (const each of ['check-differed', 'check-returned', 'weight'] as const)
      expect(classes).toContain(each);
    expect(misses.some(({ limitCode }) => limitCode === 'bolus-volume')).toBe(true);
    expect(misses.some(({ limitCode }) => limitCode === 'pump-ten-times')).toBe(true);
  });

  it('keeps cautions with their reasons, and waits for a senior on a high-risk order', async () => {
    const rows = await within((tx) => tx.select().from(orderVersions));
    const contents = rows.flatMap(({ content }) => (content === null ? [] : [readContent(content)]));
    const reasons = contents.flatMap(({ limits }) => limits).filter(({ reason }) => reason !== null);
    const fractions = contents.filter(
      ({ inputs }) => inputs.kind === 'maintenance' && inputs.fractionReason !== null,
    );
    expect(reasons.length + fractions.length).toBeGreaterThan(0);
    expect(rows.some(({ state, isHighRisk }) => state === 'awaiting-check' && isHighRisk)).toBe(true);
  });

  it('leaves half-typed drafts and the mail of the last hours to the program', async () => {
    const [typed, letters] = await within((tx) =>
      Promise.all([tx.select().from(drafts), tx.select({ state: outbox.state }).from(outbox)]),
    );
    expect(typed.length).toBeGreaterThan(3);
    const states = letters.map(({ state }) => state);
    expect(states).toContain('sent');
    expect(states).toContain('due');
    expect(states).not.toContain('dead');
  });

  it('leaves nobody signed in', async () => {
    const [row] = await database.sql.unsafe('select count(*)::int as n from auth.sessions');
    expect(row).toEqual({ n: 0 });
  });
});

describe('the demo sign-ins', () => {
  it('are invented, one address each, with one easy password', () => {
    const emails = demoSignIns.map(({ email }) => email);
    expect(new Set(emails).size).toBe(emails.length);
    for (const email of emails) expect(email).toMatch(/^[a-z.]+@saltmarsh\.example$/);
    expect(new Set(demoSignIns.map(({ password }) => password))).toEqual(new Set([DEMO_PASSWORD]));
  });
});
