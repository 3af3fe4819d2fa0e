import { can } from '@shared/orders/can';
import { ROUTES } from '@shared/routes';
import type { Router } from 'express';
import { readInHospital } from '../db/in-hospital';
import { done, refused } from '../db/outcome';
import { bind } from '../http/handle';
import { stockedProducts } from './queries';

/** What the hospital stocks. */
export function bindShelf(router: Router): void {
  bind(router, ROUTES.shelf, async ({ deps, actor }) => {
    const verdict = can(actor, 'read-shelf');
    if (!verdict.allowed) return refused(verdict.code, { detail: verdict.words });
    return done({ products: await readInHospital(deps.db, actor, stockedProducts) });
  });
}
