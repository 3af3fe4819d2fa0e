import type { Actor } from '@shared/accounts/actor';
import { CLINICAL_ROLES } from '@shared/accounts/actor';
import { and, eq, isNull } from 'drizzle-orm';
import { refused, type Refused } from '../db/outcome';
import { accounts, memberships } from '../db/schema/accounts';
import type { Tx } from '../db/transaction';

export type Witness = Pick<Actor, 'id' | 'name' | 'title' | 'registrationNumber'>;
type Found = { ok: true; witness: Witness } | { ok: false; refusal: Refused };

const unfit = (detail: string): Found => ({
  ok: false,
  refusal: refused('witness-needed', { detail, errors: [{ pointer: '/witness/email', detail }] }),
});

/** The witness behind a login that was just verified: of this ward, entitled, and another person than the starter. */
export async function findWitness(
  tx: Tx,
  loginId: string,
  wardId: string,
  starterId: string,
): Promise<Found> {
  const [row] = await tx
    .select({
      id: accounts.id,
      name: accounts.name,
      title: accounts.title,
      roles: accounts.roles,
      registrationNumber: accounts.registrationNumber,
      entitlements: memberships.entitlements,
    })
    .from(accounts)
    .leftJoin(memberships, and(eq(memberships.accountId, accounts.id), eq(memberships.wardId, wardId)))
    .where(and(eq(accounts.loginId, loginId), isNull(accounts.deactivatedAt)));
  if (row === undefined) return unfit('That person cannot witness here.');
  if (row.id === starterId) return unfit('The witness is another person than the one who starts.');
  const isClinical = row.roles.some((role) => CLINICAL_ROLES.includes(role));
  const isEntitled = row.entitlements?.some((each) => each === 'witness' || each === 'checking') ?? false;
  if (!isClinical || row.registrationNumber === null || !isEntitled) {
    return unfit('That person is not entitled to witness on this ward.');
  }
  return { ok: true, witness: row };
}
