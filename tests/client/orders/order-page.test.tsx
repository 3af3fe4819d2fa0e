import { QueryClientProvider } from '@tanstack/react-query';
import { configure, render, screen, waitFor } from '@testing-library/react';
import { userEvent } from '@testing-library/user-event';
import { Suspense } from 'react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { OrderPage } from '@/features/orders/components/order-page';
import { queryClient } from '@/lib/query-client';
import type { OrderView } from '@shared/routes/orders';
import { me, problem, serve } from './fake-server';
import { IDS } from './make-draft';
import { makeOpen, makeOrder } from './make-order';

// the pages are large and the machine may be busy
vi.setConfig({ testTimeout: 20_000 });
configure({ defaultHidden: true, asyncUtilTimeout: 10_000 });
const user = userEvent.setup({ delay: null });

afterEach(() => vi.unstubAllGlobals());

const ORDER = `/api/versions/${IDS.version}`;
type Handlers = Parameters<typeof serve>[0];

async function renderOrder(view: OrderView, roles: typeof me.account.roles, more: Handlers = {}) {
  queryClient.clear();
  const reader = { ...me, account: { ...me.account, roles } };
  queryClient.setQueryData(['me'], reader);
  const sent = serve({
    'GET /api/me': () => ({ body: reader }),
    [`GET ${ORDER}`]: () => ({ body: view }),
    ...more,
  });
  const router = createMemoryRouter(
    [
      { path: '/orders/:versionId', element: <OrderPage /> },
      { path: '*', element: <p>another page</p> },
    ],
    { initialEntries: [`/orders/${IDS.version}`] },
  );
  render(
    <QueryClientProvider client={queryClient}>
      <Suspense>
        <RouterProvider router={router} />
      </Suspense>
    </QueryClientProvider>,
  );
  await screen.findByRole('heading', { level: 1 });
  return { sent, router };
}

const page = () => document.body.textContent ?? '';

describe('an order that is covered', () => {
  it('shows kind, reason and waiting, and leads to the check', async () => {
    const timeline = [
      { seq: 1, at: makeOrder('draft', []).stateSince, who: null, words: 'Signed', outcome: 'done' as const },
    ];
    await renderOrder(makeOrder('awaiting-check', ['open-check'], { open: null, timeline }), ['nurse']);
    expect(page()).toContain('Pneumonia: too breathless to drink enough');
    expect(page()).toContain('waits 38 min');
    expect(screen.getByRole('link', { name: 'Open the check' })).toHaveAttribute(
      'href',
      `/checks/${IDS.version}`,
    );
    expect(page()).not.toContain('mL/h');
  });
});

describe('handing the device to a checker', () => {
  it('takes every figure and name off the screen before the device changes hands', async () => {
    const view = makeOrder('awaiting-check', ['withdraw'], { you: { isAuthor: true } });
    const { sent } = await renderOrder(view, ['prescriber'], {
      [`POST /api/checks/${IDS.version}/beside`]: () => problem('checker-unfit', 422),
    });
    expect(page()).toContain('41.1mL/h');
    await user.click(screen.getByRole('button', { name: 'Check beside me' }));
    for (const secret of ['41.1', '986', '16.4', 'Noor Castellane', 'potassium'])
      expect(page()).not.toContain(secret);
    await user.type(screen.getByLabelText('Their e-mail address'), 'bronagh@saltmarsh.example');
    await user.type(screen.getByLabelText('Their password'), 'hers');
    await user.click(screen.getByRole('button', { name: 'Open the check for them' }));
    expect(await screen.findByText(/The check was not opened/)).toBeInTheDocument();
    expect(screen.getByLabelText('Their e-mail address')).toHaveValue('bronagh@saltmarsh.example');
    expect(sent.at(-1)?.body).toEqual({ email: 'bronagh@saltmarsh.example', password: 'hers' });
    await user.click(screen.getByRole('button', { name: 'Not now' }));
    expect(page()).toContain('41.1mL/h');
  });
});

