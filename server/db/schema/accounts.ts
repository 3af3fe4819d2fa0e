import { ENTITLEMENTS, ROLES } from '@shared/accounts/actor';
import { foreignKey, index, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { hospitalId, instant, ownHospital, rowId, someOf, within } from '../columns';
import { logins } from './auth';
import { wards } from './hospitals';

export const accounts = pgTable(
  'accounts',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    loginId: uuid('login_id').notNull(),
    name: text('name').notNull(),
    /** Printed with every signature, for instance "Registrar". */
    title: text('title').notNull(),
    roles: text('roles', { enum: ROLES }).array().notNull(),
    registrationNumber: text('registration_no'),
    deactivatedAt: instant('deactivated_at'),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('accounts_login').on(t.hospitalId, t.loginId),
    foreignKey({
      name: 'accounts_login_fk',
      columns: [t.hospitalId, t.loginId],
      foreignColumns: [logins.hospitalId, logins.id],
    }),
    someOf('accounts_roles', t.roles, ROLES),
    ownHospital(),
  ],
);

export const memberships = pgTable(
  'memberships',
  {
    hospitalId: hospitalId(),
    id: rowId(),
    accountId: uuid('account_id').notNull(),
    wardId: uuid('ward_id').notNull(),
    entitlements: text('entitlements', { enum: ENTITLEMENTS }).array().notNull().default([]),
  },
  (t) => [
    primaryKey({ columns: [t.hospitalId, t.id] }),
    unique('memberships_once').on(t.hospitalId, t.accountId, t.wardId),
    index('memberships_ward').on(t.hospitalId, t.wardId),
    within('memberships_account', t, t.accountId, accounts),
    within('memberships_ward', t, t.wardId, wards),
    someOf('memberships_entitlements', t.entitlements, ENTITLEMENTS),
    ownHospital(),
  ],
);
