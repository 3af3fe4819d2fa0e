import { CLINICAL_ROLES, type Entitlement, type Role } from '@shared/accounts/actor';
import { and, eq, isNotNull, isNull, sql } from 'drizzle-orm';
import { accounts, memberships } from '../db/schema/accounts';
import { exceptions, seenFigures } from '../db/schema/checks';
import { orderVersions } from '../db/schema/orders';
import { statement } from '../db/statement';
import type { Tx } from '../db/transaction';

export type Colleague = {
  id: string;
  name: string;
  title: string;
  roles: readonly Role[];
  entitlements: readonly Entitlement[];
};

const colleaguesOfWard = statement((tx) =>
  tx
    .select({
      id: accounts.id,
      name: accounts.name,
      title: accounts.title,
      roles: accounts.roles,
      entitlements: memberships.entitlements,
    })
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(
      and(
        eq(memberships.wardId, sql.placeholder('wardId')),
        isNull(accounts.deactivatedAt),
        isNotNull(accounts.registrationNumber),
      ),
    ),
);

/** Everyone of a ward who may act clinically: in service and with a registration number. */
export const findColleagues = (tx: Tx, wardId: string): Promise<Colleague[]> =>
  colleaguesOfWard(tx, { wardId });

const isClinical = ({ roles }: Colleague): boolean => roles.some((role) => CLINICAL_ROLES.includes(role));

/** Whether a colleague may check an order of this risk on the ward whose entitlements they carry. */
export const mayCheck = (colleague: Colleague, isHighRisk: boolean): boolean =>
  isClinical(colleague) &&
  (colleague.roles.includes('pharmacist') ||
    (colleague.entitlements.includes('checking') &&
      (!isHighRisk || colleague.entitlements.includes('senior'))));

export const isSenior = (colleague: Colleague): boolean =>
  colleague.entitlements.includes('senior') &&
  colleague.roles.some((role) => role === 'prescriber' || role === 'lead');

type Matter = { orderId: string; versionId: string; wardId: string; authorId: string; isHighRisk: boolean };

/** Checkers of the ward who are neither the author nor a granter and have not seen the figures of this order. */
export async function findCheckers(tx: Tx, matter: Matter): Promise<Colleague[]> {
  const colleagues = await findColleagues(tx, matter.wardId);
  const barred = await barredFrom(tx, matter);
  return colleagues.filter(
    (colleague) => !barred.has(colleague.id) && mayCheck(colleague, matter.isHighRisk),
  );
}

const sawOrder = statement((tx) =>
  tx
    .selectDistinct({ id: seenFigures.accountId })
    .from(seenFigures)
    .innerJoin(orderVersions, eq(orderVersions.id, seenFigures.versionId))
    .where(eq(orderVersions.orderId, sql.placeholder('orderId'))),
);
const wroteOrder = statement((tx) =>
  tx
    .selectDistinct({ id: orderVersions.authorId })
    .from(orderVersions)
    .where(eq(orderVersions.orderId, sql.placeholder('orderId'))),
);
const decidedOn = statement((tx) =>
  tx
    .selectDistinct({ id: exceptions.by })
    .from(exceptions)
    .where(and(eq(exceptions.versionId, sql.placeholder('versionId')), isNotNull(exceptions.by))),
);

async function barredFrom(tx: Tx, { orderId, versionId, authorId }: Matter): Promise<Set<string>> {
  const saw = await sawOrder(tx, { orderId });
  const authors = await wroteOrder(tx, { orderId });
  const granters = await decidedOn(tx, { versionId });
  return new Set([authorId, ...[...saw, ...authors, ...granters].flatMap(({ id }) => id ?? [])]);
}
