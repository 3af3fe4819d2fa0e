import { can } from '@shared/orders/can';
import { ROUTES } from '@shared/routes';
import { toRfc3339 } from '@shared/time';
import type { Router } from 'express';
import { readInHospital } from '../db/in-hospital';
import { done, refused } from '../db/outcome';
import { bind } from '../http/handle';
import { rulebookInForce } from './in-force';

/** The limits in force, with their sources. */
export function bindRulebook(router: Router): void {
  bind(router, ROUTES.rulebook, async ({ deps, actor }) => {
    const verdict = can(actor, 'read-rulebook');
    if (!verdict.allowed) return refused(verdict.code, { detail: verdict.words });
    const { number, sha256, inForceFrom, content } = await readInHospital(deps.db, actor, rulebookInForce);
    return done({ number, sha256, inForceFrom: toRfc3339(inForceFrom), content });
  });
}
