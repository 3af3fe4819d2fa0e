import { useQuery } from '@tanstack/react-query';
import { call } from '@/lib/api';
import { POLL_MS } from '@/lib/query-client';
import type { Draft } from '@shared/routes/orders';

/** Saves that a page started while it was left; a page that opens the same draft again waits for them. */
const leaving = new Map<string, Promise<unknown>>();

export function noteLeaving(versionId: string, saving: Promise<unknown>): void {
  leaving.set(versionId, saving);
  void saving.finally(() => {
    if (leaving.get(versionId) === saving) leaving.delete(versionId);
  });
}

/** The draft as it stands when the page opens; afterwards the form is ahead of the server, so it is not read again. */
export const useDraft = (versionId: string) =>
  useQuery({
    queryKey: ['draft', versionId],
    queryFn: async ({ signal }) => {
      await leaving.get(versionId);
      return call('draft', { params: { id: versionId }, signal });
    },
    staleTime: Infinity,
    gcTime: 0,
    refetchOnWindowFocus: false,
    refetchOnReconnect: false,
  });

export type Exception = Draft['exceptions'][number];

const isAsked = ({ state }: Exception): boolean => state === 'asked';

/** Only the exceptions are polled, and only while one waits for its answer. */
export const useExceptions = (draft: Draft) =>
  useQuery({
    queryKey: ['draft-exceptions', draft.versionId],
    queryFn: async ({ signal }) => {
      const { exceptions } = await call('draft', {
        params: { id: draft.versionId },
        background: true,
        signal,
      });
      return exceptions;
    },
    initialData: draft.exceptions,
    staleTime: POLL_MS,
    gcTime: 0,
    refetchOnWindowFocus: false,
    refetchInterval: ({ state }) => (state.data?.some(isAsked) ? POLL_MS : false),
  });
