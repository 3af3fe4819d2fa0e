import { Link } from 'react-router-dom';
import { StateWord } from '@/components/ui/state-word';
import type { OrderView } from '@shared/routes/orders';
import { formatNumber } from '@shared/rounding';
import { dayTime } from '../forms/order-words';

/** What happened, in the order it happened; names are withheld while the version is covered. */
export function Timeline({ rows, zone }: { rows: OrderView['timeline']; zone: string }) {
  if (rows.length === 0) return null;
  return (
    <section className="sec">
      <h2>Timeline</h2>
      <ol>
        {rows.map(({ seq, at, who, words, outcome }) => (
          <li
            key={seq}
            className="grid grid-cols-[104px_1fr] gap-x-s3 border-b border-rule py-[5px] text-small"
          >
            <span className="soft whitespace-nowrap">{dayTime(at, zone)}</span>
            <span className={outcome === 'refused' ? 'c-ochre' : undefined}>
              {words}
              {who !== null && <span className="soft">, {who}</span>}
            </span>
          </li>
        ))}
      </ol>
    </section>
  );
}

export function OtherVersions({ view }: { view: OrderView }) {
  if (view.otherVersions.length === 0) return null;
  return (
    <section className="sec">
      <h2>Other versions</h2>
      <ul>
        {view.otherVersions.map(({ versionId, version, state }) => (
          <li key={versionId} className="flex items-center gap-s3 border-b border-rule py-[5px]">
            <Link to={`/orders/${versionId}`}>Version {version}</Link>
            <StateWord state={state} />
          </li>
        ))}
      </ul>
    </section>
  );
}

type Infusion = NonNullable<OrderView['open']>['infusions'][number];

const endOf = ({ endedAt, endedBy, endReason, volumeInfusedMl }: Infusion, zone: string): string => {
  if (endedAt === null) return 'running';
  const infused =
    volumeInfusedMl === null ? '' : `, ${formatNumber(Number(volumeInfusedMl), 1)}\u00a0mL infused`;
  return `ended ${dayTime(endedAt, zone)} by ${endedBy ?? 'the program'}${infused}${endReason && `: ${endReason}`}`;
};

/** What was started at the bedside, and how it ended. */
export function Infusions({ infusions, zone }: { infusions: readonly Infusion[]; zone: string }) {
  if (infusions.length === 0) return null;
  return (
    <section className="sec">
      <h2>At the bedside</h2>
      <ul>
        {infusions.map((infusion) => (
          <li key={infusion.id} className="border-b border-rule py-[6px]">
            <p>
              <b>Started {dayTime(infusion.startedAt, zone)}</b> by {infusion.startedBy},{' '}
              {endOf(infusion, zone)}
            </p>
            <p className="text-small text-ink-soft">
              {[infusion.bag, infusion.line, infusion.pump].filter(Boolean).join(' · ')}
            </p>
          </li>
        ))}
      </ul>
    </section>
  );
}
