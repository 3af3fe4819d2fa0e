import { useEffect, useRef, type ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { Glyph } from '@/components/ui/glyph';
import { buttonClass } from '@/components/ui/button';
import type { EndedBy } from './covered-view';

const WORDS: Readonly<Record<EndedBy, { title: string; text: string; isSigned?: true }>> = {
  'handed-on': {
    title: 'You handed the check on',
    text: 'It waits for another checker now. Your unsent figures are gone.',
  },
  returned: {
    title: 'The order is returned to its prescriber',
    text: 'Your reason is kept with it. A new version is checked from the beginning.',
  },
  slip: {
    title: 'The slip is recorded',
    text: 'Your figures stay as they were. Another person checks this order from the beginning.',
  },
  signed: {
    title: 'Signed: the check is done',
    text: 'The order is in force, and may be started at the bedside.',
    isSigned: true,
  },
  'signed-pharmacist': {
    title: 'Signed: the check is done',
    text: 'A pharmacist verifies the product next; nothing is started before that.',
    isSigned: true,
  },
};

type EndedViewProps = { how: EndedBy; versionId: string; children?: ReactNode };

/** What became of the check, and where to go from here. */
export function EndedView({ how, versionId, children }: EndedViewProps) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => heading.current?.focus(), []);
  const { title, text, isSigned } = WORDS[how];
  return (
    <main className="page" id="main" tabIndex={-1}>
      <div className="blank" role="status">
        <h2 ref={heading} tabIndex={-1} className={isSigned ? 'st c-leaf' : undefined}>
          {isSigned && <Glyph name="signed" />}
          {title}
        </h2>
        <p>{text}</p>
        {children ?? (
          <p className="flex flex-wrap gap-s3">
            <Link className={buttonClass('primary')} to="/checks">
              Back to my checks
            </Link>
            <Link className={buttonClass()} to={`/orders/${versionId}`}>
              Go to the order
            </Link>
          </p>
        )}
      </div>
    </main>
  );
}
