import { useSyncExternalStore } from 'react';

let lostAt: number | null = null;
const listeners = new Set<() => void>();
const tell = () => listeners.forEach((listener) => listener());

/** Called by whoever sees the server answer, or fail to. */
export function noteReachable(isReachable: boolean): void {
  if (isReachable === (lostAt === null)) return;
  lostAt = isReachable ? null : Date.now();
  tell();
}

if (typeof window !== 'undefined') {
  window.addEventListener('offline', () => noteReachable(false));
  window.addEventListener('online', () => noteReachable(true));
}

const subscribe = (listener: () => void) => {
  listeners.add(listener);
  return () => listeners.delete(listener);
};

/** Since when the server has not answered; null while it does. Device time: it is only shown. */
export const useOfflineSince = (): number | null => useSyncExternalStore(subscribe, () => lostAt);
