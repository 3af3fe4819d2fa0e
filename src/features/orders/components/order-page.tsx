import { useState } from 'react';
import { Link, Navigate, useParams } from 'react-router-dom';
import { Button, buttonClass } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Reading } from '@/components/ui/reading';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { ChildStrip } from '@/features/children/components/child-strip';
import { problemCode } from '@/lib/query-client';
import { isDisputed, isDraft } from '@shared/orders/states';
import type { OrderView } from '@shared/routes/orders';
import { problemWords } from '../api/problem-words';
import { useOrder } from '../api/use-order';
import { useTitle } from '../api/use-title';
import { OrderBar } from './order-bar';
import { OrderCovered } from './order-covered';
import { OrderOpen } from './order-open';

/** The order as anyone may see it: no figures, no author, no timeline with names. */
const withheld = (view: OrderView): OrderView => ({ ...view, open: null, timeline: [] });

function Order({ read, readAt }: { read: OrderView; readAt: number }) {
  const { zone } = useKnownMe().hospital;
  // a dispute opened to settle it is in this page only: the next reading is covered again until it is settled
  const [opened, setOpened] = useState<OrderView | null>(null);
  // the device is being handed to a checker: nothing of the author's may be on the screen then
  const [isHanding, setHanding] = useState(false);
  const shown = opened !== null && read.open === null && isDisputed(read.state) ? opened : read;
  const view = isHanding ? withheld(shown) : shown;
  const { open } = view;
  return (
    <>
      <ChildStrip child={view.child} weight={open === null ? 'covered' : open.content.weight}>
        <Link to={`/children/${view.child.id}`}>Chart</Link>
      </ChildStrip>
      {open === null ? (
        <OrderCovered view={view} zone={zone} />
      ) : (
        <OrderOpen view={view} open={open} zone={zone} readAt={readAt} />
      )}
      <OrderBar
        key={view.versionId}
        view={view}
        onHanding={setHanding}
        onOpened={setOpened}
        onSettled={() => setOpened(null)}
      />
    </>
  );
}

/** One version of an order: open to who may see it, covered to everyone else. */
export function OrderPage() {
  const { versionId = '' } = useParams();
  useTitle('Order');
  const { data, error, refetch, dataUpdatedAt } = useOrder(versionId);
  if (data && isDraft(data.state) && data.you.isAuthor)
    return <Navigate to={`/drafts/${versionId}`} replace />;
  if (data) return <Order key={versionId} read={data} readAt={dataUpdatedAt} />;
  return (
    <main className="page" id="main" tabIndex={-1}>
      {error ? (
        <ErrorPanel
          title="The order could not be read"
          action={
            <>
              <Button kind="primary" onClick={() => void refetch()}>
                Read it again
              </Button>{' '}
              <Link className={buttonClass('quiet')} to="/">
                Go to my ward
              </Link>
            </>
          }
        >
          {problemCode(error) === null
            ? 'The server did not answer. Nothing was changed.'
            : problemWords(error)}
        </ErrorPanel>
      ) : (
        <Reading what="the order" />
      )}
    </main>
  );
}
