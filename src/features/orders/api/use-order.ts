import { queryOptions, useQuery } from '@tanstack/react-query';
import { call } from '@/lib/api';
import { POLL_MS, queryClient } from '@/lib/query-client';

/** An order page, read again while it is in view; those readings are no sign of life of the person. */
export const orderQuery = (versionId: string) =>
  queryOptions({
    queryKey: ['order', versionId],
    queryFn: ({ signal, client, queryKey }) => {
      const isPoll = (client.getQueryState(queryKey)?.dataUpdateCount ?? 0) > 0;
      return call('order', { params: { id: versionId }, background: isPoll, signal });
    },
    refetchInterval: POLL_MS,
  });

export const useOrder = (versionId: string) => useQuery(orderQuery(versionId));

/** After an act on a version: everything that lists it is read again. */
export const rereadOrder = async (versionId: string): Promise<void> => {
  await queryClient.invalidateQueries({ queryKey: ['order', versionId] });
  void queryClient.invalidateQueries({ predicate: ({ queryKey }) => LISTS.includes(String(queryKey[0])) });
};

const LISTS = ['ward', 'chart', 'checks', 'exceptions'];
