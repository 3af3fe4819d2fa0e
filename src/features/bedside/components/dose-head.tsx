import { Link } from 'react-router-dom';
import { SmallGauge } from '@/components/gauge/small-gauge';
import { Figure } from '@/components/ui/figure';
import { StateWord } from '@/components/ui/state-word';
import { shownFromContent } from '@/features/orders/forms/shown-order';
import { isOnPump } from '@shared/orders/states';
import type { BedsidePage } from '@shared/routes/bedside';
import { lastingWords, signedWords } from '../forms/bedside-words';

/** Where one band ends and the next begins, mL. */
function notchesOf(bands: readonly { ml: number }[]): number[] {
  let sum = 0;
  return bands.map(({ ml }) => (sum += ml));
}

/** The dose, at arm's length: what goes on the pump or into the syringe, of which fluid, signed by whom. */
export function DoseHead({
  page,
  bagSize,
  isStale,
}: {
  page: BedsidePage;
  bagSize: string;
  isStale: boolean;
}) {
  const { content, state } = page;
  const shown = shownFromContent(content);
  const { figure, volume, over, gauge } = shown;
  const { ward, bed } = page.child;
  const place = [ward && `${ward.name} ward`, bed && `bed ${bed}`].filter(Boolean).join(', ');
  const potassium = Number(content.fluid.addedPotassium);
  return (
    <section className="dose" aria-label="The signed order">
      <Figure value={figure.value} unit={figure.unit} size="l" stale={isStale} />
      <div className="wd">
        <p>
          <b>{content.fluid.base}</b>
        </p>
        {potassium > 0 && <p>with potassium chloride {potassium} mmol/L, ready mixed</p>}
        <div className="hgl">
          <SmallGauge
            value={gauge.orderMl}
            brim={gauge.brimMl}
            notches={notchesOf(content.gauge.bands.map(({ ml }) => ({ ml: Number(ml) })))}
            widthPx={112}
            onPump={isOnPump(state)}
            label={`${gauge.orderMl} of ${gauge.brimMl} mL ${gauge.brimNote}`}
          />
          <span>
            {volume} {over}.{lastingWords(content, bagSize)}
          </span>
        </div>
      </div>
      <div className="sg">
        <StateWord state={state} />
        {signedWords(page).map((line) => (
          <p key={line}>{line}</p>
        ))}
        <p>
          {place && `${place}. `}
          <Link to={`/orders/${page.versionId}`}>Order {page.code}</Link>
        </p>
      </div>
    </section>
  );
}
