import { can } from '@shared/orders/can';
import { ROUTES } from '@shared/routes';
import type { Router } from 'express';
import { readInHospital } from '../db/in-hospital';
import { refused } from '../db/outcome';
import { bind } from '../http/handle';
import { loadWard } from './load-ward';

/** The ward page. */
export function bindWards(router: Router): void {
  bind(router, ROUTES.ward, async ({ deps, actor, params }) => {
    const verdict = can(actor, 'read-ward', params.id);
    if (!verdict.allowed) return refused(verdict.code, { detail: verdict.words });
    return await readInHospital(deps.db, actor, (tx, now) => loadWard(tx, actor, params.id, now));
  });
}
