import { ABSOLUTE } from '@shared/rulebook/absolute';
import { KINDS } from '@shared/calc/types';
import { VERSION_STATES, isLive } from '@shared/orders/states';
import { instant } from '@shared/time';
import { kilograms, millilitres, millilitresPerHour } from '@shared/units';
import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { checks, exceptions } from '../../../server/db/schema/checks';
import { infusions } from '../../../server/db/schema/bedside';
import { orderVersions } from '../../../server/db/schema/orders';
import { products } from '../../../server/db/schema/shelf';
import { rulebooks } from '../../../server/db/schema/rulebook';
import { weights } from '../../../server/db/schema/weights';
import { inTransaction } from '../../../server/db/transaction';
import { sharedDatabase } from '../support/database';
import { aVersion, faultOf, makeHospital, NOON, openAll, plantVersion, sha256Of } from './make-hospital';

const { app, owner, superuser } = openAll(sharedDatabase());

const definitionOf = async (name: string): Promise<string> => {
  const [row] = await superuser.sql<{ text: string }[]>`
    select pg_get_constraintdef(oid) as text from pg_constraint where conname = ${name}`;
  return row?.text ?? '';
};

/** Every number in a constraint, casts aside. */
const numbersIn = (text: string): number[] =>
  [...text.matchAll(/\(?(\d+(?:\.\d+)?)\)?::numeric/g)].map((m) => Number(m[1]));

describe('last resorts', () => {
  it('stand in the database as they stand in the code', async () => {
    expect(numbersIn(await definitionOf('last_resort_maintenance'))).toEqual([
      24,
      ABSOLUTE.maintenanceMlPer24h,
    ]);
    expect(numbersIn(await definitionOf('last_resort_bolus'))).toEqual([
      ABSOLUTE.bolusMl,
      ABSOLUTE.bolusMlPerKg,
    ]);
    expect(numbersIn(await definitionOf('last_resort_weight'))).toEqual([0, ABSOLUTE.weightKgMax]);
  });

  it('lets in exactly the kinds that have one', async () => {
    const kinds = [...(await definitionOf('order_versions_kind')).matchAll(/'([a-z-]+)'::text/g)].map(
      (m) => m[1],
    );
    expect(kinds).toEqual([...KINDS]);
    const { n } = (
      await superuser.sql<{ n: number }[]>`
      select count(*)::int as n from pg_constraint where conname = any (${KINDS.map((kind) => `last_resort_${kind}`)})`
    )[0]!;
    expect(n).toBe(KINDS.length);
  });

  it.each([
    ['104.1 mL/h, which is 2498.4 in 24 h', { rateMlH: millilitresPerHour(104.1) }, undefined],
    [
      '104.17 mL/h, which is 2500.08 in 24 h',
      { rateMlH: millilitresPerHour(104.17) },
      'last_resort_maintenance',
    ],
    ['a maintenance rate of nothing', { rateMlH: null }, 'last_resort_maintenance'],
    ['0 mL/h', { rateMlH: millilitresPerHour(0) }, 'last_resort_positive'],
    ['a bolus of 20 mL/kg', { kind: 'bolus', volumeMl: millilitres(328), rateMlH: null }, undefined],
    [
      'a bolus above 20 mL/kg',
      { kind: 'bolus', volumeMl: millilitres(328.1), rateMlH: null },
      'last_resort_bolus',
    ],
    [
      'a bolus of 500 mL for 62 kg',
      { kind: 'bolus', volumeMl: millilitres(500), weightKg: kilograms(62), rateMlH: null },
      undefined,
    ],
    [
      'a bolus of 620 mL for 62 kg',
      { kind: 'bolus', volumeMl: millilitres(620), weightKg: kilograms(62), rateMlH: null },
      'last_resort_bolus',
    ],
    ['a bolus without its volume', { kind: 'bolus', rateMlH: null }, 'last_resort_bolus'],
    [
      'an unweighed bolus in an emergency',
      { kind: 'bolus', volumeMl: millilitres(200), weightKg: null, urgency: 'emergency', rateMlH: null },
      undefined,
    ],
    [
      'an unweighed bolus without an emergency',
      { kind: 'bolus', volumeMl: millilitres(200), weightKg: null, rateMlH: null },
      'last_resort_bolus',
    ],
  ] satisfies [string, Partial<typeof orderVersions.$inferInsert>, string | undefined][])(
    'answers %s',
    async (_name, change, constraint) => {
      const hospital = await makeHospital(owner);
      const planted = plantVersion(owner, hospital, change);
      if (constraint === undefined) await expect(planted).resolves.toBeDefined();
      else expect(await faultOf(planted)).toMatchObject({ code: '23514', constraint });
    },
  );

  it.each([0, 250.001])('refuses a weight of %d kg', async (kg) => {
    const hospital = await makeHospital(owner);
    const insert = inTransaction(app, hospital.id, 'read write', (tx) =>
      tx.insert(weights).values({
        childId: hospital.childId,
        kg: kg as never,
        method: 'scales',
        at: NOON,
        by: hospital.doctor.id,
        recordedAt: NOON,
      }),
    );
    expect(await faultOf(insert)).toMatchObject({ constraint: 'last_resort_weight' });
  });
});

