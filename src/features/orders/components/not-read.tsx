import { Button } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { problemCode } from '@/lib/query-client';
import { problemWords } from '../api/problem-words';

type NotReadProps = { title: string; error: Error; onAgain: () => void };

/** Something could not be read: the server's own words, or that it was silent, and one way on. */
export const NotRead = ({ title, error, onAgain }: NotReadProps) => (
  <ErrorPanel
    title={title}
    action={
      <Button kind="primary" onClick={onAgain}>
        Read it again
      </Button>
    }
  >
    {problemCode(error) === null ? 'The server did not answer. Nothing was changed.' : problemWords(error)}
  </ErrorPanel>
);
