import { Link } from 'react-router-dom';
import { useState } from 'react';
import { BlankState } from '@/components/ui/blank-state';
import { Button, buttonClass } from '@/components/ui/button';
import { Reading } from '@/components/ui/reading';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { useAct } from '@/features/orders/api/use-act';
import { useTitle } from '@/features/orders/api/use-title';
import { ActPanel } from '@/features/orders/components/act-panel';
import { dayTime } from '@/features/orders/forms/order-words';
import { queryClient } from '@/lib/query-client';
import type { Answer } from '@/lib/api';
import { useExceptionsForMe } from '../api/use-exceptions';
import { NotRead } from '@/features/orders/components/not-read';

type Waiting = Answer<'exceptionsForMe'>;
type ToCountersign = Waiting['toCountersign'][number];

function Asked({ rows, zone }: { rows: Waiting['asked']; zone: string }) {
  if (rows.length === 0) {
    return (
      <BlankState title="Nobody waits for your agreement">
        When an order needs a senior, it appears here.
      </BlankState>
    );
  }
  return (
    <ul className="border-t border-ink">
      {rows.map(({ versionId, code, child, ward, limits, askedAt }) => (
        <li
          key={versionId}
          className="flex flex-wrap items-center gap-x-s5 gap-y-s2 border-b border-rule py-s3"
        >
          <div className="min-w-0 flex-1 basis-[300px]">
            <p>
              <b>{child}</b>{' '}
              <span className="soft">
                {ward}, {code}
              </span>
            </p>
            <p className="text-small">{limits.join(' · ')}</p>
            <p className="note">asked {dayTime(askedAt, zone)}</p>
          </div>
          <Link className={buttonClass('primary')} to={`/exceptions/${versionId}`}>
            Look at it
          </Link>
        </li>
      ))}
    </ul>
  );
}

function CountersignPanel({ row, onClose }: { row: ToCountersign; onClose: () => void }) {
  const countersign = useAct('countersignException');
  return (
    <ActPanel
      title="Countersign what you agreed to on the telephone"
      act="Countersign with my password"
      busy="Countersigning, please wait"
      failed="Nothing was countersigned."
      withPassword
      send={({ password }) =>
        countersign.mutateAsync({ params: { id: row.exceptionId }, body: { password } })
      }
      onDone={() => {
        onClose();
        void queryClient.invalidateQueries({ queryKey: ['exceptions'] });
      }}
      onClose={onClose}
    >
      <p>
        {row.child}, {row.code}: {row.title}. Read the <Link to={`/orders/${row.versionId}`}>order</Link>{' '}
        first; if this is not what you agreed to, call its author and do not countersign.
      </p>
    </ActPanel>
  );
}

function Telephone({
  rows,
  zone,
  onOpen,
}: {
  rows: readonly ToCountersign[];
  zone: string;
  onOpen: (id: string) => void;
}) {
  if (rows.length === 0) return null;
  return (
    <section className="sec">
      <h2>
        Agreed on the telephone<span>to countersign</span>
      </h2>
      <ul>
        {rows.map(({ exceptionId, code, child, title, dueAt }) => (
          <li
            key={exceptionId}
            className="flex flex-wrap items-center gap-x-s5 gap-y-s2 border-b border-rule py-s3"
          >
            <div className="min-w-0 flex-1 basis-[300px]">
              <p>
                <b>{child}</b> <span className="soft">{code}</span>
              </p>
              <p className="text-small">{title}</p>
              <p className="note">due by {dayTime(dueAt, zone)}</p>
            </div>
            <Button onClick={() => onOpen(exceptionId)}>Countersign</Button>
          </li>
        ))}
      </ul>
    </section>
  );
}

/** What waits for a senior. Opening a matter bars its reader from the check, so it is opened on purpose. */
export function ExceptionsPage() {
  useTitle('Senior decisions');
  const { zone } = useKnownMe().hospital;
  const { data, error, refetch } = useExceptionsForMe();
  const [openId, setOpenId] = useState<string | null>(null);
  const row = data?.toCountersign.find(({ exceptionId }) => exceptionId === openId);
  return (
    <>
      <main className="page" id="main" tabIndex={-1}>
        <div className="max-w-[960px]">
          <h1 className="mb-s4 text-page font-bold">Senior decisions</h1>
          {data && <Asked rows={data.asked} zone={zone} />}
          {data && <Telephone rows={data.toCountersign} zone={zone} onOpen={setOpenId} />}
          {!data && !error && <Reading what="what waits for you" />}
          {!data && error && (
            <NotRead title="The list could not be read" error={error} onAgain={() => void refetch()} />
          )}
        </div>
      </main>
      {row && <CountersignPanel row={row} onClose={() => setOpenId(null)} />}
    </>
  );
}
