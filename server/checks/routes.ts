import { ROUTES } from '@shared/routes';
import type { Router } from 'express';
import { passwordRefusal, verifyPasswordAgain } from '../auth/verify-password-again';
import { inHospital, readInHospital } from '../db/in-hospital';
import { done } from '../db/outcome';
import { bind } from '../http/handle';
import { bindBeside } from './beside-routes';
import { cannotVerify } from './commands/cannot-verify';
import { countersignGiven } from './commands/countersign-given';
import { lockIn } from './commands/lock-in';
import { passOn } from './commands/pass-on';
import { saveCheck } from './commands/save-check';
import { signCheck } from './commands/sign-check';
import { slip } from './commands/slip';
import { readCheckPage } from './read-page';
import { readQueue } from './read-queue';

/** The queue, the covered page, and every act of an independent check. */
export function bindChecks(router: Router): void {
  bind(router, ROUTES.checkQueue, async ({ deps, actor }) =>
    done(await readInHospital(deps.db, actor, (tx, now) => readQueue(tx, actor, now))),
  );
  bind(router, ROUTES.checkPage, ({ deps, actor, params }) =>
    readInHospital(deps.db, actor, (tx, now) => readCheckPage(tx, actor, params.id, now)),
  );
  bindOwnFigures(router);
  bindWaysOut(router);
  bindBeside(router);
}

function bindOwnFigures(router: Router): void {
  bind(router, ROUTES.saveCheck, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['saveCheck', params, body] }, (tx, now) =>
      saveCheck(tx, actor, { versionId: params.id, isBeside: false, ...body }, now),
    ),
  );
  bind(router, ROUTES.lockIn, async ({ deps, actor, params, body, key }) => {
    const locked = await inHospital(deps.db, actor, { key, request: ['lockIn', params, body] }, (tx, now) =>
      lockIn(tx, actor, { versionId: params.id, isBeside: false, ...body }, now),
    );
    if (!locked.ok) return locked;
    // committed: only now may the other set be read
    return await readInHospital(deps.db, actor, (tx, now) => readCheckPage(tx, actor, params.id, now));
  });
  bind(router, ROUTES.signCheck, async ({ deps, actor, params, body, key }) => {
    const verdict = await verifyPasswordAgain(deps, actor, body.password);
    if (verdict !== 'ok') return passwordRefusal(verdict);
    return await inHospital(deps.db, actor, { key, request: ['signCheck', params, body] }, (tx, now) =>
      signCheck(tx, actor, { versionId: params.id, ...body }, now),
    );
  });
  bind(router, ROUTES.countersignGiven, async ({ deps, actor, params, body, key }) => {
    const verdict = await verifyPasswordAgain(deps, actor, body.password);
    if (verdict !== 'ok') return passwordRefusal(verdict);
    return await inHospital(deps.db, actor, { key, request: ['countersignGiven', params, body] }, (tx, now) =>
      countersignGiven(tx, actor, { versionId: params.id, ...body }, now),
    );
  });
}

function bindWaysOut(router: Router): void {
  bind(router, ROUTES.cannotVerify, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['cannotVerify', params, body] }, (tx, now) =>
      cannotVerify(tx, actor, { versionId: params.id, ...body }, now),
    ),
  );
  bind(router, ROUTES.passOn, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['passOn', params, body] }, (tx, now) =>
      passOn(tx, actor, { versionId: params.id, ...body }, now),
    ),
  );
  bind(router, ROUTES.slip, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['slip', params, body] }, (tx, now) =>
      slip(tx, actor, { versionId: params.id, ...body }, now),
    ),
  );
}
