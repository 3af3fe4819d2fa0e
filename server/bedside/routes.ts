import { ROUTES } from '@shared/routes';
import type { Router } from 'express';
import { identify, signInRefusal } from '../auth/sign-in';
import { inHospital, readInHospital } from '../db/in-hospital';
import { bind } from '../http/handle';
import { compareOne } from './commands/compare-step';
import { finish } from './commands/finish';
import { hold } from './commands/hold';
import { recordStart } from './commands/record-start';
import { resume } from './commands/resume';
import { sendAway } from './commands/send-away';
import { stop } from './commands/stop';
import { addStopReason } from './commands/stop-reason';
import { readBedsidePage } from './read-page';

/** What a nurse does at the bedside. */
export function bindBedside(router: Router): void {
  bind(router, ROUTES.bedside, ({ deps, actor, params }) =>
    readInHospital(deps.db, actor, (tx, now) => readBedsidePage(tx, actor, params.id, now)),
  );
  bind(router, ROUTES.compareStep, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['compareStep', params, body] }, (tx, now) =>
      compareOne(tx, actor, { versionId: params.id, ...body }, now),
    ),
  );
  bind(router, ROUTES.recordStart, async ({ deps, actor, params, body, key }) => {
    const { witness, ...rest } = body;
    const witnessLogin = witness === null ? null : await identify(deps, witness);
    if (witnessLogin === undefined) return signInRefusal(deps);
    return await inHospital(
      deps.db,
      actor,
      { key, request: ['recordStart', params, rest, witnessLogin] },
      (tx, now) => recordStart(tx, actor, { versionId: params.id, witnessLogin, ...rest }, now),
    );
  });
  bindRunning(router);
}

function bindRunning(router: Router): void {
  bind(router, ROUTES.stop, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['stop', params, body] }, (tx, now) =>
      stop(tx, actor, { versionId: params.id, ...body }, now),
    ),
  );
  bind(router, ROUTES.stopReason, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['stopReason', params, body] }, (tx, now) =>
      addStopReason(tx, actor, { versionId: params.id, ...body }, now),
    ),
  );
  bind(router, ROUTES.hold, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['hold', params, body] }, (tx, now) =>
      hold(tx, actor, { versionId: params.id, ...body }, now),
    ),
  );
  bind(router, ROUTES.resume, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['resume', params, body] }, (tx, now) =>
      resume(tx, actor, { versionId: params.id, ...body }, now),
    ),
  );
  bind(router, ROUTES.sendAway, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['sendAway', params, body] }, (tx, now) =>
      sendAway(tx, actor, { versionId: params.id, ...body }, now),
    ),
  );
  bind(router, ROUTES.finish, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['finish', params, body] }, (tx, now) =>
      finish(tx, actor, { versionId: params.id, ...body }, now),
    ),
  );
}
