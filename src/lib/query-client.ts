import { QueryClient } from '@tanstack/react-query';
import { ProblemError, UnreachableError } from './server-answer';

/** Pages poll at this pace while they are in view. */
export const POLL_MS = 15_000;

export const queryClient = new QueryClient({
  defaultOptions: {
    queries: {
      // a refusal will not change by asking again; a silent line may
      retry: (count, error) => !(error instanceof ProblemError) && count < 2,
      staleTime: 5_000,
      refetchOnWindowFocus: true,
      networkMode: 'always',
    },
    mutations: { retry: false, networkMode: 'always' },
  },
});

export const isUnreachable = (error: unknown): boolean => error instanceof UnreachableError;
export const problemCode = (error: unknown): string | null =>
  error instanceof ProblemError ? error.code : null;
