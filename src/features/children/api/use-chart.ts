import { useQuery } from '@tanstack/react-query';
import { call } from '@/lib/api';
import { POLL_MS, queryClient } from '@/lib/query-client';

export const useChart = (childId: string) =>
  useQuery({
    queryKey: ['chart', childId],
    queryFn: ({ signal }) => call('chart', { params: { id: childId }, background: true, signal }),
    refetchInterval: POLL_MS,
  });

/** After any act on this child, everything that shows it is read again. */
export const refreshChild = async (childId: string): Promise<void> => {
  await Promise.all([
    queryClient.invalidateQueries({ queryKey: ['chart', childId] }),
    queryClient.invalidateQueries({ queryKey: ['ward'] }),
  ]);
};
