import { Notice } from '@/components/ui/notice';
import { StateWord } from '@/components/ui/state-word';
import { useOfflineSince } from '@/lib/use-online';
import { isDisputed, isOnPump, notInForce } from '@shared/orders/states';
import type { OrderView } from '@shared/routes/orders';
import { formatTime, instant } from '@shared/time';
import { shownFromContent } from '../forms/shown-order';
import { ComparisonTable } from './comparison-table';
import { kindTitle } from './draft-form-page';
import { FigureBlock } from './figure-block';
import { GaugeColumn } from './gauge-column';
import { ExceptionList, LimitsApplied } from './limits-applied';
import { OrderFacts } from './order-facts';
import { Infusions, OtherVersions, Timeline } from './order-history';
import { ReadBack } from './read-back';
import { GivesSection, WorkingsSection } from './result-sections';
import { SignatureList } from './signature-list';

type Open = NonNullable<OrderView['open']>;

/** The author of a disputed order: both sets, and that neither is overruled. */
function DisputeNotice({ view }: { view: OrderView }) {
  if (!isDisputed(view.state)) return null;
  return view.you.isAuthor ? (
    <Notice kind="caution" title="The checker’s figures differ from yours.">
      You cannot overrule a checker. Work it out again on your own, then revise: the new version gets a check
      of its own.
    </Notice>
  ) : (
    <Notice kind="caution" title="Two sets of figures differ.">
      Neither is the order. Someone who had no part in it settles it, or the author revises it.
    </Notice>
  );
}

function Comparison({ open, state }: { open: Open; state: OrderView['state'] }) {
  const { comparison, checkerName } = open;
  if (comparison === null) return null;
  const differing = comparison.rows.filter(({ agrees }) => !agrees).length;
  return (
    <section className="sec">
      <h2>
        Independent check
        <span>
          {checkerName === null ? '' : `by ${checkerName}, `}
          {differing === 0 ? 'all agrees' : `${differing} differ`}
        </span>
      </h2>
      {isDisputed(state) ? (
        <ComparisonTable comparison={comparison} />
      ) : (
        <details className="text-small" open={differing > 0}>
          <summary className="min-h-[24px] cursor-pointer py-[5px] text-ink-soft">
            Both sets, entry by entry
          </summary>
          <ComparisonTable comparison={comparison} />
        </details>
      )}
    </section>
  );
}

type OrderOpenProps = { view: OrderView; open: Open; zone: string; readAt: number };

/** An order whose figures the reader may see. */
export function OrderOpen({ view, open, zone, readAt }: OrderOpenProps) {
  const offlineSince = useOfflineSince();
  const { content, author, nameCorrectedSince } = open;
  const shown = shownFromContent(content);
  const isStale = offlineSince !== null && isOnPump(view.state);
  return (
    <main className="book" id="main" tabIndex={-1}>
      <div className="lp">
        <div className="ttl">
          <h1>{kindTitle(view.kind)}</h1>
          <StateWord state={view.state} />
          {view.isOverdue && <span className="c-ochre font-semibold">overdue</span>}
          <span className="tag">
            {view.code}, version {view.version}
          </span>
        </div>
        <DisputeNotice view={view} />
        {offlineSince !== null && (
          <Notice kind="caution" title={`As read at ${formatTime(instant(Math.round(readAt)), zone)}.`}>
            The server does not answer now.
          </Notice>
        )}
        {nameCorrectedSince !== null && (
          <Notice kind="caution" title="Name corrected since.">
            {nameCorrectedSince}
          </Notice>
        )}
        <div className="mt-s3">
          <ReadBack text={content.readBack} />
          <p className="note mt-s2">
            Drawn up by {author.name}, {author.title}.
          </p>
        </div>
        {isDisputed(view.state) && <Comparison open={open} state={view.state} />}
        <SignatureList signatures={open.signatures} zone={zone} />
        <ExceptionList exceptions={open.exceptions} zone={zone} />
        <Infusions infusions={open.infusions} zone={zone} />
        {!isDisputed(view.state) && <Comparison open={open} state={view.state} />}
        <OrderFacts content={content} zone={zone} />
        <Timeline rows={view.timeline} zone={zone} />
        <OtherVersions view={view} />
      </div>
      <section className="rp" aria-label="What the order works out to">
        <GaugeColumn shown={shown} />
        <div className="rcol">
          <FigureBlock shown={shown} isStale={isStale} lead={notInForce(view.state)} />
          <WorkingsSection steps={shown.steps} />
          <GivesSection gives={shown.gives} />
          <LimitsApplied limits={content.limits} />
        </div>
      </section>
    </main>
  );
}
