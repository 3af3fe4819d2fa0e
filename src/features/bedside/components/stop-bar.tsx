import { Button } from '@/components/ui/button';
import { Refusal } from '@/features/orders/components/refusal';
import type { BedsidePage } from '@shared/routes/bedside';
import { formatTime } from '@shared/time';
import type { Stopping } from '../api/use-stop';

/** One touch, sent at once; when nobody answers, what to do by hand and the time to write down. */
export function StopBar({ page, stopping }: { page: BedsidePage; stopping: Stopping }) {
  const { send, isSending, touchedAt, failure } = stopping;
  const at = touchedAt === null ? '' : formatTime(touchedAt, page.zone);
  return (
    <footer className="gobar stop-first">
      <div>
        {failure ? (
          <Refusal title="Stop the pump by hand; not recorded.">
            You touched Stop at {at}: write that time down.{' '}
            {failure.isSilent
              ? 'The server did not answer. Try again: it is recorded once at most.'
              : failure.words}
          </Refusal>
        ) : (
          <>
            <b>Stop is never refused</b>
            <p>It is recorded at once, and the reason may follow. Stop the pump yourself.</p>
          </>
        )}
      </div>
      <Button
        id="stop"
        kind="stop"
        glyph="stopped"
        className="min-h-[72px] w-full text-lead"
        busy={isSending}
        busyLabel="Recording the stop"
        onClick={send}
      >
        {failure ? 'Record the stop again' : 'Stop the infusion'}
      </Button>
    </footer>
  );
}
