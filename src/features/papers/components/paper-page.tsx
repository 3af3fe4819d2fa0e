import { QueryClientProvider, useQuery } from '@tanstack/react-query';
import { useEffect } from 'react';
import { Link, useParams } from 'react-router-dom';
import { Button } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Glyph } from '@/components/ui/glyph';
import { Mark } from '@/components/ui/mark';
import { Reading } from '@/components/ui/reading';
import { call, type Answer } from '@/lib/api';
import { problemCode, queryClient } from '@/lib/query-client';

type Paper = Answer<'paper'>;

const CODE = /^[A-Z2-7]{20}$/;

/** The verdict on a paper in hand, in words, glyph and colour. */
function Verdict({ paper }: { paper: Paper }) {
  const { known, isCurrent, words, version, order } = paper;
  const tone = isCurrent ? 'c-leaf' : 'c-brim';
  return (
    <>
      <h1 className={`${tone} flex items-center gap-s3 text-form font-bold`}>
        <Glyph name={isCurrent ? 'agrees' : 'refused'} size="verdict" />
        {isCurrent ? 'This paper is current' : known ? 'Do not use this paper' : 'This code is not known'}
      </h1>
      <p className="text-under">{words}</p>
      {version !== null && <p className="soft">It was printed from version {version} of the order.</p>}
      {order !== null && (
        <p>
          <Link to={`/orders/${order.versionId}`}>Open order {order.code}</Link>
        </p>
      )}
      <p className="tag">
        Read at this moment. Scan again before each bag. Brimline supports, and does not replace, clinical
        judgement.
      </p>
    </>
  );
}

function PaperStatus({ code }: { code: string }) {
  const { data, error, refetch } = useQuery({
    queryKey: ['paper', code],
    queryFn: ({ signal }) => call('paper', { params: { code }, signal }),
    enabled: CODE.test(code),
    gcTime: 0,
  });
  if (!CODE.test(code)) {
    return (
      <ErrorPanel title="This is not a code of a paper">
        A code has 20 letters and digits. Scan it again, or type it as it stands under the square.
      </ErrorPanel>
    );
  }
  if (data) return <Verdict paper={data} />;
  if (!error) return <Reading what="the state of this paper" lines={3} />;
  return (
    <ErrorPanel
      title="The state of this paper could not be read"
      action={
        <Button kind="primary" onClick={() => void refetch()}>
          Read it again
        </Button>
      }
    >
      {problemCode(error) === null
        ? 'The server did not answer. Do not rely on the paper: ask someone who can see the order.'
        : error.message}
    </ErrorPanel>
  );
}

/** The page behind the code on a printed order. Open to everyone: it says current or not, and nothing of the order. */
export function PaperPage() {
  const { code = '' } = useParams();
  useEffect(() => {
    document.title = 'Printed order · Brimline';
  }, []);
  return (
    <QueryClientProvider client={queryClient}>
      <main className="sign-in" id="main">
        <div className="sign-in-form">
          <p className="brand">
            <Mark /> Brimline
          </p>
          <PaperStatus code={code.toUpperCase()} />
        </div>
      </main>
    </QueryClientProvider>
  );
}
