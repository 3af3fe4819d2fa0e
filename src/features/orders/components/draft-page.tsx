import { Navigate, Link, useParams } from 'react-router-dom';
import { Button, buttonClass } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Reading } from '@/components/ui/reading';
import { problemCode } from '@/lib/query-client';
import { problemWords } from '../api/problem-words';
import { useDraft } from '../api/use-draft';
import { useTitle } from '../api/use-title';
import { DraftBook } from './draft-book';

/** A draft that is one no longer has an order page; the person is taken there. */
const HAS_MOVED_ON = 'order-state';

export function DraftPage() {
  const { versionId = '' } = useParams();
  useTitle('Draft order');
  const { data: draft, error, refetch } = useDraft(versionId);
  if (draft) return <DraftBook key={draft.versionId} draft={draft} />;
  if (problemCode(error) === HAS_MOVED_ON) return <Navigate to={`/orders/${versionId}`} replace />;
  return (
    <main className="page" id="main" tabIndex={-1}>
      {error ? (
        <ErrorPanel
          title="The draft could not be read"
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
        <Reading what="the draft" />
      )}
    </main>
  );
}
