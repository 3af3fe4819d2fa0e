import { vi } from 'vitest';
import { queryClient } from '@/lib/query-client';

type Sent = { key: string; body: unknown; idempotencyKey: string | null };
type Answering = (body: unknown) => unknown;

/** A refusal as the server words it. */
export class Refusal {
  constructor(
    readonly code: string,
    readonly rest: { detail?: string; errors?: { pointer: string; detail: string }[]; data?: unknown } = {},
    readonly status = 409,
  ) {}
}
/** The line is down for this request. */
export const SILENCE = Symbol('silence');

/** Answers the page's requests by method and path, and keeps what was sent. */
export function mockApi(answers: Record<string, Answering>) {
  queryClient.clear();
  const sent: Sent[] = [];
  vi.stubGlobal('fetch', (path: string, init: RequestInit = {}) => {
    const key = `${init.method ?? 'GET'} ${path}`;
    const body: unknown = typeof init.body === 'string' ? JSON.parse(init.body) : undefined;
    sent.push({ key, body, idempotencyKey: new Headers(init.headers).get('idempotency-key') });
    const answer = answers[key]?.(body) ?? SILENCE;
    if (answer === SILENCE) return Promise.reject(new TypeError('no answer'));
    if (answer instanceof Refusal) {
      const { code, rest, status } = answer;
      const document = { type: `/problems/${code}`, title: code, status, detail: '', ...rest };
      return Promise.resolve(new Response(JSON.stringify(document), { status }));
    }
    return Promise.resolve(new Response(JSON.stringify(answer)));
  });
  const all = (key: string) => sent.filter((each) => each.key === key);
  return {
    /** The bodies sent to one route, in turn. */
    of: (key: string) => all(key).map(({ body }) => body),
    keysOf: (key: string) => all(key).map(({ idempotencyKey }) => idempotencyKey),
  };
}
