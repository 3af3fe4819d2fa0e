import { Link, useParams } from 'react-router-dom';
import { Button, buttonClass } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Reading } from '@/components/ui/reading';
import { ChildStrip } from '@/features/children/components/child-strip';
import { problemWords } from '@/features/orders/api/problem-words';
import { useTitle } from '@/features/orders/api/use-title';
import { useServerNow } from '@/lib/server-clock';
import { useOfflineSince } from '@/lib/use-online';
import { STATE_WORDS, isConnected, isSigned } from '@shared/orders/states';
import type { BedsidePage as Page } from '@shared/routes/bedside';
import { MINUTE, parseInstant } from '@shared/time';
import { useBedside } from '../api/use-bedside';
import { useStop } from '../api/use-stop';
import { useBedsideWork } from '../forms/bedside-work';
import { DoseHead } from './dose-head';
import { RunningView } from './running-view';
import { StartView } from './start-view';
import { StoppedView } from './stopped-view';

/** Not to be started: lapsed, withdrawn, revised, not for this person. */
function NotStartable({ page }: { page: Page }) {
  const start = page.acts.find(({ act }) => act === 'start');
  const words = isSigned(page.state)
    ? start?.words
    : `The order is ${STATE_WORDS[page.state].toLowerCase()}. Nothing is started on it.`;
  return (
    <main className="steps py-s4" id="main" tabIndex={-1}>
      <ErrorPanel
        title="This order cannot be started here"
        action={
          <Link className={buttonClass('primary')} to={`/orders/${page.versionId}`}>
            Go to the order
          </Link>
        }
      >
        {words}
      </ErrorPanel>
    </main>
  );
}

function Bedside({ page, isStale }: { page: Page; isStale: boolean }) {
  const work = useBedsideWork(page.versionId);
  const stopping = useStop(page.versionId);
  const isOffline = useOfflineSince() !== null;
  const mayStart = page.acts.some(({ act, allowed }) => act === 'start' && allowed);
  const { child, content } = page;
  return (
    <div className="bed flex grow flex-col">
      <ChildStrip child={child} weight={content.weight} />
      <DoseHead page={page} bagSize={work.entries.bag.sizeMl} isStale={isStale} />
      {stopping.stopped ? (
        <StoppedView page={page} stopping={stopping} />
      ) : isConnected(page.state) ? (
        <RunningView page={page} stopping={stopping} />
      ) : mayStart ? (
        <StartView page={page} work={work} isOffline={isOffline} />
      ) : (
        <NotStartable page={page} />
      )}
    </div>
  );
}

/** Older than this a dose on the screen is greyed and called not current. */
const STALE_MS = MINUTE;

/** The bedside: child, bag, pump and line against the signed order, then the start, the hold, the stop. */
export function BedsidePage() {
  const { versionId = '' } = useParams();
  const { data, error, refetch } = useBedside(versionId);
  const now = useServerNow(data?.now ?? '');
  useTitle('At the bedside');
  if (!data)
    return (
      <main className="page" id="main" tabIndex={-1}>
        {error ? (
          <ErrorPanel
            title="The order could not be opened at the bedside"
            action={
              <Button kind="primary" onClick={() => void refetch()}>
                Ask again
              </Button>
            }
          >
            {problemWords(error)}
          </ErrorPanel>
        ) : (
          <Reading what="the signed order" lines={8} />
        )}
      </main>
    );
  const readAt = parseInstant(data.now);
  const isStale = error !== null && readAt !== undefined && now - readAt > STALE_MS;
  return <Bedside key={versionId} page={data} isStale={isStale} />;
}
