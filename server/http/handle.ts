import type { Actor } from '@shared/accounts/actor';
import type { Access, RouteDefinition } from '@shared/routes/define';
import type { Instant } from '@shared/time';
import type { Request, Response, Router } from 'express';
import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import { knock, type Visit } from '../auth/knock';
import type { FieldError } from '@shared/problems';
import { depsOf, type Deps } from './deps';
import { isProblemCode, sendProblem } from './problem';
import { readPart } from './read-request';

type Part<Route, Name extends string> = Route extends { [K in Name]: infer Schema extends z.ZodType }
  ? z.output<Schema>
  : undefined;

/** A public route may be called signed in or not; every other one has an actor. */
type ActorFor<Route extends RouteDefinition> = Route['access'] extends 'public' ? Actor | null : Actor;

/** What a handler is given: who, what, when, and the key that makes a repeated request one act. */
export type Call<Route extends RouteDefinition> = {
  actor: ActorFor<Route>;
  params: Part<Route, 'params'>;
  query: Part<Route, 'query'>;
  body: Part<Route, 'body'>;
  /** Idempotency-Key of the request. */
  key: string;
  now: Instant;
  deps: Deps;
  /** The session as it stands, and what sign-in needs to know of the browser. */
  visit: Visit;
  /** Sets a cookie with the answer. */
  setCookie: (cookie: string) => void;
};

/** What a handler returns: the value of `done`, a refusal by its code, or what `inHospital` answered. */
export type Result<Value> =
  | { ok: true; value: Value }
  | { ok: false; code: string; detail?: string; errors?: readonly FieldError[]; data?: unknown };

export type Handler<Route extends RouteDefinition> = (
  call: Call<Route>,
) => Promise<Result<z.input<Route['response']>>>;

const METHODS = { GET: 'get', POST: 'post', PUT: 'put' } as const;

/**
 * Puts a route of the registry on the router: session, parsing, handler, checked answer.
 * Handlers return an Outcome; what they throw is ours and becomes a 500 (or a 503 without the database).
 */
export function bind<const Route extends RouteDefinition>(
  router: Router,
  route: Route,
  handler: Handler<Route>,
): void {
  const answer = handler as unknown as Handler<RouteDefinition>;
  router[METHODS[route.method]](route.path, (request, response) => take(route, answer, request, response));
}

async function take(
  route: RouteDefinition,
  handler: Handler<RouteDefinition>,
  request: Request,
  response: Response,
): Promise<void> {
  const deps = depsOf(request);
  const visit = await knock(deps, request);
  const barred = barredFrom(route.access, visit);
  if (barred !== null) return sendProblem(response, barred.code, { detail: barred.detail });
  const read = readRequest(route, request);
  if (!read.ok) return sendProblem(response, read.code, { detail: read.detail, errors: read.errors });

  const outcome = await handler({
    ...read.parts,
    actor: (route.access === 'public' && visit.standing !== 'open' ? null : visit.actor) as Actor,
    now: deps.clock.now(),
    deps,
    visit,
    setCookie: (cookie) => response.append('Set-Cookie', cookie),
  });
  if (!outcome.ok) return sendRefusal(response, outcome);
  response.type('application/json').send(JSON.stringify(route.response.parse(outcome.value)));
}

function sendRefusal(response: Response, refusal: Extract<Result<never>, { ok: false }>): void {
  if (isProblemCode(refusal.code)) return sendProblem(response, refusal.code, refusal);
  depsOf(response.req).log.error(
    { requestId: response.locals.requestId as unknown, code: refusal.code },
    'unknown refusal',
  );
  sendProblem(response, 'unexpected', { detail: 'It was written down; nothing was recorded.' });
}

type Barred = { code: 'signed-out' | 'session-locked' | 'role-missing'; detail: string } | null;

const isClinicalVisit = (visit: Visit): boolean =>
  visit.actor !== null && visit.actor.roles.some((role) => role !== 'administrator');

function barredFrom(access: Access, visit: Visit): Barred {
  if (access === 'public') return null;
  if (visit.standing === 'none') return { code: 'signed-out', detail: visit.words };
  if (access === 'locked' && visit.standing !== 'suspended') return null;
  if (visit.standing !== 'open') return { code: 'session-locked', detail: visit.words };
  if (access === 'clinical' && !isClinicalVisit(visit)) {
    return { code: 'role-missing', detail: 'Your role has no clinical access.' };
  }
  return null;
}

type Parts = { params: never; query: never; body: never; key: string };
type ReadRequest =
  | { ok: true; parts: Parts }
  | {
      ok: false;
      code: 'not-found' | 'bad-input';
      detail: string;
      errors?: { pointer: string; detail: string }[];
    };

const nothing = z.undefined();
const keySchema = z.string().regex(/^[\x21-\x7e]{8,100}$/);

function readRequest(route: RouteDefinition, request: Request): ReadRequest {
  const params = readPart(route.params ?? nothing, route.params && request.params);
  if (!params.ok) return { ok: false, code: 'not-found', detail: 'There is nothing at this address.' };
  const query = readPart(route.query ?? nothing, route.query && request.query);
  if (!query.ok) return badInput(query.errors);
  const body = readPart(route.body ?? nothing, route.body && (request.body as unknown));
  if (!body.ok) return badInput(body.errors);
  const key = readKey(route, request);
  if (key === undefined) {
    return { ok: false, code: 'bad-input', detail: 'Send an Idempotency-Key of 8 to 100 characters.' };
  }
  return { ok: true, parts: { params: params.value, query: query.value, body: body.value, key } as Parts };
}

const badInput = (errors: { pointer: string; detail: string }[]): ReadRequest => ({
  ok: false,
  code: 'bad-input',
  detail: 'Some entries need another look.',
  errors,
});

/** Acts need the client's own key; reading, and what comes before or ends a session, go without. */
function readKey(route: RouteDefinition, request: Request): string | undefined {
  const given = request.get('idempotency-key');
  if (
    given === undefined &&
    (route.method === 'GET' || route.access === 'public' || route.access === 'locked')
  ) {
    return randomUUID();
  }
  const read = keySchema.safeParse(given);
  return read.success ? read.data : undefined;
}
