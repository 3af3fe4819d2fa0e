import { useEffect, useRef, type FocusEvent, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Glyph } from '@/components/ui/glyph';
import type { StepVerdict } from '@shared/routes/bedside';

/** waiting: an earlier step comes first; now: in hand; refused; agrees. */
export type StepStanding = 'waiting' | 'now' | 'refused' | 'agrees';

function Verdict({ standing, isComparing }: { standing: StepStanding; isComparing: boolean }) {
  if (isComparing) return <span className="verd c-soft">Comparing…</span>;
  if (standing === 'agrees' || standing === 'refused') {
    const isGood = standing === 'agrees';
    return (
      <span className={`verd ${isGood ? 'c-leaf' : 'c-brim'}`} role="status">
        <Glyph name={isGood ? 'agrees' : 'refused'} size="verdict" />
        {isGood ? 'Agrees' : 'Refused'}
      </span>
    );
  }
  return <span className="verd c-soft font-normal">{standing === 'now' ? 'In hand' : 'Later'}</span>;
}

type StepFrameProps = {
  id: string;
  number: number;
  title: string;
  how: string;
  says: ReactNode;
  standing: StepStanding;
  isComparing?: boolean;
  /** Fields while the step is in hand or refused; what was read once it agrees. */
  children: ReactNode;
  isPump?: boolean;
  onBlur?: (event: FocusEvent<HTMLElement>) => void;
};

const CLASSES: Readonly<Record<StepStanding, string>> = {
  waiting: '',
  now: 'now',
  refused: 'bad',
  agrees: '',
};

/** One of the bedside's steps: what the order says, what is there, and whether the two agree. */
export function StepFrame(props: StepFrameProps) {
  const { id, number, title, how, says, standing, isComparing = false, children, isPump, onBlur } = props;
  const row = useRef<HTMLLIElement>(null);
  useEffect(() => {
    // on a phone the refused step must be in view
    if (standing === 'refused') row.current?.scrollIntoView?.({ block: 'center' });
    if (standing === 'now' && number > 1) row.current?.scrollIntoView?.({ block: 'nearest' });
  }, [standing, number]);
  const classes = ['stp', CLASSES[standing], isPump ? 'pumpstep' : ''].filter(Boolean).join(' ');
  return (
    <li
      className={classes}
      ref={row}
      aria-labelledby={id}
      aria-current={standing === 'now' || standing === 'refused' ? 'step' : undefined}
      onBlur={onBlur}
    >
      <span className="no">{number}</span>
      <h2 id={id}>
        {title}
        <small>{how}</small>
      </h2>
      <div className="says">{says}</div>
      <div className="got">{children}</div>
      <Verdict standing={standing} isComparing={isComparing} />
    </li>
  );
}

/** What was read and agrees, line by line, and the way back to it. */
export function Read({
  lines,
  onChange,
  title,
}: {
  lines: readonly string[];
  onChange: () => void;
  title: string;
}) {
  return (
    <>
      {lines.filter(Boolean).map((line) => (
        <p className="ck" key={line}>
          <Glyph name="agrees" />
          <span>{line}</span>
        </p>
      ))}
      <Button kind="quiet" small className="-ml-s2" onClick={onChange} aria-label={`Read again: ${title}`}>
        Read again
      </Button>
    </>
  );
}

/** The finding about one field; undefined where it is right. */
export const findingOf = (verdict: StepVerdict | undefined, field: string): string | undefined =>
  verdict?.findings.find((finding) => finding.field === field)?.text;
