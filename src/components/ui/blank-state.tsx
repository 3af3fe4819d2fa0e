import type { ReactNode } from 'react';

/** Nothing here: one bold sentence, one plain one, one button. */
export function BlankState({
  title,
  children,
  action,
}: {
  title: string;
  children?: ReactNode;
  action?: ReactNode;
}) {
  return (
    <div className="blank">
      <h2>{title}</h2>
      {children && <p>{children}</p>}
      {action}
    </div>
  );
}
