import { useEffect } from 'react';

/** The tab's title; never a child's name. */
export function useTitle(title: string): void {
  useEffect(() => {
    document.title = `${title} · Brimline`;
  }, [title]);
}
