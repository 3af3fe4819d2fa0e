import type { Actor } from '@shared/accounts/actor';
import { useKnownMe } from './use-me';

/** The signed-in person as the tables of permission know them. */
export function useActor(): Actor {
  const { account, hospital, wards, session } = useKnownMe();
  return {
    ...account,
    hospitalId: hospital.id,
    wards: wards.map(({ id, name, entitlements }) => ({ wardId: id, name, entitlements })),
    sessionId: session.id,
  };
}
