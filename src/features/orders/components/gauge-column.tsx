import { BrimGauge } from '@/components/gauge/brim-gauge';
import { OtherBrims } from '@/components/workings/other-brims';
import { drawGauge } from '@shared/gauge/geometry';
import type { ShownOrder } from '../forms/shown-order';

export const GAUGE_HEIGHT = 548;

/** "0.06" bold in "0.06 of 0.2 mmol/kg/h". */
function BrimText({ text }: { text: string }) {
  const [value, ...rest] = text.split(' ');
  return (
    <>
      <b>{value}</b> {rest.join(' ')}
    </>
  );
}

/** The vessel, and under it the other ceilings that hold the order. */
export function GaugeColumn({ shown }: { shown: ShownOrder }) {
  return (
    <div className="gcol">
      <BrimGauge {...shown.gauge} heightPx={GAUGE_HEIGHT} />
      {shown.otherBrims.length > 0 && (
        <section className="sec">
          <h2>Other brims</h2>
          <OtherBrims
            brims={shown.otherBrims.map((brim) => ({ ...brim, text: <BrimText text={brim.text} /> }))}
          />
        </section>
      )}
    </div>
  );
}

/** An open vessel without marks: they belong to a child whose figures are not known yet. */
export function EmptyVessel() {
  const { width, height, wall } = drawGauge({
    orderMl: 0,
    brimMl: 1,
    brimNote: '',
    bands: [],
    ghosts: [],
    heightPx: GAUGE_HEIGHT,
  });
  return (
    <div className="gcol">
      <svg
        className="ga"
        viewBox={`0 0 ${width} ${height}`}
        width={width}
        height={height}
        role="img"
        aria-label="Brim gauge: empty, nothing is worked out yet."
      >
        <path className="wall" d={wall} />
      </svg>
    </div>
  );
}
