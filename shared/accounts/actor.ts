/** Roles are a set per account; entitlements are held per ward. */
export const ROLES = ['prescriber', 'pharmacist', 'nurse', 'lead', 'administrator'] as const;
export type Role = (typeof ROLES)[number];

export const ENTITLEMENTS = ['checking', 'senior', 'witness'] as const;
export type Entitlement = (typeof ENTITLEMENTS)[number];

export const CLINICAL_ROLES: readonly Role[] = ['prescriber', 'pharmacist', 'nurse', 'lead'];

export type WardMembership = { wardId: string; name: string; entitlements: readonly Entitlement[] };

/** Who acts. Made by the session (later also by a token) and passed to every command. */
export type Actor = {
  id: string;
  hospitalId: string;
  name: string;
  roles: readonly Role[];
  /** Printed title, for instance "Registrar"; kept with every signature. */
  title: string;
  registrationNumber: string | null;
  wards: readonly WardMembership[];
  sessionId: string;
};

export const hasRole = (actor: Pick<Actor, 'roles'>, roles: readonly Role[]): boolean =>
  roles.some((role) => actor.roles.includes(role));

export const isClinical = (actor: Pick<Actor, 'roles'>): boolean => hasRole(actor, CLINICAL_ROLES);

/** People see children on their wards only; a lead sees the whole hospital. The empty ward, of a discharged child, is nobody's. */
export const isOnWard = (actor: Pick<Actor, 'roles' | 'wards'>, wardId: string): boolean =>
  (wardId !== '' && actor.roles.includes('lead')) || actor.wards.some((ward) => ward.wardId === wardId);

export const isEntitled = (actor: Pick<Actor, 'wards'>, entitlement: Entitlement, wardId: string): boolean =>
  actor.wards.some((ward) => ward.wardId === wardId && ward.entitlements.includes(entitlement));
