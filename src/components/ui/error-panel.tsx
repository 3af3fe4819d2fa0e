import type { ReactNode } from 'react';
import { useEffect, useRef } from 'react';

type ErrorPanelProps = {
  /** "The order was not signed" */
  title: string;
  /** What was sent and what was not. */
  children: ReactNode;
  action?: ReactNode;
  /** A whole page that could not be read takes the focus; a part of one does not. */
  takesFocus?: boolean;
};

/** What failed, what became of it, one way on. */
export function ErrorPanel({ title, children, action, takesFocus = true }: ErrorPanelProps) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    if (takesFocus) heading.current?.focus();
  }, [takesFocus]);
  return (
    <div className="blank" role="alert">
      <h2 className="c-brim" ref={heading} tabIndex={-1}>
        {title}
      </h2>
      <p>{children}</p>
      {action}
    </div>
  );
}
