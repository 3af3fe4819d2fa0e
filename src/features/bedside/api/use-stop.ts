import { useState } from 'react';
import { useAct } from '@/features/orders/api/use-act';
import { problemWords } from '@/features/orders/api/problem-words';
import { isUnreachable } from '@/lib/query-client';
import { serverNow } from '@/lib/server-clock';
import type { Instant } from '@shared/time';
import { rereadBedside } from './use-bedside';

/** Stop goes out at one touch; the time of that touch is kept for what has to be written down if nobody answers. */
export function useStop(versionId: string) {
  const act = useAct('stop');
  const [touchedAt, setTouchedAt] = useState<Instant | null>(null);
  const send = () => {
    setTouchedAt((before) => before ?? serverNow());
    act.mutate(
      { params: { id: versionId }, body: { reason: '', volumeInfusedMl: null } },
      { onSuccess: () => void rereadBedside(versionId) },
    );
  };
  return {
    send,
    isSending: act.isPending,
    touchedAt,
    stopped: act.data ?? null,
    failure: act.error ? { isSilent: isUnreachable(act.error), words: problemWords(act.error) } : null,
  };
}
export type Stopping = ReturnType<typeof useStop>;
