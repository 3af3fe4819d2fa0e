import { useQuery } from '@tanstack/react-query';
import { call, type Answer } from '@/lib/api';
import { POLL_MS } from '@/lib/query-client';

export type QueueRow = Answer<'checkQueue'>['rows'][number];

/** What waits for a check; the shell counts the same rows. */
export const useQueue = () =>
  useQuery({
    queryKey: ['checks', 'queue'],
    queryFn: ({ signal }) => call('checkQueue', { background: true, signal }),
    refetchInterval: POLL_MS,
  });
