import { z } from 'zod';
import { ENTITLEMENTS, ROLES } from '../accounts/actor';
import { at, done, get, id, idParams, password, post } from './define';

export const meSchema = z.object({
  account: z.object({
    id,
    name: z.string(),
    title: z.string(),
    roles: z.array(z.enum(ROLES)),
    registrationNumber: z.string().nullable(),
    email: z.string(),
  }),
  hospital: z.object({ id, name: z.string(), zone: z.string() }),
  wards: z.array(z.object({ id, name: z.string(), entitlements: z.array(z.enum(ENTITLEMENTS)) })),
  session: z.object({
    id: z.string(),
    locked: z.boolean(),
    idleUntil: at,
    absoluteUntil: at,
    idleMinutes: z.int(),
  }),
  /** The server's clock: the page shows time by it, not by the device's. */
  now: at,
  /** True when the program itself runs the mail fake: the mailbox page exists. */
  hasMailbox: z.boolean(),
});
export type Me = z.infer<typeof meSchema>;

export const accountRoutes = {
  health: get({
    path: '/api/health',
    access: 'public',
    figures: 'never',
    response: z.object({ ok: z.literal(true), database: z.boolean() }),
  }),
  signIn: post({
    path: '/api/sign-in',
    access: 'public',
    figures: 'never',
    body: z.object({ email: z.string().trim().max(200), password }),
    response: meSchema,
  }),
  signOut: post({
    path: '/api/sign-out',
    access: 'locked',
    figures: 'never',
    body: z.object({}),
    response: done,
  }),
  me: get({ path: '/api/me', access: 'locked', figures: 'never', response: meSchema }),
  lock: post({
    path: '/api/lock',
    access: 'session',
    figures: 'never',
    body: z.object({}),
    response: meSchema,
  }),
  unlock: post({
    path: '/api/unlock',
    access: 'locked',
    figures: 'never',
    body: z.object({ password }),
    response: meSchema,
  }),
  sessions: get({
    path: '/api/sessions',
    access: 'session',
    figures: 'never',
    response: z.object({
      sessions: z.array(
        z.object({ id: z.string(), madeAt: at, lastSeenAt: at, device: z.string(), isThis: z.boolean() }),
      ),
    }),
  }),
  revokeSession: post({
    path: '/api/sessions/:id/revoke',
    access: 'session',
    figures: 'never',
    params: z.object({ id: z.string().regex(/^[0-9a-f]{64}$/) }),
    body: z.object({}),
    response: done,
  }),
  /** People of a ward, for naming a checker or a senior. */
  colleagues: get({
    path: '/api/wards/:id/colleagues',
    access: 'clinical',
    figures: 'never',
    params: idParams,
    response: z.object({
      people: z.array(
        z.object({
          id,
          name: z.string(),
          title: z.string(),
          roles: z.array(z.enum(ROLES)),
          entitlements: z.array(z.enum(ENTITLEMENTS)),
        }),
      ),
    }),
  }),
};
