import { Lucia, TimeSpan } from 'lucia';
import type { Deps } from '../http/deps';
import { sessionAdapter, type NewSession, type SessionRow } from './session-adapter';

declare module 'lucia' {
  interface Register {
    Lucia: Auth;
    DatabaseSessionAttributes: NewSession | SessionRow;
    DatabaseUserAttributes: Record<never, never>;
    UserId: string;
  }
}

export type Auth = Lucia<{ row: SessionRow }>;

const made = new WeakMap<object, Auth>();

const secure = (deps: Deps): boolean => new URL(deps.env.PUBLIC_URL).protocol === 'https:';

/** Cookies ignore ports, so their names carry it: two installations on one machine stay apart. */
export function cookieName(deps: Deps, purpose: 'session' | 'beside'): string {
  const { port, protocol } = new URL(deps.env.PUBLIC_URL);
  return `brimline_${purpose}_${port === '' ? (protocol === 'https:' ? '443' : '80') : port}`;
}

/** The session library of this application, one for each database it was made with. */
export function authOf(deps: Deps): Auth {
  const known = made.get(deps.db);
  if (known) return known;
  const auth: Auth = new Lucia(sessionAdapter(deps), {
    sessionExpiresIn: new TimeSpan(deps.env.SESSION_ABSOLUTE_HOURS, 'h'),
    sessionCookie: {
      name: cookieName(deps, 'session'),
      attributes: { sameSite: 'strict', secure: secure(deps), path: '/' },
    },
    // what the adapter reads is always a whole row
    getSessionAttributes: (attributes) => ({ row: attributes as SessionRow }),
  });
  made.set(deps.db, auth);
  return auth;
}

/** The secret in a Cookie header; undefined when there is none. Read by hand: a cookie of another program may be no text. */
export function secretIn(
  deps: Deps,
  purpose: 'session' | 'beside',
  cookieHeader: string,
): string | undefined {
  const name = `${cookieName(deps, purpose)}=`;
  const pair = cookieHeader
    .split(';')
    .map((part) => part.trim())
    .find((part) => part.startsWith(name));
  return pair?.slice(name.length) || undefined;
}

/** A Set-Cookie for a visit beside someone: sent to the beside routes only. */
export function besideCookie(deps: Deps, secret: string, seconds: number): string {
  const flags = `Path=/api/beside; Max-Age=${seconds}; HttpOnly; SameSite=Strict${secure(deps) ? '; Secure' : ''}`;
  return `${cookieName(deps, 'beside')}=${secret}; ${flags}`;
}
