import { BrimGauge } from '@/components/gauge/brim-gauge';
import type { CheckPage } from '@shared/routes/checks';
import { authorsSet, checkersSet, type DrawnSet } from '../forms/gauges';

const HEIGHT = 392;
/** Where a signature stands below the drawing. */
const LOW = 312;
const WIDTH = 250;

type DrawnProps = { set: DrawnSet; tone: 'tide' | 'plum'; note: string; heightPx: number };

function Drawn({ set, tone, note, heightPx }: DrawnProps) {
  return (
    <div>
      <BrimGauge {...set.gauge} orderNote={note} tone={tone} heightPx={heightPx} widthPx={WIDTH} />
      <div className={`calc c-${tone}`}>
        {set.sums.map(({ working, result }) => (
          <p key={`${working} ${result}`}>
            <span>{working}</span> = <b>{result}</b>
          </p>
        ))}
      </div>
    </div>
  );
}

/** Both vessels on one scale: the brim is at the same height, so the fills compare. */
export function GaugePair({ page, isLow }: { page: CheckPage; isLow: boolean }) {
  const { uncovered } = page;
  if (uncovered === null) return null;
  const { content, author } = uncovered;
  const heightPx = isLow ? LOW : HEIGHT;
  const yours = checkersSet(page, uncovered);
  return (
    <>
      <h2 className="h2 mb-s2">
        Side by side
        <span>{content.gauge.brimNote}</span>
      </h2>
      <div className="pair">
        <Drawn set={authorsSet(content)} tone="tide" note={author.name} heightPx={heightPx} />
        {yours ? (
          <Drawn set={yours} tone="plum" note="you" heightPx={heightPx} />
        ) : (
          <p className="note">Your figures cannot be drawn: nothing can be worked out from these entries.</p>
        )}
      </div>
    </>
  );
}
