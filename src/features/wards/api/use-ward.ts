import { useQuery } from '@tanstack/react-query';
import { call } from '@/lib/api';
import { POLL_MS } from '@/lib/query-client';

export const useWard = (wardId: string) =>
  useQuery({
    queryKey: ['ward', wardId],
    queryFn: ({ signal }) => call('ward', { params: { id: wardId }, background: true, signal }),
    refetchInterval: POLL_MS,
  });
