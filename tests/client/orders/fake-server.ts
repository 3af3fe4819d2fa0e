import { vi } from 'vitest';
import { queryClient } from '@/lib/query-client';
import type { Me } from '@shared/routes/accounts';
import type { Draft } from '@shared/routes/orders';
import { IDS, NOW } from './make-draft';

type Reply = { status?: number; body: unknown };
type Handler = (body: unknown) => Reply | Promise<Reply>;
export type Sent = { method: string; path: string; body: unknown; key: string | undefined };

export const me: Me = {
  account: {
    id: '00000000-0000-4000-8000-000000000090',
    name: 'Noor Castellane',
    title: 'Registrar',
    roles: ['prescriber'],
    registrationNumber: '7012345',
    email: 'noor@saltmarsh.example',
  },
  hospital: { id: '00000000-0000-4000-8000-000000000091', name: 'Saltmarsh', zone: 'Europe/London' },
  wards: [{ id: IDS.ward, name: 'Heron', entitlements: ['checking'] }],
  session: { id: 's', locked: false, idleUntil: NOW, absoluteUntil: NOW, idleMinutes: 15 },
  now: NOW,
  hasMailbox: false,
};

export const problem = (code: string, status: number, more: Record<string, unknown> = {}): Reply => ({
  status,
  body: { type: `/problems/${code}`, title: code, status, detail: `refused: ${code}`, ...more },
});

/** Answers by "METHOD path"; what is not listed is an error of the test. */
export function serve(handlers: Record<string, Handler>): Sent[] {
  const sent: Sent[] = [];
  vi.stubGlobal('fetch', async (path: string, init: RequestInit) => {
    const method = init.method ?? 'GET';
    const body: unknown = typeof init.body === 'string' ? JSON.parse(init.body) : undefined;
    sent.push({ method, path, body, key: new Headers(init.headers).get('idempotency-key') ?? undefined });
    const handler = handlers[`${method} ${path}`];
    if (handler === undefined) throw new Error(`nothing answers ${method} ${path}`);
    const reply = await handler(body);
    return new Response(JSON.stringify(reply.body), { status: reply.status ?? 200 });
  });
  return sent;
}

const DRAFT = `/api/drafts/${IDS.version}`;

/** A server that holds one draft and takes every save. */
export function serveDraft(draft: Draft, more: Record<string, Handler> = {}): Sent[] {
  queryClient.clear();
  queryClient.setQueryData(['me'], me);
  let stored = draft;
  return serve({
    'GET /api/me': () => ({ body: me }),
    [`GET /api/wards/${IDS.ward}/colleagues`]: () => ({ body: { people: [] } }),
    [`GET ${DRAFT}`]: () => ({ body: stored }),
    [`PUT ${DRAFT}`]: (body) => {
      const { rev, form } = body as { rev: number; form: Draft['form'] };
      stored = { ...stored, rev: rev + 1, form };
      return { body: { rev: rev + 1, savedAt: NOW, exceptionsVoided: false } };
    },
    ...more,
  });
}

export const savesIn = (sent: readonly Sent[]) => sent.filter(({ method }) => method === 'PUT');
