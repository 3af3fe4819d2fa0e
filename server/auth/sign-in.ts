import type { Deps } from '../http/deps';
import { inHospital, refused, theProgram, type Outcome } from '../db/in-hospital';
import { done } from '../db/outcome';
import { authOf, secretIn } from './auth-of';
import { actorOf, type Visit } from './knock';
import { readSessionRow, hashOfSecret, type SessionRow } from './session-adapter';
import { LOGIN_BY_EMAIL } from './session-sql';
import { tryPassword } from './try-password';

export type Credentials = { email: string; password: string };

/** One answer for everything that can be wrong, so that nobody learns who has an account here. */
export const signInRefusal = (deps: Deps) =>
  refused('sign-in-refused', {
    detail:
      'E-mail address or password is wrong. ' +
      `After ${deps.env.LOCKOUT_TRIES} wrong tries an account waits ${deps.env.LOCKOUT_MINUTES} minutes.`,
  });

/** The login whose e-mail and password these are; undefined leaves one row in the ledger. */
export async function identify(deps: Deps, { email, password }: Credentials): Promise<string | undefined> {
  const rows = await deps.db.sql.unsafe<{ id: string; hospitalId: string }[]>(LOGIN_BY_EMAIL, [email], {
    prepare: true,
  });
  const login = rows[0];
  const verdict = await tryPassword(deps, login?.id ?? null, password);
  if (login !== undefined && verdict === 'ok') return login.id;
  await inHospital(deps.db, theProgram(login?.hospitalId), {}, () =>
    Promise.resolve(
      refused(verdict === 'locked' ? 'account-locked' : 'sign-in-refused', {
        entries: [{ act: 'sign-in-refused', subject: { kind: 'login', id: login?.id ?? 'unknown' } }],
      }),
    ),
  );
  return undefined;
}

/** Signs someone in and gives the Set-Cookie; an earlier session of the same browser ends. */
export async function signIn(
  deps: Deps,
  visit: Visit,
  credentials: Credentials,
): Promise<Outcome<{ session: SessionRow; cookie: string }>> {
  const loginId = await identify(deps, credentials);
  if (loginId === undefined) return signInRefusal(deps);
  const auth = authOf(deps);
  const earlier = secretIn(deps, 'session', visit.cookieHeader);
  if (earlier !== undefined) await auth.invalidateSession(earlier);
  const made = await auth.createSession(loginId, { kind: 'own', agent: visit.agent });
  const session = await readSessionRow(deps, hashOfSecret(made.id));
  if (session === null || session.account === null || session.isDisabled) {
    await auth.invalidateSession(made.id);
    return signInRefusal(deps);
  }
  const entries = [{ act: 'signed-in', subject: { kind: 'account', id: session.account.id } }] as const;
  await inHospital(deps.db, actorOf(session), {}, () => Promise.resolve(done(null, { entries })));
  return done({ session, cookie: auth.createSessionCookie(made.id).serialize() });
}

/** Ends a session; the cookie in the answer clears the browser's. */
export async function signOut(deps: Deps, visit: Visit): Promise<string> {
  const auth = authOf(deps);
  const secret = secretIn(deps, 'session', visit.cookieHeader);
  if (secret !== undefined) await auth.invalidateSession(secret);
  return auth.createBlankSessionCookie().serialize();
}
