import type { Actor } from '@shared/accounts/actor';
import { can } from '@shared/orders/can';
import { maySee } from '@shared/orders/coverage';
import { PRINT_PDF_PATH, ROUTES } from '@shared/routes';
import type { Request, Response, Router } from 'express';
import { knock } from '../auth/knock';
import { findPrint } from '../db/transaction';
import { inHospital, readInHospital } from '../db/in-hospital';
import { done, refused } from '../db/outcome';
import { orderPdf } from '../documents/order-pdf';
import { depsOf } from '../http/deps';
import { bind } from '../http/handle';
import { sendProblem } from '../http/problem';
import { loadFacts } from '../orders/facts';
import { makePrint } from './commands/make-print';
import { draftContent } from './draft-content';
import { loadPaper } from './load-paper';
import { paperStanding, UNKNOWN_PAPER } from './paper-standing';

/** Papers: making a print, its PDF, and whether a paper in the hand is current. */
export function bindPrints(router: Router): void {
  bind(router, ROUTES.makePrint, ({ deps, actor, params, key }) =>
    inHospital(deps.db, actor, { key, request: { print: params.id } }, (tx, now) =>
      makePrint(tx, actor, params.id, now),
    ),
  );
  bind(router, ROUTES.paper, async ({ deps, actor, params }) => {
    const print = await findPrint(deps.db, params.code);
    if (!print) return done(UNKNOWN_PAPER);
    // another hospital's person is a stranger here
    const reader = actor?.hospitalId === print.hospitalId ? actor : null;
    return done(
      await readInHospital(deps.db, { hospitalId: print.hospitalId }, (tx, now) =>
        paperStanding(tx, params.code, reader, now),
      ),
    );
  });
  router.get(PRINT_PDF_PATH, sendPdf);
}

async function sendPdf(request: Request, response: Response): Promise<void> {
  const deps = depsOf(request);
  const visit = await knock(deps, request);
  if (visit.standing === 'none' || visit.actor === null) return sendProblem(response, 'signed-out', {});
  if (visit.standing !== 'open') return sendProblem(response, 'session-locked', { detail: visit.words });
  const { actor } = visit;
  const code = String(request.params.code);
  const paper = await readPaper(deps, actor, code);
  if (!paper.ok) return sendProblem(response, paper.code, {});
  const pdf = await orderPdf(paper.value);
  response
    .type('application/pdf')
    .set(
      'Content-Disposition',
      `inline; filename="${paper.value.content.code}-version-${paper.value.content.version}.pdf"`,
    )
    .send(pdf);
}

async function readPaper(deps: ReturnType<typeof depsOf>, actor: Actor, code: string) {
  const print = await findPrint(deps.db, code);
  if (print?.hospitalId !== actor.hospitalId) return refused('not-found');
  return await readInHospital(deps.db, actor, async (tx, now) => {
    const loaded = await loadFacts(tx, actor, print.versionId, now);
    const isTheirs =
      loaded?.ward && can(actor, 'print-order', loaded.ward.id).allowed && maySee(loaded.coverage);
    if (!isTheirs) return refused('not-found');
    const paper = await loadPaper(tx, code, deps.env.PUBLIC_URL, () =>
      draftContent(tx, loaded, actor.hospitalId, now),
    );
    return paper === null ? refused('not-found') : done(paper);
  });
}
