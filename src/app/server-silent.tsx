import { Button } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';

/** The very first question got no answer: nothing can be shown from a guess. */
export const ServerSilent = ({ retry }: { retry: () => void }) => (
  <main className="page" id="main">
    <ErrorPanel
      title="The server did not answer"
      action={
        <Button kind="primary" onClick={retry}>
          Ask again
        </Button>
      }
    >
      Nothing is shown, because nothing is known. A pump that has to be stopped is stopped by hand.
    </ErrorPanel>
  </main>
);
