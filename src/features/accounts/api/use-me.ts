import { queryOptions, useQuery, useSuspenseQuery } from '@tanstack/react-query';
import { call } from '@/lib/api';
import { queryClient } from '@/lib/query-client';
import type { Me } from '@shared/routes/accounts';

export const meQuery = queryOptions({
  queryKey: ['me'],
  queryFn: ({ signal }) => call('me', { background: true, signal }),
  refetchInterval: 60_000,
  staleTime: 30_000,
});

export const useMe = () => useQuery(meQuery);

/** The signed-in person, on pages that only exist inside the shell. */
export const useKnownMe = (): Me => useSuspenseQuery(meQuery).data;

/** After any answer that says who is signed in. */
export const setMe = (me: Me): void => {
  queryClient.setQueryData(meQuery.queryKey, me);
};
