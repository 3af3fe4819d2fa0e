import { ROUTES } from '@shared/routes';
import type { Router } from 'express';
import { inHospital } from '../db/in-hospital';
import { bind } from '../http/handle';
import { confirmWeight } from './commands/confirm-weight';
import { recordWeight } from './commands/record-weight';

/** Weights: a first reading, and the second one a doubtful weight owes. */
export function bindWeights(router: Router): void {
  bind(router, ROUTES.recordWeight, ({ deps, actor, key, params, body }) => {
    const attempt = {
      act: 'weight-recorded',
      subject: { kind: 'child', id: params.id },
      child: params.id,
    } as const;
    const request = ['record-weight', params.id, body];
    return inHospital(deps.db, actor, { key, request, attempt }, recordWeight(actor, params.id, body));
  });

  bind(router, ROUTES.confirmWeight, ({ deps, actor, key, params, body }) => {
    const attempt = { act: 'weight-confirmed', subject: { kind: 'weight', id: params.id } } as const;
    const request = ['confirm-weight', params.id, body];
    return inHospital(deps.db, actor, { key, request, attempt }, confirmWeight(actor, params.id, body));
  });
}
