import { useEffect, useRef, type ReactNode } from 'react';
import { Glyph } from '@/components/ui/glyph';

/** Why an act did not happen; it takes the focus. */
export function Refusal({ title, children }: { title: string; children?: ReactNode }) {
  const place = useRef<HTMLDivElement>(null);
  useEffect(() => {
    place.current?.focus();
  }, [title, children]);
  return (
    <div className="notice no" role="alert" tabIndex={-1} ref={place}>
      <Glyph name="refused" />
      <div>
        <b>{title}</b> {children}
      </div>
    </div>
  );
}
