import { createBrowserRouter, type RouteObject } from 'react-router-dom';
import { SignInPage } from '../features/accounts/components/sign-in-page';
import { FaultPage } from './fault-page';
import { NotFoundPage } from './not-found-page';

/** Pages load with their route; sign-in is the only one in the first chunk. */
const inside: RouteObject[] = [
  { index: true, lazy: async () => ({ Component: (await import('./home-page')).HomePage }) },
  {
    path: 'wards/:wardId',
    lazy: async () => ({ Component: (await import('../features/wards/components/ward-page')).WardPage }),
  },
  {
    path: 'checks',
    lazy: async () => ({ Component: (await import('../features/checks/components/queue-page')).QueuePage }),
  },
  {
    path: 'checks/:versionId',
    lazy: async () => ({ Component: (await import('../features/checks/components/check-page')).CheckPage }),
  },
  {
    path: 'children',
    lazy: async () => ({ Component: (await import('../features/children/components/find-page')).FindPage }),
  },
  {
    path: 'children/new',
    lazy: async () => ({
      Component: (await import('../features/children/components/register-page')).RegisterPage,
    }),
  },
  {
    path: 'children/:childId',
    lazy: async () => ({ Component: (await import('../features/children/components/chart-page')).ChartPage }),
  },
  {
    path: 'children/:childId/edit',
    lazy: async () => ({ Component: (await import('../features/children/components/edit-page')).EditPage }),
  },
  {
    path: 'children/:childId/given',
    lazy: async () => ({ Component: (await import('../features/orders/components/given-page')).GivenPage }),
  },
  {
    path: 'drafts/:versionId',
    lazy: async () => ({ Component: (await import('../features/orders/components/draft-page')).DraftPage }),
  },
  {
    path: 'orders/:versionId',
    lazy: async () => ({ Component: (await import('../features/orders/components/order-page')).OrderPage }),
  },
  {
    path: 'orders/:versionId/bedside',
    lazy: async () => ({
      Component: (await import('../features/bedside/components/bedside-page')).BedsidePage,
    }),
  },
  {
    path: 'orders/:versionId/countersign',
    lazy: async () => ({
      Component: (await import('../features/checks/components/countersign-page')).CountersignPage,
    }),
  },
  {
    path: 'exceptions',
    lazy: async () => ({
      Component: (await import('../features/exceptions/components/exceptions-page')).ExceptionsPage,
    }),
  },
  {
    path: 'exceptions/:versionId',
    lazy: async () => ({
      Component: (await import('../features/exceptions/components/exception-page')).ExceptionPage,
    }),
  },
  {
    path: 'account',
    lazy: async () => ({
      Component: (await import('../features/accounts/components/account-page')).AccountPage,
    }),
  },
  { path: '*', element: <NotFoundPage /> },
];

export const router = createBrowserRouter([
  { path: '/sign-in', element: <SignInPage />, errorElement: <FaultPage /> },
  {
    path: '/p/:code',
    errorElement: <FaultPage />,
    lazy: async () => ({ Component: (await import('../features/papers/components/paper-page')).PaperPage }),
  },
  {
    path: '/beside',
    errorElement: <FaultPage />,
    lazy: async () => ({ Component: (await import('../features/checks/components/beside-page')).BesidePage }),
  },
  ...(import.meta.env.DEV
    ? [{ path: '/kit', lazy: async () => ({ Component: (await import('./kit-page')).KitPage }) }]
    : []),
  {
    path: '/',
    hydrateFallbackElement: <></>,
    errorElement: <FaultPage />,
    lazy: async () => ({ Component: (await import('./app-shell')).AppShell }),
    children: inside.map((route) => ({ errorElement: <FaultPage />, ...route })),
  },
]);
