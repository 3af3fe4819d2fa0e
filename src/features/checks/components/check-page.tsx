import { useState, type ReactNode } from 'react';
import { Link, useParams } from 'react-router-dom';
import { Button } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Reading } from '@/components/ui/reading';
import { problemWords } from '@/features/orders/api/problem-words';
import { useTitle } from '@/features/orders/api/use-title';
import type { CheckPage as Page } from '@shared/routes/checks';
import { rereadCheck, showPage, useCheckPage, type CheckSource } from '../api/check-source';
import { CheckStrip } from './check-strip';
import { CoveredView, type EndedBy } from './covered-view';
import { EndedView } from './ended-view';
import { UncoveredView } from './uncovered-view';

type CheckViewProps = {
  source: CheckSource;
  page: Page;
  links?: ReactNode;
  /** What stands in the place of the ways on, once the check is over. */
  waysOn?: ReactNode;
};

/** One check from covered to signed, at one's own screen or beside the author. */
export function CheckView({ source, page, links, waysOn }: CheckViewProps) {
  const [ended, setEnded] = useState<EndedBy | null>(null);
  const [lifts, setLifts] = useState(false);
  const end = (how: EndedBy) => {
    setEnded(how);
    void rereadCheck(source);
  };
  if (ended) {
    return (
      <>
        <CheckStrip page={page} />
        <EndedView how={ended} versionId={page.order.versionId}>
          {waysOn}
        </EndedView>
      </>
    );
  }
  return (
    <>
      <CheckStrip page={page}>{links}</CheckStrip>
      {page.uncovered === null ? (
        <CoveredView
          {...{ source, page }}
          onEnded={end}
          onUncovered={(uncovered) => {
            setLifts(true);
            showPage(source, uncovered);
            void rereadCheck(source);
          }}
        />
      ) : (
        <UncoveredView {...{ source, page, lifts }} onEnded={end} />
      )}
    </>
  );
}

type UnreadProps = { error: Error | null; retry: () => void; children?: ReactNode };

/** The page is being read, or could not be. */
export function CheckUnread({ error, retry, children }: UnreadProps) {
  return (
    <main className="page" id="main" tabIndex={-1}>
      {error ? (
        <ErrorPanel
          title="The check could not be opened"
          action={
            <span className="flex flex-wrap gap-s3">
              <Button kind="primary" onClick={retry}>
                Ask again
              </Button>
              {children}
            </span>
          }
        >
          {problemWords(error)}
        </ErrorPanel>
      ) : (
        <Reading what="the check" lines={8} />
      )}
    </main>
  );
}

/** An independent check at the checker's own screen. */
export function CheckPage() {
  const { versionId = '' } = useParams();
  const source: CheckSource = { via: 'own', versionId };
  const { data, error, refetch } = useCheckPage(source);
  useTitle('Independent check');
  if (!data)
    return (
      <CheckUnread error={error} retry={() => void refetch()}>
        <Link className="btn" to="/checks">
          Back to my checks
        </Link>
      </CheckUnread>
    );
  return (
    <CheckView
      // another check in the same place starts with its own figures
      key={versionId}
      source={source}
      page={data}
      links={<Link to={`/children/${data.child.id}`}>Chart</Link>}
    />
  );
}
