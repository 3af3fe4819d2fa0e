import type { RouteDefinition } from '@shared/routes/define';
import { randomUUID } from 'node:crypto';
import type { Server } from 'node:http';
import request, { type Response } from 'supertest';
import { cookieName } from '../../../server/auth/auth-of';
import { hashOfSecret, insertValues } from '../../../server/auth/session-adapter';
import { INSERT_SESSION } from '../../../server/auth/session-sql';
import type { Deps } from '../../../server/http/deps';

export type SendOptions = { key?: string; headers?: Record<string, string> };

/** Requests of one browser; every answer is supertest's, problems included. */
export type Client = {
  get(path: string, options?: SendOptions): Promise<Response>;
  post(path: string, body?: unknown, options?: SendOptions): Promise<Response>;
  put(path: string, body?: unknown, options?: SendOptions): Promise<Response>;
  /** A route of the registry, its parameters filled in. */
  call(
    route: RouteDefinition,
    parts?: { params?: Record<string, string>; body?: unknown } & SendOptions,
  ): Promise<Response>;
  /** The Cookie header it sends. */
  cookie(): Promise<string>;
};

export const pathOf = (route: RouteDefinition, params: Record<string, string> = {}): string =>
  route.path.replace(/:(\w+)/g, (_all, name: string) => encodeURIComponent(params[name] ?? ''));

/** A client that sends whatever cookie it is given, and none for `anonymous`. */
export function clientWith(deps: Deps, server: Server, cookie: () => Promise<string | undefined>): Client {
  const { origin } = new URL(deps.env.PUBLIC_URL);
  const send = async (
    method: 'get' | 'post' | 'put',
    path: string,
    body: unknown,
    { key, headers = {} }: SendOptions,
  ): Promise<Response> => {
    const sent = request(server)[method](path);
    const jar = await cookie();
    if (jar !== undefined) void sent.set('Cookie', jar);
    if (method !== 'get') void sent.set('Origin', origin).set('Idempotency-Key', key ?? randomUUID());
    void sent.set(headers);
    return await (method === 'get' ? sent : sent.send(body as object));
  };
  const client: Client = {
    get: (path, options = {}) => send('get', path, undefined, options),
    post: (path, body = {}, options = {}) => send('post', path, body, options),
    put: (path, body = {}, options = {}) => send('put', path, body, options),
    call: (route, { params, body, ...options } = {}) =>
      send(route.method.toLowerCase() as 'get' | 'post' | 'put', pathOf(route, params), body ?? {}, options),
    cookie: async () => (await cookie()) ?? '',
  };
  return client;
}

export const anonymous = (deps: Deps, server: Server): Client =>
  clientWith(deps, server, () => Promise.resolve(undefined));

/** A session row put in directly: what a sign-in would have left behind. */
export function signedIn({ deps, server, loginId }: { deps: Deps; server: Server; loginId: string }): Client {
  const secret = randomUUID().replaceAll('-', '');
  let inserted: Promise<unknown> | undefined;
  return clientWith(deps, server, async () => {
    inserted ??= deps.db.sql.unsafe(
      INSERT_SESSION,
      insertValues(deps, hashOfSecret(secret), loginId, {
        kind: 'own',
        agent: 'Mozilla/5.0 (X11; Linux) Firefox/1',
      }),
    );
    await inserted;
    return `${cookieName(deps, 'session')}=${secret}`;
  });
}
