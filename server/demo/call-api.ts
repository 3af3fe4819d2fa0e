import { PROBLEMS, type Problem } from '@shared/problems';
import { ROUTES } from '@shared/routes';
import type { RouteDefinition } from '@shared/routes/define';
import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import { DEMO_PASSWORD, DEMO_PEOPLE, type DemoPersonKey } from './people';

export type CallParts = { params?: Record<string, string>; body?: unknown };
export type Called<Value> = { ok: true; value: Value } | { ok: false; code: string; problem: Problem };

const LOCKED = PROBLEMS['session-locked'].status;

const pathOf = (path: string, params: Record<string, string> = {}): string =>
  path.replace(/:(\w+)/g, (_all, name: string) => encodeURIComponent(params[name] ?? ''));

/** The demo's people at their screens: each signs in once and keeps the cookie. */
export class Screens {
  readonly #cookies = new Map<DemoPersonKey, string>();

  constructor(private readonly origin: string) {}

  /** Calls a route of the registry as that person; a problem document is returned, not thrown. */
  async tryCall<Route extends RouteDefinition>(
    who: DemoPersonKey,
    route: Route,
    parts: CallParts = {},
  ): Promise<Called<z.output<Route['response']>>> {
    const cookie = this.#cookies.get(who) ?? (await this.#signIn(who));
    const response = await this.#send(route, parts, cookie);
    if (response.status !== LOCKED) return await answerOf(response);
    // idle since yesterday: the lock screen, then once more
    await response.arrayBuffer();
    await this.#send(ROUTES.unlock, { body: { password: DEMO_PASSWORD } }, cookie);
    return await answerOf(await this.#send(route, parts, cookie));
  }

  /** Ends every session, so that the demo starts with nobody signed in. */
  async signOutAll(): Promise<void> {
    for (const cookie of this.#cookies.values()) await this.#send(ROUTES.signOut, { body: {} }, cookie);
    this.#cookies.clear();
  }

  async #signIn(who: DemoPersonKey): Promise<string> {
    const { email } = DEMO_PEOPLE[who];
    const response = await this.#send(ROUTES.signIn, { body: { email, password: DEMO_PASSWORD } });
    const cookie = response.headers.get('set-cookie')?.split(';')[0];
    if (!response.ok || cookie === undefined)
      throw new Error(`${who} could not sign in: ${await response.text()}`);
    await response.arrayBuffer();
    this.#cookies.set(who, cookie);
    return cookie;
  }

  #send(route: RouteDefinition, { params, body }: CallParts, cookie?: string): Promise<Response> {
    return fetch(`${this.origin}${pathOf(route.path, params)}`, {
      method: route.method,
      headers: {
        ...(cookie === undefined ? {} : { cookie }),
        origin: this.origin,
        'user-agent': 'Brimline demo',
        'content-type': 'application/json',
        'idempotency-key': randomUUID(),
      },
      ...(route.method === 'GET' ? {} : { body: JSON.stringify(body ?? {}) }),
    });
  }
}

async function answerOf<Value>(response: Response): Promise<Called<Value>> {
  const json: unknown = await response.json();
  if (response.ok) return { ok: true, value: json as Value };
  const problem = json as Problem;
  return { ok: false, code: problem.type.replace('/problems/', ''), problem };
}
