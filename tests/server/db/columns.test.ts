import { instant as asInstant } from '@shared/time';
import { kilograms, millilitresPerHour } from '@shared/units';
import { eq, sql } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { readInstant } from '../../../server/db/columns';
import { weights } from '../../../server/db/schema/weights';
import { orderVersions } from '../../../server/db/schema/orders';
import { inTransaction } from '../../../server/db/transaction';
import { sharedDatabase } from '../support/database';
import { makeHospital, NOON, openAll, plantVersion, sha256Of } from './make-hospital';

const { app, owner } = openAll(sharedDatabase());

const toDriver = (kg: number) => weights.kg.mapToDriverValue(kg);

describe('decimal', () => {
  it.each([
    [16.4, '16.400'],
    [0.001, '0.001'],
    [999.999, '999.999'],
    [4.35, '4.350'],
  ])('writes %d at the scale of its column', (value, text) => {
    expect(toDriver(value)).toBe(text);
  });

  it.each([0.1 + 0.2, 1.0005, 1000, NaN, Infinity, 1e-7])('refuses %d instead of rounding it', (value) => {
    expect(() => toDriver(value)).toThrow(RangeError);
  });

  it('is refused before the database is asked', async () => {
    const hospital = await makeHospital(owner);
    const insert = inTransaction(app, hospital.id, 'read write', (tx) =>
      tx.insert(weights).values({
        childId: hospital.childId,
        kg: (0.1 + 0.2) as never,
        method: 'scales',
        at: NOON,
        by: hospital.doctor.id,
        recordedAt: NOON,
      }),
    );
    await expect(insert).rejects.toThrow(/0\.30000000000000004/);
  });

  it('brings 300 weights back as the same numbers', async () => {
    const hospital = await makeHospital(owner);
    const written = Array.from({ length: 300 }, (_, i) => kilograms(Number((0.5 + i * 0.737).toFixed(3))));
    const read = await inTransaction(app, hospital.id, 'read write', async (tx) => {
      await tx.insert(weights).values(
        written.map((kg) => ({
          childId: hospital.childId,
          kg,
          method: 'scales' as const,
          at: NOON,
          by: hospital.checker.id,
          recordedAt: NOON,
        })),
      );
      return tx
        .select({ kg: weights.kg })
        .from(weights)
        .where(eq(weights.by, hospital.checker.id))
        .orderBy(weights.kg);
    });
    expect(read.map((row) => row.kg)).toEqual(written);
  });

  it('maps sums through the column', async () => {
    const hospital = await makeHospital(owner);
    await plantVersion(owner, hospital, { rateMlH: millilitresPerHour(44.1) });
    await plantVersion(owner, hospital, { rateMlH: millilitresPerHour(0.2) });
    const [row] = await inTransaction(app, hospital.id, 'read only', (tx) =>
      tx
        .select({ total: sql`sum(${orderVersions.rateMlH})`.mapWith(orderVersions.rateMlH) })
        .from(orderVersions),
    );
    expect(row?.total).toBe(44.3);
  });
});

describe('instant', () => {
  it.each([
    ['2026-06-10 07:50:00+00', Date.UTC(2026, 5, 10, 7, 50)],
    ['2026-06-10 07:50:00.12+00', Date.UTC(2026, 5, 10, 7, 50, 0, 120)],
    ['2026-06-10T07:50:00.123Z', Date.UTC(2026, 5, 10, 7, 50, 0, 123)],
  ])('reads %s', (text, ms) => {
    expect(readInstant(text)).toBe(ms);
  });

  it.each(['2026-06-10 07:50:00+01', '2026-06-10 07:50:00', '2026-13-10 07:50:00+00', 'infinity', ''])(
    'refuses %s',
    (text) => {
      expect(() => readInstant(text)).toThrow(RangeError);
    },
  );

  it('comes back to the millisecond', async () => {
    const hospital = await makeHospital(owner);
    const at = asInstant(NOON + 123);
    const { versionId } = await plantVersion(owner, hospital, { askedStart: at });
    const [row] = await inTransaction(app, hospital.id, 'read only', (tx) =>
      tx
        .select({
          at: orderVersions.askedStart,
          hash: orderVersions.contentSha256,
          content: orderVersions.content,
        })
        .from(orderVersions)
        .where(eq(orderVersions.id, versionId)),
    );
    expect(row?.at).toBe(at);
    expect(row?.hash).toBe(sha256Of(row!.content!));
  });
});
