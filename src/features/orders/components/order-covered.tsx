import { CoverPanel } from '@/components/covered/cover-panel';
import { StateWord } from '@/components/ui/state-word';
import type { OrderView } from '@shared/routes/orders';
import { dayTime, URGENCY_WORDS } from '../forms/order-words';
import { kindTitle } from './draft-form-page';
import { OtherVersions, Timeline } from './order-history';

/** What everyone may read of an order that no checker has signed. */
export function OrderCovered({ view, zone }: { view: OrderView; zone: string }) {
  const { kind, code, version, state, reason, askedStart, urgency, waitingWords, timeline } = view;
  const facts = [
    { label: 'Reason', value: reason || 'Not said yet' },
    { label: 'Asked to start', value: askedStart === null ? 'Not said yet' : dayTime(askedStart, zone) },
    { label: 'Urgency', value: URGENCY_WORDS[urgency] },
    ...(waitingWords === '' ? [] : [{ label: 'Waiting', value: waitingWords }]),
  ];
  return (
    <main className="book" id="main" tabIndex={-1}>
      <div className="lp">
        <div className="ttl">
          <h1>{kindTitle(kind)}</h1>
          <StateWord state={state} />
          <span className="tag">
            {code}, version {version}
          </span>
        </div>
        <dl className="see">
          {facts.map(({ label, value }) => (
            <div key={label}>
              <dt>{label}</dt>
              <dd>{value}</dd>
            </div>
          ))}
        </dl>
        <Timeline rows={timeline} zone={zone} />
        <OtherVersions view={view} />
      </div>
      <CoverPanel sentence="Anyone on the ward may be asked to check it, so its figures are sent to nobody but its author before a second person has worked them out." />
    </main>
  );
}
