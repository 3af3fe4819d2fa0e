import { useEffect, type ReactNode } from 'react';

/** Holds an inline panel at the foot of the page, in the bar's place; the figures it is about end right above it. */
export function FootPanel({ children }: { children: ReactNode }) {
  useEffect(() => {
    const page = document.documentElement;
    page.scrollTop = page.scrollHeight;
  }, []);
  return <div className="z-[4] mid:sticky mid:bottom-0">{children}</div>;
}
