import type { ReactNode } from 'react';

/** Stands where a value would be; the value itself was never sent. */
export function HatchChip({ children = 'Covered' }: { children?: ReactNode }) {
  return (
    <span className="hatch-chip">
      <span>{children}</span>
    </span>
  );
}
