import type { Actor } from '@shared/accounts/actor';
import type { Request } from 'express';
import { depsOf, type Deps } from '../http/deps';
import { authOf, secretIn } from './auth-of';
import type { SessionRow } from './session-adapter';
import { TOUCH_SESSION } from './session-sql';

/** A poll of an open page carries this header and does not count as someone being there. */
const BACKGROUND = 'x-brimline-background';
const MINUTE = 60_000;

/** How a request stands: signed in or not, locked after idling or by hand, or suspended by a visit beside. */
export type Standing = 'none' | 'open' | 'locked' | 'suspended';

export type Visit = {
  standing: Standing;
  /** Why it does not stand open, for the person. */
  words: string;
  actor: Actor | null;
  session: SessionRow | null;
  cookieHeader: string;
  agent: string;
};

const WORDS: Readonly<Record<Standing, string>> = {
  none: 'You are not signed in, or your session has ended.',
  open: '',
  locked: 'Type your password to go on. Nothing on the page is lost.',
  suspended: 'Someone is checking beside you. This session waits until that visit is closed.',
};

/** The person of a session, as commands and tables of permission know them. */
export function actorOf(session: SessionRow): Actor {
  if (session.account === null) throw new TypeError('a session without a person has no actor');
  const { id, name, title, roles, registrationNumber, wards } = session.account;
  return {
    id,
    hospitalId: session.hospitalId,
    name,
    title,
    roles,
    registrationNumber,
    wards,
    sessionId: session.hash,
  };
}

function standingOf(session: SessionRow, now: number): Standing {
  if (session.suspendedBy !== null) {
    // a visit beside that ran out leaves the screen locked: who sits there is not known
    return session.suspendedUntil !== null && session.suspendedUntil > now ? 'suspended' : 'locked';
  }
  return session.lockedAt !== null || session.idleUntil <= now ? 'locked' : 'open';
}

/** Reads the session of a request and, when someone is there, moves its idle limit. */
export async function knock(deps: Deps, request: Request): Promise<Visit> {
  const cookieHeader = request.headers.cookie ?? '';
  const agent = request.get('user-agent') ?? '';
  const outside = { standing: 'none', words: WORDS.none, actor: null, session: null } as const;
  const secret = secretIn(deps, 'session', cookieHeader);
  if (secret === undefined) return { ...outside, cookieHeader, agent };
  const { session } = await authOf(deps).validateSession(secret);
  if (session === null || session.row.kind !== 'own') return { ...outside, cookieHeader, agent };
  const standing = standingOf(session.row, deps.clock.now());
  if (standing === 'open' && request.get(BACKGROUND) === undefined) await touch(deps, session.row);
  return {
    standing,
    words: WORDS[standing],
    actor: actorOf(session.row),
    session: session.row,
    cookieHeader,
    agent,
  };
}

/** When the idle limit would be reached if nothing more is done. */
export const idleEnd = (deps: Deps): string =>
  new Date(deps.clock.now() + deps.env.SESSION_IDLE_MINUTES * MINUTE).toISOString();

/** At most one write a minute: the limit is kept to the minute, not to the request. */
async function touch(deps: Deps, session: SessionRow): Promise<void> {
  const idle = deps.env.SESSION_IDLE_MINUTES * MINUTE;
  const gain = deps.clock.now() + idle - session.idleUntil;
  if (gain < Math.min(MINUTE, idle / 4)) return;
  await deps.db.sql.unsafe(TOUCH_SESSION, [session.hash, idleEnd(deps)], { prepare: true });
}

/** The visit of a request outside the route registry, for instance one that answers with a file. */
export const knockOf = (request: Request): Promise<Visit> => knock(depsOf(request), request);
