import type { ReactNode } from 'react';
import { Glyph } from './glyph';

type NoticeProps = {
  kind: 'caution' | 'stop' | 'agrees';
  title: string;
  children?: ReactNode;
  action?: ReactNode;
  /** Said by a screen reader when it appears. */
  live?: boolean;
};

const FACE = {
  caution: { className: 'notice', glyph: 'caution' },
  stop: { className: 'notice no', glyph: 'brim' },
  agrees: { className: 'notice yes', glyph: 'agrees' },
} as const;

/** Something to know, where the eye already is. */
export function Notice({ kind, title, children, action, live = false }: NoticeProps) {
  const face = FACE[kind];
  return (
    <div className={face.className} role={live ? (kind === 'stop' ? 'alert' : 'status') : undefined}>
      <Glyph name={face.glyph} />
      <div>
        <b>{title}</b> {children}
      </div>
      {action}
    </div>
  );
}
