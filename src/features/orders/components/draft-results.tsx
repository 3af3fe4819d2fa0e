import { useMemo } from 'react';
import { Button } from '@/components/ui/button';
import { CautionList, type CautionEntry } from '@/components/workings/caution-list';
import { workOutDraft, type WorkedOutDraft } from '@shared/orders/work-out-draft';
import type { Exception } from '../api/use-draft';
import { offeredEntries, withOffer, type Offer } from '../forms/apply-offer';
import { useDraftForm } from '../forms/draft-form';
import { shownFromWork, stepsOverBrim } from '../forms/shown-order';
import { BeforeSigning } from './before-signing';
import { FigureBlock, OverBlock } from './figure-block';
import { EmptyVessel, GaugeColumn } from './gauge-column';
import { IncompleteBlock, RefusedBlock } from './not-worked-out';
import { GivesSection, TwoGivesSection, WorkingsSection } from './result-sections';

const SHOWN_GIVES = 6;

/** What is allowed instead, as buttons; the first brim's own words stand above the workings already. */
function waysOut({ brims, information }: WorkedOutDraft, onOffer: (offer: Offer) => void): CautionEntry[] {
  const ways = brims.map(({ title, text, offer }, index) => ({
    strength: offer ? ('offer' as const) : ('brim' as const),
    title: offer ? 'Within the brim:' : `${title}.`,
    text: index === 0 && offer ? undefined : text,
    action: offer && offeredEntries(offer) && (
      <Button small className="mt-s1 flex" onClick={() => onOffer(offer)}>
        {offer.label}
      </Button>
    ),
  }));
  const told = information.filter(({ strength }) => strength === 'information');
  return [
    ...ways,
    ...told.map(({ title, text }) => ({ strength: 'information' as const, title: `${title}.`, text })),
  ];
}

function WaysOut({ work, onOffer }: { work: WorkedOutDraft; onOffer: (offer: Offer) => void }) {
  return (
    <section className="sec">
      <h2>What you can do</h2>
      <CautionList entries={waysOut(work, onOffer)} />
    </section>
  );
}

function OverBrim({ work, onOffer }: { work: WorkedOutDraft; onOffer: (offer: Offer) => void }) {
  const { values, context } = useDraftForm();
  const brim = work.brims[0]!;
  const shown = shownFromWork(work);
  const { offer } = brim;
  const offered = useMemo(() => {
    if (offer === undefined) return undefined;
    const other = workOutDraft(withOffer(values, offer), context);
    return 'workOut' in other ? shownFromWork(other) : undefined;
  }, [values, context, offer]);
  return (
    <>
      <GaugeColumn shown={shown} />
      <div className="rcol">
        <OverBlock shown={shown} brim={brim} />
        <WorkingsSection steps={stepsOverBrim(shown.steps, brim)} />
        {offered ? (
          <TwoGivesSection asked={shown} offered={offered} />
        ) : (
          <GivesSection gives={shown.gives.slice(0, SHOWN_GIVES)} />
        )}
        <WaysOut work={work} onOffer={onOffer} />
      </div>
    </>
  );
}

function Within({
  work,
  exceptions,
  onOffer,
}: {
  work: WorkedOutDraft;
  exceptions: readonly Exception[];
  onOffer: (offer: Offer) => void;
}) {
  const shown = useMemo(() => shownFromWork(work), [work]);
  const offers = [...work.seniors, ...work.cautions].flatMap(({ offer }) =>
    offer && offeredEntries(offer) ? [offer] : [],
  );
  return (
    <>
      <GaugeColumn shown={shown} />
      <div className="rcol">
        <FigureBlock shown={shown} />
        <WorkingsSection steps={shown.steps} />
        <GivesSection gives={shown.gives.slice(0, SHOWN_GIVES)} />
        <BeforeSigning work={work} exceptions={exceptions} />
        {offers.length > 0 && (
          <p className="sec flex flex-wrap gap-s2">
            {offers.map((offer) => (
              <Button key={offer.label} small onClick={() => onOffer(offer)}>
                {offer.label}
              </Button>
            ))}
          </p>
        )}
      </div>
    </>
  );
}

/** The right page: what the left one works out to, at every key. */
export function DraftResults({
  exceptions,
  onOffer,
}: {
  exceptions: readonly Exception[];
  onOffer: (offer: Offer) => void;
}) {
  const { work } = useDraftForm();
  const isWorkedOut = 'workOut' in work;
  return (
    <section className="rp" aria-label="What the order works out to">
      {!isWorkedOut && (
        <>
          <EmptyVessel />
          <div className="rcol">
            {'missing' in work ? (
              <IncompleteBlock work={work} />
            ) : (
              <RefusedBlock work={work} onOffer={onOffer} />
            )}
          </div>
        </>
      )}
      {isWorkedOut && work.brims.length > 0 && <OverBrim work={work} onOffer={onOffer} />}
      {isWorkedOut && work.brims.length === 0 && (
        <Within work={work} exceptions={exceptions} onOffer={onOffer} />
      )}
    </section>
  );
}
