import { useEffect, useState, useSyncExternalStore } from 'react';
import { useBlocker } from 'react-router-dom';
import type { OrderForm } from '@shared/orders/form';
import type { Draft } from '@shared/routes/orders';
import { DraftSaver, type SaveStatus } from './draft-saver';
import { noteLeaving } from './use-draft';

/** Keeps the draft while it is typed; leaving with words not kept asks first. */
export function useSaver(draft: Draft, values: OrderForm): { saver: DraftSaver; status: SaveStatus } {
  const [saver] = useState(() => new DraftSaver(draft));
  const status = useSyncExternalStore(saver.subscribe, saver.snapshot);
  useEffect(() => saver.change(values), [saver, values]);
  useEffect(() => {
    saver.reopen();
    const ask = (event: BeforeUnloadEvent) => {
      if (!saver.isKept) event.preventDefault();
    };
    window.addEventListener('beforeunload', ask);
    return () => {
      window.removeEventListener('beforeunload', ask);
      noteLeaving(draft.versionId, saver.flush());
      saver.close();
    };
  }, [saver, draft.versionId]);
  return { saver, status };
}

/** Going to another page first keeps the last words; where that fails the person decides. */
export function useLeaveGuard(saver: DraftSaver, isDone: () => boolean) {
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) =>
      currentLocation.pathname !== nextLocation.pathname && !saver.isKept && !isDone(),
  );
  const { state: standing, proceed } = blocker;
  const [isAsking, setAsking] = useState(false);
  useEffect(() => {
    if (standing !== 'blocked') return;
    void saver.flush().then((isKept) => (isKept ? proceed?.() : setAsking(true)));
  }, [standing, saver, proceed]);
  return {
    isAsking: isAsking && standing === 'blocked',
    stay: () => {
      setAsking(false);
      blocker.reset?.();
    },
    leave: () => {
      setAsking(false);
      proceed?.();
    },
  };
}
