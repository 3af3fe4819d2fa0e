import { hasRole, isClinical, isOnWard, type Actor, type Role } from '../accounts/actor';
import { refuse, type Verdict } from './decide';

/** Acts that change no order state, or start something new. */
export const FREE_ACTS = [
  'read-ward',
  'read-child',
  'search-children',
  'register-child',
  'edit-child',
  'transfer-child',
  'discharge-child',
  'record-weight',
  'record-intake',
  'set-fluid-plan',
  'start-draft',
  'record-given',
  'print-order',
  'read-timeline',
  'read-rulebook',
  'read-shelf',
] as const;
export type FreeAct = (typeof FREE_ACTS)[number];

const CLINICAL: readonly Role[] = ['prescriber', 'pharmacist', 'nurse', 'lead'];
const CARERS: readonly Role[] = ['prescriber', 'nurse', 'lead'];

type FreeRow = {
  roles: readonly Role[];
  needsWard: boolean;
  needsSenior?: boolean;
  needsRegistration?: boolean;
};

const FREE: Readonly<Record<FreeAct, FreeRow>> = {
  'read-ward': { roles: CLINICAL, needsWard: true },
  'read-child': { roles: CLINICAL, needsWard: true },
  'search-children': { roles: CLINICAL, needsWard: false },
  'register-child': { roles: CARERS, needsWard: true },
  'edit-child': { roles: CARERS, needsWard: true },
  'transfer-child': { roles: CARERS, needsWard: true },
  'discharge-child': { roles: CARERS, needsWard: true },
  'record-weight': { roles: CLINICAL, needsWard: true },
  'record-intake': { roles: CLINICAL, needsWard: true },
  'set-fluid-plan': { roles: ['prescriber', 'lead'], needsWard: true, needsSenior: true },
  'start-draft': { roles: ['prescriber'], needsWard: true, needsRegistration: true },
  'record-given': { roles: ['prescriber', 'nurse'], needsWard: true, needsRegistration: true },
  'print-order': { roles: CLINICAL, needsWard: true },
  'read-timeline': { roles: CLINICAL, needsWard: true },
  'read-rulebook': { roles: CLINICAL, needsWard: false },
  'read-shelf': { roles: CLINICAL, needsWard: false },
};

/** Whether a person may do something that moves no order. `wardId` is the child's ward, absent where none applies. */
export function can(actor: Actor, act: FreeAct, wardId?: string): Verdict {
  const { roles, needsWard, needsSenior, needsRegistration } = FREE[act];
  if (!hasRole(actor, roles) || !isClinical(actor)) return refuse('role-missing');
  if (needsWard && (wardId === undefined || !isOnWard(actor, wardId))) return refuse('on-ward');
  if (needsRegistration && actor.registrationNumber === null) return refuse('registered');
  if (
    needsSenior &&
    !actor.wards.some((ward) => ward.wardId === wardId && ward.entitlements.includes('senior'))
  )
    return refuse('entitlement-missing');
  return { allowed: true };
}
