import { useEffect, useState } from 'react';
import { instant, parseInstant, type Instant } from '@shared/time';

let offset = 0;

/** Moves on by the device's ticks from what the server last said; the device's own date is never shown. */
export function useServerNow(serverSaid: string, everyMs = 15_000): Instant {
  const [, tick] = useState(0);
  useEffect(() => {
    const said = parseInstant(serverSaid);
    if (said !== undefined) offset = said - Date.now();
    tick((n) => n + 1);
  }, [serverSaid]);
  useEffect(() => {
    const timer = setInterval(() => tick((n) => n + 1), everyMs);
    return () => clearInterval(timer);
  }, [everyMs]);
  return serverNow();
}

export const serverNow = (): Instant => instant(Math.round(Date.now() + offset));
