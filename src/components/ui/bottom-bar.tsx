import type { ReactNode } from 'react';

type BottomBarProps = {
  /** A <StateWord> or <GlyphWord>. */
  state?: ReactNode;
  /** What happens next; its bold first sentence says it. */
  say: ReactNode;
  /** over: a brim is passed, the sign button is gone; covered: the check. */
  kind?: 'plain' | 'over' | 'covered';
  /** The actions, the one primary last. */
  children?: ReactNode;
};

/** The foot of a working screen: where it stands, what the buttons do, the buttons. */
export function BottomBar({ state, say, kind = 'plain', children }: BottomBarProps) {
  return (
    <footer className={kind === 'plain' ? 'bar' : `bar ${kind}`}>
      {state}
      <p className="say" role={kind === 'over' ? 'status' : undefined}>
        {say}
      </p>
      <div className="acts">{children}</div>
    </footer>
  );
}
