import { can } from '@shared/orders/can';
import { ROUTES } from '@shared/routes';
import type { Router } from 'express';
import { inHospital, readInHospital } from '../db/in-hospital';
import { done, refused } from '../db/outcome';
import { bind } from '../http/handle';
import { editChild } from './commands/edit-child';
import { dischargeChild, transferChild } from './commands/move-child';
import { recordIntake } from './commands/record-intake';
import { registerChild } from './commands/register-child';
import { setFluidPlan } from './commands/set-fluid-plan';
import { loadChart } from './load-chart';
import { searchChildren } from './search-children';

/** Finding, registering, correcting, moving and discharging children, and what their charts hold. */
export function bindChildren(router: Router): void {
  bindReading(router);
  bindPlaces(router);
  bindChartEntries(router);
}

function bindReading(router: Router): void {
  bind(router, ROUTES.searchChildren, async ({ deps, actor, body }) => {
    const verdict = can(actor, 'search-children');
    if (!verdict.allowed) return refused(verdict.code, { detail: verdict.words });
    return done(await readInHospital(deps.db, actor, (tx, now) => searchChildren(tx, actor, body.text, now)));
  });

  bind(router, ROUTES.chart, ({ deps, actor, params }) =>
    readInHospital(deps.db, actor, (tx, now) => loadChart(tx, actor, params.id, now)),
  );
}

const child = (id: string) => ({ kind: 'child', id });

function bindPlaces(router: Router): void {
  bind(router, ROUTES.registerChild, ({ deps, actor, key, body }) => {
    const attempt = { act: 'child-registered', subject: child('new') } as const;
    return inHospital(
      deps.db,
      actor,
      { key, request: ['register', body], attempt },
      registerChild(actor, body),
    );
  });

  bind(router, ROUTES.editChild, ({ deps, actor, key, params, body }) => {
    const attempt = { act: 'child-edited', subject: child(params.id), child: params.id } as const;
    const request = ['edit-child', params.id, body];
    return inHospital(deps.db, actor, { key, request, attempt }, editChild(actor, params.id, body));
  });

  bind(router, ROUTES.transferChild, ({ deps, actor, key, params, body }) => {
    const attempt = { act: 'child-transferred', subject: child(params.id), child: params.id } as const;
    const request = ['transfer-child', params.id, body];
    return inHospital(deps.db, actor, { key, request, attempt }, transferChild(actor, params.id, body));
  });

  bind(router, ROUTES.dischargeChild, ({ deps, actor, key, params }) => {
    const attempt = { act: 'child-discharged', subject: child(params.id), child: params.id } as const;
    const request = ['discharge-child', params.id];
    return inHospital(deps.db, actor, { key, request, attempt }, dischargeChild(actor, params.id));
  });
}

function bindChartEntries(router: Router): void {
  bind(router, ROUTES.recordIntake, ({ deps, actor, key, params, body }) => {
    const attempt = { act: 'intake-recorded', subject: child(params.id), child: params.id } as const;
    const request = ['record-intake', params.id, body];
    return inHospital(deps.db, actor, { key, request, attempt }, recordIntake(actor, params.id, body));
  });

  bind(router, ROUTES.setFluidPlan, ({ deps, actor, key, params, body }) => {
    const attempt = { act: 'fluid-plan-set', subject: child(params.id), child: params.id } as const;
    const request = ['fluid-plan', params.id, body];
    return inHospital(deps.db, actor, { key, request, attempt }, setFluidPlan(actor, params.id, body));
  });
}
