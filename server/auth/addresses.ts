import { and, eq } from 'drizzle-orm';
import { accounts } from '../db/schema/accounts';
import { logins } from '../db/schema/auth';
import type { Tx } from '../db/transaction';

/** Where mail for an account goes; undefined when it can no longer sign in. */
export async function emailOf(tx: Tx, accountId: string): Promise<string | undefined> {
  const [row] = await tx
    .select({ email: logins.email, disabledAt: logins.disabledAt })
    .from(accounts)
    .innerJoin(logins, and(eq(logins.hospitalId, accounts.hospitalId), eq(logins.id, accounts.loginId)))
    .where(eq(accounts.id, accountId));
  return row && row.disabledAt === null ? row.email : undefined;
}
