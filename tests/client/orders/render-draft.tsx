import { QueryClientProvider } from '@tanstack/react-query';
import { render, screen } from '@testing-library/react';
import { Suspense } from 'react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { DraftPage } from '@/features/orders/components/draft-page';
import { queryClient } from '@/lib/query-client';
import { IDS } from './make-draft';

/** The draft page in a router of its own; other pages are only named. */
export async function renderDraft() {
  const router = createMemoryRouter(
    [
      { path: '/drafts/:versionId', element: <DraftPage /> },
      { path: '/orders/:versionId', element: <p>the order page</p> },
      { path: '*', element: <p>another page</p> },
    ],
    { initialEntries: [`/drafts/${IDS.version}`] },
  );
  render(
    <QueryClientProvider client={queryClient}>
      <Suspense>
        <RouterProvider router={router} />
      </Suspense>
    </QueryClientProvider>,
  );
  await screen.findByLabelText('Draft order');
  return router;
}

/** The right page: what the draft works out to. */
export const results = () => screen.getByLabelText('What the order works out to');
