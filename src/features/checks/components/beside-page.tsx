import { QueryClientProvider, useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import { Mark } from '@/components/ui/mark';
import { OfflineBar } from '@/components/ui/offline-bar';
import { SkipLink } from '@/components/ui/skip-link';
import { problemWords } from '@/features/orders/api/problem-words';
import { useTitle } from '@/features/orders/api/use-title';
import { Refusal } from '@/features/orders/components/refusal';
import { call, type Answer } from '@/lib/api';
import { problemCode, queryClient } from '@/lib/query-client';
import { useServerNow } from '@/lib/server-clock';
import { useOfflineSince } from '@/lib/use-online';
import { formatTime, instant, parseInstant } from '@shared/time';
import { useCheckPage, type CheckSource } from '../api/check-source';
import { CheckUnread, CheckView } from './check-page';

const BESIDE: CheckSource = { via: 'beside' };

/** A full load: nothing of the checker stays in memory, and the author's own session takes over again. */
const leave = (versionId: string | undefined): void =>
  window.location.assign(versionId === undefined ? '/' : `/orders/${versionId}`);

function useClosing(versionId: string | undefined) {
  return useMutation({
    mutationFn: () => call('closeBeside', { body: {} }),
    onSuccess: () => leave(versionId),
  });
}

type HeadProps = { visit: Answer<'besidePage'>['visit']; zone: string; action: React.ReactNode };

function Head({ visit, zone, action }: HeadProps) {
  const until = parseInstant(visit?.until ?? '');
  const offlineSince = useOfflineSince();
  return (
    <>
      <SkipLink />
      <header className="top py-s1">
        <span className="brand">
          <Mark />
          Brimline
        </span>
        <p className="rounded bg-plum-soft px-s3 py-s1 text-plum" role="status">
          {visit ? (
            <>
              Checking as <b>{visit.checkerName}</b> for this order only
              {until !== undefined && `, until ${formatTime(until, zone)}`}
            </>
          ) : (
            'Checking beside the author, for this order only'
          )}
        </p>
        <span className="sp" />
        {action}
      </header>
      {offlineSince !== null && <OfflineBar since={formatTime(instant(offlineSince), zone)} />}
    </>
  );
}

function Visit({ page }: { page: Answer<'besidePage'> }) {
  const [asks, setAsks] = useState(false);
  const { versionId } = page.order;
  const closing = useClosing(versionId);
  useServerNow(page.now);
  const isLockedIn = page.uncovered !== null;
  const giveBack = (
    <Button
      kind="primary"
      busy={closing.isPending}
      busyLabel="Closing, please wait"
      onClick={() => closing.mutate()}
    >
      Close and give the screen back
    </Button>
  );
  const trouble = closing.error && (
    <Refusal title="The visit was not closed.">{problemWords(closing.error)}</Refusal>
  );
  return (
    <>
      <Head
        visit={page.visit}
        zone={page.zone}
        action={
          isLockedIn ? (
            <Button kind="quiet" busy={closing.isPending} onClick={() => closing.mutate()}>
              Close and give the screen back
            </Button>
          ) : (
            <Button kind="quiet" onClick={() => setAsks(true)}>
              Close without locking in
            </Button>
          )
        }
      />
      {isLockedIn && trouble}
      {asks && !isLockedIn && (
        <InlinePanel
          title="Close without locking in?"
          tone="ochre"
          onClose={() => setAsks(false)}
          closeLabel="Go on checking"
          actions={giveBack}
        >
          {trouble}
          <p>
            This marks you as having seen the author’s figures, since their page opens again on this screen.
            Another checker is then asked first. Your unsent figures are kept for you alone.
          </p>
        </InlinePanel>
      )}
      <CheckView source={BESIDE} page={page} waysOn={giveBack} />
    </>
  );
}

function Over() {
  return (
    <main className="page" id="main" tabIndex={-1}>
      <div className="blank">
        <h1 className="text-lead font-bold">This visit is over</h1>
        <p>
          It lasts ten minutes and is for one order. Nothing more can be entered here; what was locked in is
          kept.
        </p>
        <Button kind="primary" onClick={() => leave(undefined)}>
          Give the screen back
        </Button>
      </div>
    </main>
  );
}

function Entry() {
  const { data, error, refetch } = useCheckPage(BESIDE);
  useTitle('Check beside the author');
  if (problemCode(error) === 'signed-out') return <Over />;
  if (!data) return <CheckUnread error={error} retry={() => void refetch()} />;
  return <Visit page={data} />;
}

/** The check beside the author, on their device: its own sign-in, its own cookie, this one order. */
export const BesidePage = () => (
  <QueryClientProvider client={queryClient}>
    <Entry />
  </QueryClientProvider>
);
