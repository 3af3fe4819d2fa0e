import { accountRoutes } from './routes/accounts';
import { bedsideRoutes } from './routes/bedside';
import { checkRoutes } from './routes/checks';
import { childRoutes } from './routes/children';
import { exceptionRoutes } from './routes/exceptions';
import { orderRoutes } from './routes/orders';
import { paperRoutes } from './routes/papers';

/** Every JSON route of the API: method, path, who may knock, what goes in and out. */
export const ROUTES = {
  ...accountRoutes,
  ...childRoutes,
  ...orderRoutes,
  ...exceptionRoutes,
  ...checkRoutes,
  ...bedsideRoutes,
  ...paperRoutes,
} as const;
export type RouteName = keyof typeof ROUTES;

export { PRINT_PDF_PATH } from './routes/papers';
