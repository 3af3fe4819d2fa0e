import type { Me } from '@shared/routes/accounts';
import { toRfc3339 } from '@shared/time';
import type { SessionAccount, SessionRow } from '../auth/session-adapter';
import type { Deps } from '../http/deps';

/** Who is signed in, as the client keeps it. */
export function presentMe(deps: Deps, session: SessionRow, locked: boolean): Me {
  const account = session.account as SessionAccount;
  const { id, name, title, roles, registrationNumber, wards, hospital } = account;
  return {
    account: { id, name, title, roles, registrationNumber, email: session.email },
    hospital,
    wards: wards.map((ward) => ({ id: ward.wardId, name: ward.name, entitlements: ward.entitlements })),
    session: {
      id: session.hash,
      locked,
      idleUntil: toRfc3339(session.idleUntil),
      absoluteUntil: toRfc3339(session.absoluteUntil),
      idleMinutes: deps.env.SESSION_IDLE_MINUTES,
    },
    now: toRfc3339(deps.clock.now()),
    hasMailbox: deps.env.BRIMLINE_MAILBOX !== undefined,
  };
}

const BROWSERS: readonly (readonly [RegExp, string])[] = [
  [/Edg\//, 'Edge'],
  [/Firefox\//, 'Firefox'],
  [/Chrom(e|ium)\//, 'Chromium'],
  [/Safari\//, 'Safari'],
];
const SYSTEMS: readonly (readonly [RegExp, string])[] = [
  [/iPad|iPhone/, 'iPad or iPhone'],
  [/Android/, 'Android'],
  [/Windows/, 'Windows'],
  [/Mac OS X/, 'Mac'],
  [/Linux/, 'Linux'],
];

/** A browser in words: enough to know one's own, no more. */
export function deviceWords(agent: string): string {
  const find = (table: typeof BROWSERS) => table.find(([pattern]) => pattern.test(agent))?.[1];
  const browser = find(BROWSERS) ?? 'Another program';
  const system = find(SYSTEMS);
  return system === undefined ? browser : `${browser} on ${system}`;
}
