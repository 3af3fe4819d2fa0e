import { QueryClientProvider } from '@tanstack/react-query';
import { configure, render, screen, waitFor } from '@testing-library/react';
import { userEvent } from '@testing-library/user-event';
import { Suspense } from 'react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { GivenPage } from '@/features/orders/components/given-page';
import { queryClient } from '@/lib/query-client';
import { me, problem, serve } from './fake-server';
import { IDS, makeContext, NOW, PRODUCTS } from './make-draft';

// the pages are large and the machine may be busy
vi.setConfig({ testTimeout: 20_000 });
configure({ defaultHidden: true, asyncUtilTimeout: 10_000 });
const user = userEvent.setup({ delay: null });

afterEach(() => vi.unstubAllGlobals());

const CHILD = `/api/children/${IDS.child}`;

async function renderGiven(given: Parameters<typeof serve>[0][string]) {
  const { child, weights } = makeContext();
  queryClient.clear();
  queryClient.setQueryData(['me'], me);
  const sent = serve({
    'GET /api/me': () => ({ body: me }),
    'GET /api/shelf': () => ({ body: { products: Object.values(PRODUCTS) } }),
    [`GET /api/wards/${IDS.ward}/colleagues`]: () => ({ body: { people: [] } }),
    [`GET ${CHILD}`]: () => ({
      body: {
        child,
        weights,
        dosingWeightId: IDS.weight,
        results: [],
        intakes: [],
        plan: null,
        orders: [],
        now: NOW,
      },
    }),
    [`POST ${CHILD}/given`]: given,
  });
  const router = createMemoryRouter(
    [
      { path: '/children/:childId/given', element: <GivenPage /> },
      { path: '*', element: <p>another page</p> },
    ],
    { initialEntries: [`/children/${IDS.child}/given`] },
  );
  render(
    <QueryClientProvider client={queryClient}>
      <Suspense>
        <RouterProvider router={router} />
      </Suspense>
    </QueryClientProvider>,
  );
  await screen.findByRole('option', { name: 'Sodium chloride 0.9%' });
  return { sent, router };
}

const write = () => user.click(screen.getByRole('button', { name: 'Write down what was given' }));

async function fill() {
  await user.selectOptions(screen.getByLabelText('Fluid'), 'Sodium chloride 0.9%');
  await user.type(screen.getByLabelText('Volume'), '164');
  await user.type(screen.getByLabelText('Given over'), '10');
  await user.click(screen.getByRole('radio', { name: 'Syringe, by hand' }));
  await user.selectOptions(screen.getByLabelText('On whose word'), 'Noor Castellane, Registrar');
  await user.type(screen.getByLabelText('Why'), 'Collapse in the bay');
  await user.click(screen.getByRole('checkbox', { name: /I read this back/ }));
  await user.type(screen.getByLabelText('Your password, again'), 'a password');
}

describe('what was given in an emergency', () => {
  it('says what is missing, takes the focus there, and sends nothing', async () => {
    const { sent } = await renderGiven(() => ({ body: {} }));
    await write();
    expect(screen.getByLabelText('Fluid')).toHaveFocus();
    expect(screen.getByText('Say on whose word.')).toBeInTheDocument();
    expect(screen.getByText('Read it back first.')).toBeInTheDocument();
    expect(sent.some(({ method }) => method === 'POST')).toBe(false);
  });

  it('is read back in a sentence, sent once complete, and its order shown', async () => {
    const { sent, router } = await renderGiven(() => ({
      body: { versionId: IDS.version, code: 'BL-260610-015', words: 'Written down.' },
    }));
    await write();
    await fill();
    expect(screen.getByText(/^Given:/)).toHaveTextContent(
      'Given: 164 millilitres of sodium chloride 0.9% over 10 minutes, by hand with a syringe, on the word of Noor Castellane, Registrar.',
    );
    expect(screen.getByText('10 mL/kg')).toBeInTheDocument();
    await write();
    await waitFor(() => expect(router.state.location.pathname).toBe(`/orders/${IDS.version}`));
    expect(sent.find(({ method }) => method === 'POST')?.body).toMatchObject({
      kind: 'bolus',
      weightId: null,
      productId: PRODUCTS.saline.id,
      volumeMl: '164',
      overMinutes: '10',
      route: 'syringe',
      givenAt: '2026-06-10T10:42',
      onWordOfId: me.account.id,
      readBack: true,
    });
  });

  it('puts the server’s refusal beside its field and keeps every entry', async () => {
    await renderGiven(() =>
      problem('bad-input', 422, { errors: [{ pointer: '/volumeMl', detail: 'At most 9999 mL.' }] }),
    );
    await fill();
    await write();
    expect(await screen.findByText('At most 9999 mL.')).toBeInTheDocument();
    expect(screen.getByLabelText('Volume')).toHaveFocus();
    expect(screen.getByLabelText('Why')).toHaveValue('Collapse in the bay');
  });
});
