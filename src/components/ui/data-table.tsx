import type { ComponentProps, ReactNode } from 'react';

type DataTableProps = ComponentProps<'table'> & { caption: string };

/** A ruled table: hairlines, no stripes; the caption is for those who cannot see the heading above it. */
export function DataTable({ caption, className = 'wt', children, ...rest }: DataTableProps) {
  return (
    <table {...rest} className={className}>
      <caption className="vh">{caption}</caption>
      {children}
    </table>
  );
}

/** The small second line of a cell. */
export function SecondLine({
  tone,
  under = false,
  children,
}: {
  tone?: 'ochre' | 'brim';
  under?: boolean;
  children: ReactNode;
}) {
  const classes = ['l2', under ? 'in2' : '', tone ? `c-${tone}` : ''];
  return <span className={classes.filter(Boolean).join(' ')}>{children}</span>;
}

/** A balance as printed: always with its sign, a true minus; `text` is a plain decimal. */
export const signed = (text: string): string => {
  if (/^-/.test(text)) return `−${text.slice(1)}`;
  return /^0+([.]0+)?$/.test(text) ? '0' : `+${text}`;
};

/** A charted amount: a dot where nothing was charted, a zero where it is zero. */
export const charted = (text: string | null): string => text ?? '·';
