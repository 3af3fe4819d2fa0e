import { ROUTES, type RouteName } from '@shared/routes';
import type { z } from 'zod';
import { newKey, send } from './server-answer';

type Route<N extends RouteName> = (typeof ROUTES)[N];
type Part<R, K extends string> =
  R extends Record<K, infer S> ? (S extends z.ZodType ? z.input<S> : never) : never;

type Args<N extends RouteName> = (Route<N> extends { params: z.ZodType }
  ? { params: Part<Route<N>, 'params'> }
  : { params?: never }) &
  (Route<N> extends { body: z.ZodType } ? { body: Part<Route<N>, 'body'> } : { body?: never }) & {
    /** One key per intended act; made here when absent. */
    key?: string;
    background?: boolean;
    signal?: AbortSignal;
  };

export type Answer<N extends RouteName> = z.output<Route<N>['response']>;

const fill = (path: string, params: Record<string, string> | undefined): string =>
  path.replace(/:([a-z]+)/gi, (_match, name: string) => encodeURIComponent(params?.[name] ?? ''));

/** The answer does not have the shape this page was built for: nothing of it is shown. */
export class OtherVersionError extends Error {
  override readonly name = 'OtherVersionError';
  constructor() {
    super(
      'Brimline was updated while this page was open. Nothing is shown from a guess: load the page again.',
    );
  }
}

/**
 * Asks one route of the registry and parses its answer.
 * @throws ProblemError when the server refuses, UnreachableError when it does not answer.
 */
export async function call<N extends RouteName>(name: N, args: Args<N>): Promise<Answer<N>> {
  const route = ROUTES[name];
  const { params, body, key, background, signal } = args as {
    params?: Record<string, string>;
    body?: unknown;
    key?: string;
    background?: boolean;
    signal?: AbortSignal;
  };
  const value = await send(fill(route.path, params), {
    method: route.method,
    ...(body === undefined ? {} : { body }),
    ...(route.method === 'GET' ? {} : { key: key ?? newKey() }),
    ...(background ? { background } : {}),
    ...(signal ? { signal } : {}),
  });
  const answer = route.response.safeParse(value);
  if (!answer.success) throw new OtherVersionError();
  return answer.data as Answer<N>;
}
