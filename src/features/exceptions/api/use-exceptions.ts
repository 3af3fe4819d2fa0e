import { useQuery } from '@tanstack/react-query';
import { call } from '@/lib/api';
import { POLL_MS } from '@/lib/query-client';

/** Senior matters that wait for the reader, and telephone agreements to countersign. */
export const useExceptionsForMe = () =>
  useQuery({
    queryKey: ['exceptions'],
    queryFn: ({ signal, client, queryKey }) => {
      const isPoll = (client.getQueryState(queryKey)?.dataUpdateCount ?? 0) > 0;
      return call('exceptionsForMe', { background: isPoll, signal });
    },
    refetchInterval: POLL_MS,
  });
