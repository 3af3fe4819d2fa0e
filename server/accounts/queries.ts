import { asc, eq, isNull, and } from 'drizzle-orm';
import type { Tx } from '../db/transaction';
import { accounts, memberships } from '../db/schema/accounts';

/** The people of a ward who still work there, by name. */
export const colleaguesOf = (tx: Tx, wardId: string) =>
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
    .where(and(eq(memberships.wardId, wardId), isNull(accounts.deactivatedAt)))
    .orderBy(asc(accounts.name));
