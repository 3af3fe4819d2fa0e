import { canonicalText } from '@shared/canonical';
import { instant } from '@shared/time';
import { kilograms, millilitresPerHour } from '@shared/units';
import { createHash, randomUUID } from 'node:crypto';
import { afterAll } from 'vitest';
import { fixedClock } from '../../../server/clock';
import { openDatabase, type Database } from '../../../server/db/client';
import type { Acting } from '../../../server/db/in-hospital';
import { accounts } from '../../../server/db/schema/accounts';
import { children } from '../../../server/db/schema/children';
import { hospitals, wards } from '../../../server/db/schema/hospitals';
import { logins } from '../../../server/db/schema/auth';
import { orders, orderVersions } from '../../../server/db/schema/orders';
import { weights } from '../../../server/db/schema/weights';
import { inTransaction } from '../../../server/db/transaction';
import type { TestDatabase } from '../support/database';

export const NOON = instant(Date.UTC(2026, 5, 10, 12));

export const sha256Of = (text: string): string => createHash('sha256').update(text, 'utf8').digest('hex');

/** The three ways in, on a clock that stands at noon; closed after the file. */
export function openAll(test: TestDatabase) {
  const clock = fixedClock(NOON);
  const open = (url: string, name: string) => openDatabase(url, { max: 10, clock, applicationName: name });
  const app = open(test.appUrl, 'test-app');
  const owner = open(test.ownerUrl, 'test-owner');
  const superuser = open(test.superUrl, 'test-super');
  afterAll(() => Promise.all([app, owner, superuser].map((database) => database.close())));
  return { app, owner, superuser, clock };
}

export type Hospital = {
  id: string;
  doctor: Acting & { id: string };
  checker: Acting & { id: string };
  wardId: string;
  childId: string;
  weightId: string;
};

async function makeAccount(
  owner: Database,
  hospitalId: string,
  name: string,
): Promise<Acting & { id: string }> {
  const [login] = await owner.db
    .insert(logins)
    .values({ hospitalId, email: `${randomUUID()}@example.invalid` })
    .returning();
  const id = await inTransaction(owner, hospitalId, 'read write', async (tx) => {
    const [account] = await tx
      .insert(accounts)
      .values({ loginId: login!.id, name, title: 'Registrar', roles: ['prescriber'] })
      .returning();
    return account!.id;
  });
  return { id, hospitalId, name, roles: ['prescriber'] };
}

/** A hospital of its own for one test: two doctors, a ward, a child of 16.4 kg. */
export async function makeHospital(owner: Database): Promise<Hospital> {
  const [hospital] = await owner.db
    .insert(hospitals)
    .values({ name: `Invented ${randomUUID()}`, zone: 'Europe/London' })
    .returning();
  const id = hospital!.id;
  const doctor = await makeAccount(owner, id, 'Dr Imogen Vale');
  const checker = await makeAccount(owner, id, 'Dr Piers Okonjo');
  const rest = await inTransaction(owner, id, 'read write', async (tx) => {
    const [ward] = await tx.insert(wards).values({ name: 'Heron' }).returning();
    const [child] = await tx
      .insert(children)
      .values({
        number: 'SM-1',
        surname: 'Ångström',
        given: 'Tove',
        bornOn: '2022-03-01',
        allergies: 'None known',
        registeredBy: doctor.id,
        registeredAt: NOON,
      })
      .returning();
    const [weight] = await tx
      .insert(weights)
      .values({
        childId: child!.id,
        kg: kilograms(16.4),
        method: 'scales',
        at: NOON,
        by: doctor.id,
        recordedAt: NOON,
      })
      .returning();
    return { wardId: ward!.id, childId: child!.id, weightId: weight!.id };
  });
  return { id, doctor, checker, ...rest };
}

let codes = 0;

/** Values of an order, for inserting. */
export const anOrder = (hospital: Hospital): typeof orders.$inferInsert => ({
  code: `BL-260610-${String(++codes).padStart(3, '0')}`,
  childId: hospital.childId,
  kind: 'maintenance',
  madeBy: hospital.doctor.id,
  madeAt: NOON,
});

/** Values of a signed maintenance version, for inserting. */
export function aVersion(
  hospital: Hospital,
  orderId: string,
  change: Partial<typeof orderVersions.$inferInsert> = {},
): typeof orderVersions.$inferInsert {
  const content = canonicalText({ schema: 1, rateMlPerH: '44.0', orderId });
  return {
    orderId,
    version: 1,
    childId: hospital.childId,
    kind: 'maintenance',
    state: 'awaiting-check',
    stateSince: NOON,
    authorId: hospital.doctor.id,
    content,
    contentSha256: sha256Of(content),
    signedAt: NOON,
    weightId: hospital.weightId,
    weightKg: kilograms(16.4),
    rateMlH: millilitresPerHour(44),
    ...change,
  };
}

/** An order with one version in the database; returns their ids. */
export function plantVersion(
  owner: Database,
  hospital: Hospital,
  change: Partial<typeof orderVersions.$inferInsert> = {},
): Promise<{ orderId: string; versionId: string }> {
  return inTransaction(owner, hospital.id, 'read write', async (tx) => {
    const [order] = await tx
      .insert(orders)
      .values({ ...anOrder(hospital), kind: change.kind ?? 'maintenance' })
      .returning();
    const [version] = await tx
      .insert(orderVersions)
      .values(aVersion(hospital, order!.id, change))
      .returning();
    return { orderId: order!.id, versionId: version!.id };
  });
}

/** The SQLSTATE and constraint a promise is rejected with; fails the test when it resolves. */
export async function faultOf(
  work: Promise<unknown>,
): Promise<{ code?: string; constraint?: string; message: string }> {
  try {
    await work;
  } catch (error) {
    const cause = (error as Error).cause instanceof Error ? (error as Error).cause : error;
    const {
      code,
      constraint_name: constraint,
      message,
    } = cause as Error & { code?: string; constraint_name?: string };
    return { code, constraint, message };
  }
  throw new Error('it was not refused');
}
