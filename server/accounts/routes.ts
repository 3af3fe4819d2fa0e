import { ROUTES } from '@shared/routes';
import { can } from '@shared/orders/can';
import { instant, toRfc3339 } from '@shared/time';
import type { Router } from 'express';
import { lockSession, revokeSession, unlockSession } from '../auth/session-acts';
import { sessionsOfLogin } from '../auth/session-adapter';
import { signIn, signOut } from '../auth/sign-in';
import { inHospital, readInHospital } from '../db/in-hospital';
import { done, refused } from '../db/outcome';
import { bind } from '../http/handle';
import { isDatabaseUp } from './is-database-up';
import { deviceWords, presentMe } from './present';
import { colleaguesOf } from './queries';

/** Signing in and out, the own sessions, and who works on a ward. */
export function bindAccounts(router: Router): void {
  bind(router, ROUTES.health, async ({ deps }) =>
    done({ ok: true as const, database: await isDatabaseUp(deps) }),
  );
  bindSigning(router);
  bindSessions(router);

  bind(router, ROUTES.colleagues, async ({ deps, actor, params }) => {
    const verdict = can(actor, 'read-ward', params.id);
    if (!verdict.allowed) return refused(verdict.code, { detail: verdict.words });
    const people = await readInHospital(deps.db, actor, (tx) => colleaguesOf(tx, params.id));
    // another hospital's ward has nobody in it either
    return people.length === 0 ? refused('not-found') : done({ people });
  });
}

function bindSigning(router: Router): void {
  bind(router, ROUTES.signIn, async ({ deps, visit, body, setCookie }) => {
    const signed = await signIn(deps, visit, body);
    if (!signed.ok) return signed;
    setCookie(signed.value.cookie);
    return done(presentMe(deps, signed.value.session, false));
  });

  bind(router, ROUTES.signOut, async ({ deps, visit, actor, setCookie }) => {
    setCookie(await signOut(deps, visit));
    const entries = [{ act: 'signed-out', subject: { kind: 'account', id: actor.id } }] as const;
    return await inHospital(deps.db, actor, {}, () =>
      Promise.resolve(done({ ok: true as const }, { entries })),
    );
  });

  bind(router, ROUTES.me, ({ deps, visit }) =>
    Promise.resolve(
      visit.session === null
        ? refused('signed-out')
        : done(presentMe(deps, visit.session, visit.standing === 'locked')),
    ),
  );
}

function bindSessions(router: Router): void {
  bind(router, ROUTES.lock, async ({ deps, actor }) => {
    const session = await lockSession(deps, actor);
    return session === null ? refused('signed-out') : done(presentMe(deps, session, true));
  });

  bind(router, ROUTES.unlock, async ({ deps, actor, body }) => {
    const unlocked = await unlockSession(deps, actor, body.password);
    return unlocked.ok ? done(presentMe(deps, unlocked.value, false)) : unlocked;
  });

  bind(router, ROUTES.sessions, async ({ deps, visit }) => {
    if (visit.session === null) return refused('signed-out');
    const { loginId, hash } = visit.session;
    const idle = deps.env.SESSION_IDLE_MINUTES * 60_000;
    const rows = await sessionsOfLogin(deps, loginId);
    return done({
      sessions: rows.map((row) => ({
        id: row.hash,
        madeAt: toRfc3339(row.madeAt),
        lastSeenAt: toRfc3339(instant(row.idleUntil - idle)),
        device: deviceWords(row.agent),
        isThis: row.hash === hash,
      })),
    });
  });

  bind(router, ROUTES.revokeSession, async ({ deps, actor, visit, params }) => {
    const isRevoked = await revokeSession(deps, actor, visit.session?.loginId ?? '', params.id);
    return isRevoked
      ? done({ ok: true as const })
      : refused('not-found', { detail: 'That session has ended.' });
  });
}