describe('a version', () => {
  it('counts as live in the database exactly when the code says so', async () => {
    const [row] = await superuser.sql<{ text: string }[]>`
      select pg_get_expr(adbin, adrelid) as text from pg_attrdef d
      join pg_attribute a on a.attrelid = d.adrelid and a.attnum = d.adnum
      where d.adrelid = 'order_versions'::regclass and a.attname = 'live'`;
    const states = [...(row?.text ?? '').matchAll(/'([a-z-]+)'::text/g)].map((m) => m[1]);
    expect(states).toEqual(VERSION_STATES.filter(isLive));
  });

  it('is live once per order', async () => {
    const hospital = await makeHospital(owner);
    const { orderId } = await plantVersion(owner, hospital);
    const second = inTransaction(owner, hospital.id, 'read write', (tx) =>
      tx.insert(orderVersions).values(aVersion(hospital, orderId, { version: 2 })),
    );
    expect(await faultOf(second)).toMatchObject({ constraint: 'order_versions_one_live' });
  });

  it('refuses content whose hash is another', async () => {
    const hospital = await makeHospital(owner);
    const planted = plantVersion(owner, hospital, { content: '{"a":1}', contentSha256: sha256Of('{"a":2}') });
    expect(await faultOf(planted)).toMatchObject({ constraint: 'order_versions_content_sha256' });
  });

  it('refuses content without its hash and a signed state without content', async () => {
    const hospital = await makeHospital(owner);
    const bare = plantVersion(owner, hospital, { contentSha256: null });
    expect(await faultOf(bare)).toMatchObject({ constraint: 'order_versions_content_sha256' });
    const empty = plantVersion(owner, hospital, { content: null, contentSha256: null, signedAt: null });
    expect((await faultOf(empty)).code).toBe('23514');
  });

  const text = '{"rateMlPerH":"45.0"}';
  it.each([
    ['content', { content: text, contentSha256: sha256Of(text) }],
    ['rate', { rateMlH: millilitresPerHour(45) }],
    ['weight', { weightKg: kilograms(16.5) }],
    ['lapse', { lapsesAt: instant(NOON + 1) }],
    ['reason', { reason: 'another' }],
  ] satisfies [string, Partial<typeof orderVersions.$inferInsert>][])(
    'never changes its signed %s, not even for the owner',
    async (_name, change) => {
      const hospital = await makeHospital(owner);
      const { versionId } = await plantVersion(owner, hospital);
      for (const database of [app, owner]) {
        const update = inTransaction(database, hospital.id, 'read write', (tx) =>
          tx.update(orderVersions).set(change).where(eq(orderVersions.id, versionId)),
        );
        expect(await faultOf(update)).toMatchObject({ code: 'BL001' });
      }
    },
  );

  it('moves on in state, and a draft may be filled', async () => {
    const hospital = await makeHospital(owner);
    const { versionId } = await plantVersion(owner, hospital, {
      state: 'draft',
      content: null,
      contentSha256: null,
      signedAt: null,
      rateMlH: null,
    });
    await inTransaction(app, hospital.id, 'read write', async (tx) => {
      const where = eq(orderVersions.id, versionId);
      await tx
        .update(orderVersions)
        .set(aVersion(hospital, 'x', { orderId: undefined }))
        .where(where);
      await tx.update(orderVersions).set({ state: 'signed', checkedAt: NOON, rev: 2 }).where(where);
    });
  });
});

