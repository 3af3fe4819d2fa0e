import { ROUTES } from '@shared/routes';
import type { Router } from 'express';
import { passwordRefusal, verifyPasswordAgain } from '../auth/verify-password-again';
import { inHospital, readInHospital } from '../db/in-hospital';
import { done } from '../db/outcome';
import { bind } from '../http/handle';
import { discardDraft } from './commands/discard-draft';
import { noteRead } from './commands/note-read';
import { recordGiven } from './commands/record-given';
import { reviseOrder } from './commands/revise-order';
import { saveDraft } from './commands/save-draft';
import { openDispute, settleDispute } from './commands/settle-dispute';
import { signOrder } from './commands/sign-order';
import { startDraft } from './commands/start-draft';
import { withdrawOrder } from './commands/withdraw-order';
import { readOrder } from './present-order';
import { readDraft } from './read-draft';

/** Orders from their first draft to the end of their author's part. */
export function bindOrders(router: Router): void {
  bindDrafts(router);
  bindSigning(router);

  bind(router, ROUTES.order, async ({ deps, actor, params }) => {
    const read = await readInHospital(deps.db, actor, (tx, now) => readOrder(tx, actor, params.id, now));
    if (!read.ok) return read.refusal;
    const { view, loaded } = read;
    const isUnsigned = loaded.row.checkedAt === null && loaded.row.givenAt === null;
    if (view.open !== null && isUnsigned && !view.you.isAuthor) {
      await inHospital(deps.db, actor, {}, (tx, now) => noteRead(tx, now, actor, params.id));
    }
    return done(view);
  });

  bind(router, ROUTES.withdraw, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['withdraw', params, body] }, (tx, now) =>
      withdrawOrder(tx, now, actor, { versionId: params.id, reason: body.reason }),
    ),
  );

  bind(router, ROUTES.revise, ({ deps, actor, params, key }) =>
    inHospital(deps.db, actor, { key, request: ['revise', params] }, (tx, now) =>
      reviseOrder(tx, now, actor, params.id),
    ),
  );

  bind(router, ROUTES.disputeMatter, ({ deps, actor, params, key }) =>
    inHospital(deps.db, actor, { key, request: ['disputeMatter', params] }, (tx, now) =>
      openDispute(tx, now, actor, params.id),
    ),
  );
}

function bindDrafts(router: Router): void {
  bind(router, ROUTES.startDraft, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['startDraft', params, body] }, (tx, now) =>
      startDraft(tx, now, actor, { childId: params.id, ...body }),
    ),
  );

  bind(router, ROUTES.draft, ({ deps, actor, params }) =>
    readInHospital(deps.db, actor, (tx, now) => readDraft(tx, actor, params.id, now)),
  );

  bind(router, ROUTES.saveDraft, ({ deps, actor, params, body, key }) =>
    inHospital(deps.db, actor, { key, request: ['saveDraft', params, body] }, (tx, now) =>
      saveDraft(tx, now, actor, { versionId: params.id, ...body }),
    ),
  );

  bind(router, ROUTES.discardDraft, ({ deps, actor, params, key }) =>
    inHospital(deps.db, actor, { key, request: ['discardDraft', params] }, (tx, now) =>
      discardDraft(tx, now, actor, params.id),
    ),
  );
}

/** Acts that ask for the password again: it is verified before their transaction, where a failure counts. */
function bindSigning(router: Router): void {
  bind(router, ROUTES.sign, async ({ deps, actor, params, body, key }) => {
    const verdict = await verifyPasswordAgain(deps, actor, body.password);
    if (verdict !== 'ok') return passwordRefusal(verdict);
    return inHospital(deps.db, actor, { key, request: ['sign', params, body] }, (tx, now) =>
      signOrder(tx, now, actor, { versionId: params.id, rev: body.rev, seen: body.seen }),
    );
  });

  bind(router, ROUTES.settle, async ({ deps, actor, params, body, key }) => {
    const verdict = await verifyPasswordAgain(deps, actor, body.password);
    if (verdict !== 'ok') return passwordRefusal(verdict);
    return inHospital(deps.db, actor, { key, request: ['settle', params, body] }, (tx, now) =>
      settleDispute(tx, now, actor, { versionId: params.id, reason: body.reason }),
    );
  });

  bind(router, ROUTES.recordGiven, async ({ deps, actor, params, body, key }) => {
    const verdict = await verifyPasswordAgain(deps, actor, body.password);
    if (verdict !== 'ok') return passwordRefusal(verdict);
    return inHospital(deps.db, actor, { key, request: ['recordGiven', params, body] }, (tx, now) =>
      recordGiven(tx, now, actor, { childId: params.id, ...body }),
    );
  });
}
