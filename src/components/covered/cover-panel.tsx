import type { ReactNode } from 'react';
import { useEffect, useId, useState } from 'react';
import { Glyph } from '../ui/glyph';

type CoverPanelProps = {
  /** Heads of the rows, so that they line up with the checker's own; no values, no lengths. */
  rows?: readonly { label: string; tall?: boolean }[];
  /** What happens next, in a sentence. */
  sentence?: ReactNode;
  /** True once both sets are sent: the cover lifts off the children. */
  isLifted?: boolean;
  children?: ReactNode;
};

const WIPE_MS = 240;
const HEADING = 'The other figures';

function Lid({
  rows,
  sentence,
  isLifting,
}: Pick<CoverPanelProps, 'rows' | 'sentence'> & { isLifting: boolean }) {
  const patternId = useId();
  return (
    <div className={isLifting ? 'lid lifting' : 'lid'} aria-hidden={isLifting || undefined}>
      <svg className="hatch" aria-hidden="true" focusable="false">
        <defs>
          <pattern
            id={patternId}
            width="9"
            height="9"
            patternUnits="userSpaceOnUse"
            patternTransform="rotate(45)"
          >
            <path d="M0 0V9" />
          </pattern>
        </defs>
        <rect width="100%" height="100%" fill={`url(#${patternId})`} />
      </svg>
      {rows && (
        <>
          <div className="hd">
            <h2>
              <span className="plate">{HEADING}</span>
            </h2>
          </div>
          <div className="crow" aria-hidden="true">
            {rows.map((row) => (
              <div key={row.label} className={row.tall ? 'ln tall' : 'ln'}>
                <span className="plate">{row.label}</span>
              </div>
            ))}
          </div>
        </>
      )}
      <div className="word">
        <Glyph name="covered" />
        <h3>Covered until you lock in your own figures</h3>
        {sentence && <p>{sentence}</p>}
      </div>
    </div>
  );
}

/** What may not be seen yet. Before it lifts there is nothing under it: the server has sent nothing. */
export function CoverPanel({ rows, sentence, isLifted = false, children }: CoverPanelProps) {
  const [isGone, setIsGone] = useState(isLifted);
  useEffect(() => {
    if (!isLifted) return undefined;
    const timer = setTimeout(() => setIsGone(true), WIPE_MS);
    return () => clearTimeout(timer);
  }, [isLifted]);
  return (
    <section className={rows ? 'cover' : 'cover bare'} aria-label={isLifted ? HEADING : 'Covered'}>
      {isLifted && children}
      {!isGone && <Lid rows={rows} sentence={sentence} isLifting={isLifted} />}
    </section>
  );
}
