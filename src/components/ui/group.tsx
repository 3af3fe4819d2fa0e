import type { ReactNode } from 'react';

type GroupProps = {
  head: ReactNode;
  note?: ReactNode;
  /** Where the first row has labels, the head lines up with the fields and not with the labels. */
  align?: 'field' | 'label';
  children: ReactNode;
};

/** A ruled part of a form: bold head in the margin, fields to the right. */
export function Group({ head, note, align = 'field', children }: GroupProps) {
  return (
    <section className={align === 'field' ? 'grp lab' : 'grp'}>
      <h2>
        {head}
        {note && <small>{note}</small>}
      </h2>
      <div>{children}</div>
    </section>
  );
}

/** Fields side by side; they wrap on a phone. */
export function Row({ tight = false, children }: { tight?: boolean; children: ReactNode }) {
  return <div className={tight ? 'row tight' : 'row'}>{children}</div>;
}

/** A reason that is owed, under an ochre bar. */
export function Owed({ children }: { children: ReactNode }) {
  return <div className="why">{children}</div>;
}
