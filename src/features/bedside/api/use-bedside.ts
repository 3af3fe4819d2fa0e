import { useQuery } from '@tanstack/react-query';
import { call } from '@/lib/api';
import { POLL_MS, queryClient } from '@/lib/query-client';

const keyOf = (versionId: string) => ['bedside', versionId];

/** The signed order at the bedside, read again in the background; what was typed is not touched by it. */
export const useBedside = (versionId: string) =>
  useQuery({
    queryKey: keyOf(versionId),
    queryFn: ({ signal }) => call('bedside', { params: { id: versionId }, background: true, signal }),
    refetchInterval: POLL_MS,
  });

/** After an act at the bedside: this page and all that lists the order. */
export async function rereadBedside(versionId: string): Promise<void> {
  await queryClient.invalidateQueries({ queryKey: keyOf(versionId) });
  const lists = ['order', 'ward', 'chart'];
  void queryClient.invalidateQueries({ predicate: ({ queryKey }) => lists.includes(String(queryKey[0])) });
}