describe('stopping', () => {
  const running = () => makeOrder('running', ['stop', 'hold', 'finish']);

  it('is one touch, and asks why afterwards', async () => {
    const { sent } = await renderOrder(running(), ['nurse'], {
      [`POST ${ORDER}/stop`]: () => ({
        body: { stoppedAt: running().stateSince, stoppedBy: 'Jo', reasonOwed: true },
      }),
      [`POST ${ORDER}/stop-reason`]: () => ({ body: { ok: true } }),
    });
    await user.click(screen.getByRole('button', { name: 'Stop the infusion' }));
    expect(await screen.findByRole('heading', { name: 'Stopped. Why?' })).toHaveFocus();
    await user.type(screen.getByLabelText('Why the infusion was stopped'), 'Swollen hand');
    await user.click(screen.getByRole('button', { name: 'Keep the reason' }));
    await waitFor(() => expect(sent.some(({ path }) => path.endsWith('/stop-reason'))).toBe(true));
    const bodies = sent.filter(({ method }) => method === 'POST').map(({ body }) => body);
    expect(bodies).toEqual([
      { reason: '', volumeInfusedMl: null },
      { reason: 'Swollen hand', volumeInfusedMl: null },
    ]);
  });

  it('says to stop the pump by hand when the server does not answer, and repeats the same act', async () => {
    let turn = 0;
    const { sent } = await renderOrder(running(), ['nurse'], {
      [`POST ${ORDER}/stop`]: () => {
        turn += 1;
        if (turn === 1) throw new TypeError('the line is down');
        return { body: { stoppedAt: running().stateSince, stoppedBy: 'Jo', reasonOwed: false } };
      },
    });
    await user.click(screen.getByRole('button', { name: 'Stop the infusion' }));
    const alert = await screen.findByText(/Stop the pump by hand; not recorded/);
    expect(alert).toBeInTheDocument();
    await user.click(screen.getByRole('button', { name: 'Stop the infusion' }));
    await waitFor(() => expect(screen.queryByText(/Stop the pump by hand/)).not.toBeInTheDocument());
    const keys = sent.filter(({ path }) => path.endsWith('/stop')).map(({ key }) => key);
    expect(keys).toHaveLength(2);
    expect(keys[0]).toBe(keys[1]);
  });
});

describe('acts', () => {
  it('shut a door with its reason where role and state would fit, and show nothing else', async () => {
    const words = 'You are not a member of this child’s ward.';
    const shut = {
      ...makeOrder('signed', []),
      acts: [
        { act: 'withdraw' as const, allowed: false, words },
        { act: 'hold' as const, allowed: false, words: 'moved on' },
      ],
    };
    await renderOrder(shut, ['lead']);
    const withdraw = screen.getByRole('button', { name: 'Withdraw' });
    expect(withdraw).toHaveAttribute('aria-disabled', 'true');
    expect(withdraw).toHaveAccessibleDescription(words);
    expect(screen.queryByRole('button', { name: 'Hold' })).not.toBeInTheDocument();
  });

  it('tells the author of a disputed order that a new version is needed, with both sets', async () => {
    const comparison = {
      outcome: 'facts-differ' as const,
      mayAccept: false,
      effect: 'The child would have got 70 mL less.',
      rows: [
        {
          field: 'weight',
          label: 'Weight',
          nature: 'fact' as const,
          author: '16.4 kg',
          checker: '15.9 kg',
          agrees: false,
          apart: '0.5 kg',
        },
      ],
    };
    const open = { ...makeOpen(), comparison, checkerName: 'Ruth Ansah' };
    await renderOrder(makeOrder('disputed', ['revise'], { open, you: { isAuthor: true } }), ['prescriber']);
    expect(page()).toContain('You cannot overrule a checker');
    expect(screen.getByRole('row', { name: /Weight 16.4 kg 15.9 kg/ })).toHaveTextContent('differs');
    expect(screen.getByRole('button', { name: 'Revise: make version 2' })).toBeInTheDocument();
  });
});