describe('a second person', () => {
  it('checks: never the author, and no author made up', async () => {
    const hospital = await makeHospital(owner);
    const { versionId } = await plantVersion(owner, hospital);
    const open = (authorId: string, checkerId: string) =>
      inTransaction(app, hospital.id, 'read write', (tx) =>
        tx.insert(checks).values({ versionId, authorId, checkerId, state: 'open', openedAt: NOON }),
      );
    const { doctor, checker } = hospital;
    expect(await faultOf(open(doctor.id, doctor.id))).toMatchObject({ constraint: 'checks_by_another' });
    expect(await faultOf(open(checker.id, doctor.id))).toMatchObject({
      constraint: 'checks_version_author_fk',
    });
    await open(doctor.id, checker.id);
    expect(await faultOf(open(doctor.id, checker.id))).toMatchObject({ constraint: 'checks_once' });
  });

  it('grants an exception: never the author', async () => {
    const hospital = await makeHospital(owner);
    const { versionId } = await plantVersion(owner, hospital);
    const grant = inTransaction(app, hospital.id, 'read write', (tx) =>
      tx.insert(exceptions).values({
        versionId,
        authorId: hospital.doctor.id,
        limitCode: 'above-method',
        contentSha256: sha256Of('x'),
        state: 'granted',
        askedAt: NOON,
        by: hospital.doctor.id,
        decidedAt: NOON,
        reason: 'r',
        how: 'here',
      }),
    );
    expect(await faultOf(grant)).toMatchObject({ constraint: 'exceptions_by_another' });
  });

  it('starts the infusion: never the author', async () => {
    const hospital = await makeHospital(owner);
    const { versionId } = await plantVersion(owner, hospital, { state: 'signed' });
    const start = inTransaction(owner, hospital.id, 'read write', async (tx) => {
      const [product] = await tx
        .insert(products)
        .values({
          name: 'Sodium chloride 0.9 %',
          base: 'ns',
          bagSizes: [500],
          kinds: ['maintenance'],
          addedAt: NOON,
        })
        .returning();
      await tx.insert(infusions).values({
        versionId,
        authorId: hospital.doctor.id,
        childId: hospital.childId,
        startedBy: hospital.doctor.id,
        startedAt: NOON,
        bagProductId: product!.id,
        way: 'pump',
        line: 'left hand',
        lineClass: 'peripheral',
        pumpRateMlH: millilitresPerHour(44),
        pumpVolumeMl: millilitres(176),
        comparisons: '{}',
      });
    });
    expect(await faultOf(start)).toMatchObject({ constraint: 'infusions_by_another' });
  });

  it('confirms a weight: never who entered it', async () => {
    const hospital = await makeHospital(owner);
    const confirm = (by: string) =>
      inTransaction(app, hospital.id, 'read write', (tx) =>
        tx
          .update(weights)
          .set({ confirmedBy: by, confirmedAt: NOON })
          .where(eq(weights.id, hospital.weightId)),
      );
    expect(await faultOf(confirm(hospital.doctor.id))).toMatchObject({
      constraint: 'weights_confirmed_by_another',
    });
    await confirm(hospital.checker.id);
  });
});

describe('what is entered once', () => {
  it('locked-in figures never change', async () => {
    const hospital = await makeHospital(owner);
    const { versionId } = await plantVersion(owner, hospital);
    const figures = '{"rate":"44.0"}';
    const change = inTransaction(app, hospital.id, 'read write', async (tx) => {
      await tx.insert(checks).values({
        versionId,
        authorId: hospital.doctor.id,
        checkerId: hospital.checker.id,
        state: 'differed',
        openedAt: NOON,
        figures,
        figuresSha256: sha256Of(figures),
        lockedInAt: NOON,
      });
      await tx.update(checks).set({ state: 'slip' });
      await tx.update(checks).set({ figures: '{}', figuresSha256: sha256Of('{}') });
    });
    expect(await faultOf(change)).toMatchObject({ code: 'BL001' });
  });

  it('a weight is not overwritten', async () => {
    const hospital = await makeHospital(owner);
    const overwrite = (database: typeof app) =>
      inTransaction(database, hospital.id, 'read write', (tx) =>
        tx.update(weights).set({ kg: kilograms(17) }),
      );
    expect(await faultOf(overwrite(app))).toMatchObject({ code: '42501' });
    expect(await faultOf(overwrite(owner))).toMatchObject({ code: 'BL001' });
  });

  it('a rulebook is not edited, and is approved by another person', async () => {
    const hospital = await makeHospital(owner);
    const draft = {
      number: 1,
      state: 'draft' as const,
      content: '{}',
      contentSha256: sha256Of('{}'),
      draftedBy: hospital.doctor.id,
      draftedAt: NOON,
    };
    await inTransaction(owner, hospital.id, 'read write', (tx) => tx.insert(rulebooks).values(draft));
    const put = (change: Partial<typeof rulebooks.$inferInsert>) =>
      inTransaction(owner, hospital.id, 'read write', (tx) => tx.update(rulebooks).set(change));
    const inForce = { state: 'in-force' as const, approvedAt: NOON, inForceFrom: NOON };
    expect(await faultOf(put({ content: '[]', contentSha256: sha256Of('[]') }))).toMatchObject({
      code: 'BL001',
    });
    expect(await faultOf(put({ ...inForce, approvedBy: hospital.doctor.id }))).toMatchObject({
      code: '23514',
    });
    await put({ ...inForce, approvedBy: hospital.checker.id });
  });
});
