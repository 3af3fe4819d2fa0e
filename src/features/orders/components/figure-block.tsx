import { SmallGauge } from '@/components/gauge/small-gauge';
import { Figure } from '@/components/ui/figure';
import { GlyphWord } from '@/components/ui/state-word';
import type { LimitFinding } from '@shared/calc/types';
import { formatNumber } from '@shared/rounding';
import type { ShownOrder } from '../forms/shown-order';

/** On a phone the vessel lies on its side under the figure. */
function NarrowGauge({ gauge }: Pick<ShownOrder, 'gauge'>) {
  const words = `${formatNumber(gauge.orderMl, 1)} of ${formatNumber(gauge.brimMl, 1)}\u00a0mL`;
  return (
    <div className="narrow">
      <SmallGauge value={gauge.orderMl} brim={gauge.brimMl} widthPx={358} label={words} />
      <p className="tag">
        {words}. The brim is {formatNumber(gauge.brimMl, 1)}&nbsp;mL {gauge.brimNote}.
      </p>
    </div>
  );
}

type FigureBlockProps = {
  shown: ShownOrder;
  isStale?: boolean;
  /** Instead of "Set the pump to", where nothing may be set: "Asked for, not in force". */
  lead?: string;
};

/** The one large figure of an order: what goes on the pump, with its volume and fluid. */
export function FigureBlock({ shown, isStale = false, lead }: FigureBlockProps) {
  const { figure, volume, over, fluid, gauge } = shown;
  return (
    <div className="figblock">
      <p className={lead ? 'figlab c-ochre' : 'figlab'}>{lead ?? figure.lead}</p>
      <Figure value={figure.value} unit={figure.unit} stale={isStale} />
      <div className="figsub">
        <p>
          {figure.unit === 'mL' ? (
            over
          ) : (
            <>
              <b>{volume}</b> {over}
            </>
          )}
        </p>
        <p>{fluid}</p>
      </div>
      <NarrowGauge gauge={gauge} />
    </div>
  );
}

/** The figure asked for where a ceiling stops it. */
export function OverBlock({ shown, brim }: { shown: ShownOrder; brim: LimitFinding }) {
  const isVolume = brim.code === 'bolus-volume';
  const asked = isVolume ? { value: formatNumber(shown.gauge.orderMl, 1), unit: 'mL' } : shown.figure;
  return (
    <div className="figblock">
      <p className="figlab">
        <GlyphWord glyph="brim" tone="brim">
          {brim.title}
        </GlyphWord>
      </p>
      <Figure value={asked.value} unit={`${asked.unit} asked for`} tone="brim" />
      <div className="figsub">
        <p>{brim.text}</p>
        <p>{shown.fluid}. Nobody signs past a brim.</p>
      </div>
      <NarrowGauge gauge={shown.gauge} />
    </div>
  );
}
