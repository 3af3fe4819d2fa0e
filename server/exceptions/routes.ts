import { ROUTES } from '@shared/routes';
import type { Router } from 'express';
import { passwordRefusal, verifyPasswordAgain } from '../auth/verify-password-again';
import { inHospital, readInHospital } from '../db/in-hospital';
import { done } from '../db/outcome';
import { bind } from '../http/handle';
import { askException, telephoneException } from './ask-exception';
import { countersignException, decideException } from './decide-exception';
import { presentMatter } from './present-matter';
import { exceptionsFor } from './queries';

/** Senior exceptions: asked, agreed here or by telephone, countersigned. */
export function bindExceptions(router: Router): void {
  bind(router, ROUTES.exceptionsForMe, async ({ deps, actor }) =>
    done(await readInHospital(deps.db, actor, (tx) => exceptionsFor(tx, actor))),
  );

  bind(router, ROUTES.askException, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['askException', params, body] }, (tx, now) =>
      askException(tx, now, actor, { versionId: params.id, ...body }),
    ),
  );

  bind(router, ROUTES.telephoneException, async ({ deps, actor, params, body, key }) => {
    const verdict = await verifyPasswordAgain(deps, actor, body.password);
    if (verdict !== 'ok') return passwordRefusal(verdict);
    return inHospital(deps.db, actor, { key, request: ['telephoneException', params, body] }, (tx, now) =>
      telephoneException(tx, now, actor, { versionId: params.id, ...body }),
    );
  });

  bind(router, ROUTES.exceptionMatter, ({ deps, actor, params, key }) =>
    inHospital(deps.db, actor, { key, request: ['exceptionMatter', params] }, (tx, now) =>
      presentMatter(tx, now, actor, params.id),
    ),
  );

  bind(router, ROUTES.decideException, async ({ deps, actor, params, body, key }) => {
    const verdict = await verifyPasswordAgain(deps, actor, body.password);
    if (verdict !== 'ok') return passwordRefusal(verdict);
    return inHospital(deps.db, actor, { key, request: ['decideException', params, body] }, (tx, now) =>
      decideException(tx, now, actor, { versionId: params.id, ...body }),
    );
  });

  bind(router, ROUTES.countersignException, async ({ deps, actor, params, body, key }) => {
    const verdict = await verifyPasswordAgain(deps, actor, body.password);
    if (verdict !== 'ok') return passwordRefusal(verdict);
    return inHospital(deps.db, actor, { key, request: ['countersignException', params] }, (tx, now) =>
      countersignException(tx, now, actor, params.id),
    );
  });
}
