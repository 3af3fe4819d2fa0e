import { isOnWard, type Actor } from '@shared/accounts/actor';
import { ROUTES } from '@shared/routes';
import { toRfc3339 } from '@shared/time';
import type { Router } from 'express';
import { closeBesideSession, openBesideSession, readBesideSession, type BesideVisit } from '../auth/beside';
import { passwordRefusal, verifyPasswordAgain } from '../auth/verify-password-again';
import { inHospital, readInHospital } from '../db/in-hospital';
import { done, refused, type Outcome } from '../db/outcome';
import { bind } from '../http/handle';
import type { Deps } from '../http/deps';
import { closeBeside } from './commands/close-beside';
import { lockIn } from './commands/lock-in';
import { openBeside } from './commands/open-beside';
import { saveCheck } from './commands/save-check';
import { signCheck } from './commands/sign-check';
import { readCheckPage } from './read-page';
import { loadFacts } from '../orders/facts';
import { NO_SUCH_ORDER } from '../orders/lock-version';

const ENDED = refused('signed-out', { detail: 'This visit is over. Open it again from the order.' });

/** The check on the author's own device, by the checker's own credentials and cookie, for one order. */
export function bindBeside(router: Router): void {
  bind(router, ROUTES.openBeside, async ({ deps, actor, params, body, setCookie }) => {
    const mayStandBeside = await besideWhom(deps, actor, params.id);
    if (!mayStandBeside.ok) return mayStandBeside;
    const mayOpen = (checker: Actor) =>
      inHospital(deps.db, actor, {}, (tx, now) =>
        openBeside(tx, { checker, versionId: params.id, besideHospital: actor.hospitalId }, now),
      ).then((answer): Outcome<null> => (answer.ok ? done(null) : answer));
    const opened = await openBesideSession(deps, body, params.id, actor.sessionId, mayOpen);
    if (!opened.ok) return opened;
    setCookie(opened.value.cookie);
    return done({ until: toRfc3339(opened.value.until), checkerName: opened.value.actor.name });
  });
  bind(router, ROUTES.besidePage, async ({ deps, visit }) => {
    const beside = await readBesideSession(deps, visit.cookieHeader);
    if (beside === null) return ENDED;
    const page = await pageOf(deps, beside);
    if (!page.ok) return page;
    const who = { checkerName: beside.actor.name, until: toRfc3339(beside.until) };
    return done({ ...page.value, visit: who });
  });
  bindBesideActs(router);
  bind(router, ROUTES.closeBeside, async ({ deps, visit, setCookie, key }) => {
    const beside = await readBesideSession(deps, visit.cookieHeader);
    if (beside === null) return done({ ok: true as const });
    const closed = await inHospital(deps.db, beside.actor, { key }, (tx, now) =>
      closeBeside(tx, beside.actor, beside.versionId, now),
    );
    setCookie(await closeBesideSession(deps, beside));
    return closed;
  });
}

function bindBesideActs(router: Router): void {
  bind(router, ROUTES.besideSave, async ({ deps, visit, body, key }) => {
    const beside = await readBesideSession(deps, visit.cookieHeader);
    if (beside === null) return ENDED;
    const { actor, versionId } = beside;
    return await inHospital(deps.db, actor, { key, request: ['besideSave', versionId, body] }, (tx, now) =>
      saveCheck(tx, actor, { versionId, isBeside: true, ...body }, now),
    );
  });
  bind(router, ROUTES.besideLockIn, async ({ deps, visit, body, key }) => {
    const beside = await readBesideSession(deps, visit.cookieHeader);
    if (beside === null) return ENDED;
    const { actor, versionId } = beside;
    const locked = await inHospital(
      deps.db,
      actor,
      { key, request: ['besideLockIn', versionId, body] },
      (tx, now) => lockIn(tx, actor, { versionId, isBeside: true, ...body }, now),
    );
    return locked.ok ? await pageOf(deps, beside) : locked;
  });
  bind(router, ROUTES.besideSign, async ({ deps, visit, body, key }) => {
    const beside = await readBesideSession(deps, visit.cookieHeader);
    if (beside === null) return ENDED;
    const { actor, versionId } = beside;
    const verdict = await verifyPasswordAgain(deps, actor, body.password);
    if (verdict !== 'ok') return passwordRefusal(verdict);
    return await inHospital(deps.db, actor, { key, request: ['besideSign', versionId, body] }, (tx, now) =>
      signCheck(tx, actor, { versionId, ...body }, now),
    );
  });
}

const pageOf = (deps: Deps, { actor, versionId }: BesideVisit) =>
  readInHospital(deps.db, actor, (tx, now) => readCheckPage(tx, actor, versionId, now));

/** Only the author's own screen can be lent: anyone else checks from their own. */
const besideWhom = (deps: Deps, actor: Actor, versionId: string): Promise<Outcome<null>> =>
  readInHospital(deps.db, actor, async (tx, now) => {
    const version = await loadFacts(tx, actor, versionId, now);
    if (version === null) return NO_SUCH_ORDER;
    const isOnIt = version.ward !== null && isOnWard(actor, version.ward.id);
    return isOnIt && version.facts.you.includes('author')
      ? done(null)
      : refused('own-check', { detail: 'Only the author’s screen opens this. Check from your own.' });
  });
