import type { ReactNode } from 'react';
import { useEffect, useId, useRef } from 'react';
import { Button } from './button';

type InlinePanelProps = {
  title: string;
  tone?: 'tide' | 'plum' | 'ochre' | 'stop';
  /** Escape, and the quiet button; focus goes back to what opened the panel. */
  onClose: () => void;
  closeLabel?: string;
  children: ReactNode;
  actions?: ReactNode;
  /** Sits on the bottom bar and stays in view. */
  aboveBar?: boolean;
};

/** Signing, read-back, reasons: opens in the page and takes the focus, never covers a dose. Mount it to open it. */
export function InlinePanel(props: InlinePanelProps) {
  const {
    title,
    tone = 'tide',
    onClose,
    closeLabel = 'Not now',
    children,
    actions,
    aboveBar = false,
  } = props;
  const headingId = useId();
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    const opener = document.activeElement;
    heading.current?.focus();
    return () => {
      if (opener instanceof HTMLElement && opener.isConnected) opener.focus();
    };
  }, []);
  return (
    <section
      className={`panel ${tone} ${aboveBar ? 'above-bar' : ''}`.trim()}
      aria-labelledby={headingId}
      onKeyDown={(event) => {
        if (event.key !== 'Escape' || event.defaultPrevented) return;
        event.stopPropagation();
        onClose();
      }}
    >
      <div className="panel-head">
        <h2 id={headingId} ref={heading} tabIndex={-1}>
          {title}
        </h2>
      </div>
      <div className="panel-body">{children}</div>
      <div className="panel-acts">
        {actions}
        <Button kind="quiet" onClick={onClose}>
          {closeLabel}
        </Button>
      </div>
    </section>
  );
}
