import { QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import type { ReactElement } from 'react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { queryClient } from '@/lib/query-client';

/** Draws one page at its path, as the router does inside the shell. */
export function showAt(path: string, at: string, element: ReactElement) {
  const router = createMemoryRouter(
    [
      { path, element },
      { path: '*', element: <p>Elsewhere</p> },
    ],
    {
      initialEntries: [at],
    },
  );
  return render(
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
}
