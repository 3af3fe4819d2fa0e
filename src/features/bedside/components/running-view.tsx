import { useEffect, useRef, useState } from 'react';
import { Link } from 'react-router-dom';
import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import { TextField } from '@/components/ui/text-field';
import { problemWords } from '@/features/orders/api/problem-words';
import { useAct } from '@/features/orders/api/use-act';
import { useOrder } from '@/features/orders/api/use-order';
import { Refusal } from '@/features/orders/components/refusal';
import { STATE_WORDS, isOnPump } from '@shared/orders/states';
import type { BedsidePage } from '@shared/routes/bedside';
import { formatDayTime, parseInstant } from '@shared/time';
import { rereadBedside } from '../api/use-bedside';
import type { Stopping } from '../api/use-stop';
import { ResumePanel } from './resume-panel';
import { StopBar } from './stop-bar';

const verdictOf = (page: BedsidePage, act: string) => page.acts.find((verdict) => verdict.act === act);

/** What was read at the start, from the order's own record. */
function AtTheBedside({ page }: { page: BedsidePage }) {
  const { data } = useOrder(page.versionId);
  const infusion = data?.open?.infusions.at(-1);
  if (infusion === undefined) return null;
  const startedAt = parseInstant(infusion.startedAt);
  const rows = [
    [
      'Started',
      `${startedAt === undefined ? '' : formatDayTime(startedAt, page.zone)}, ${infusion.startedBy}`,
    ],
    ['Bag', infusion.bag],
    ['Pump', infusion.pump],
    ['Line', infusion.line],
  ].filter(([, text]) => text);
  return (
    <dl className="see lines mt-s3 max-w-prose">
      {rows.map(([term, text]) => (
        <div key={term} className="full">
          <dt>{term}</dt>
          <dd>{text}</dd>
        </div>
      ))}
    </dl>
  );
}

function HoldPanel({ page, onClose }: { page: BedsidePage; onClose: () => void }) {
  const hold = useAct('hold');
  const [reason, setReason] = useState('');
  return (
    <InlinePanel
      title="Hold the infusion"
      tone="ochre"
      onClose={onClose}
      actions={
        <Button
          kind="primary"
          glyph="held"
          busy={hold.isPending}
          busyLabel="Recording, please wait"
          onClick={() =>
            hold.mutate(
              { params: { id: page.versionId }, body: { reason: reason.trim() } },
              { onSuccess: () => void rereadBedside(page.versionId).then(onClose) },
            )
          }
        >
          Record the hold
        </Button>
      }
    >
      {hold.error && <Refusal title="The hold is not recorded.">{problemWords(hold.error)}</Refusal>}
      <p>
        Hold the pump yourself. It is compared again before it goes on; too long a hold calls on the due list.
      </p>
      <TextField
        label="Why, if you can say it now"
        size="big"
        value={reason}
        onChange={({ target }) => setReason(target.value)}
      />
    </InlinePanel>
  );
}

type RunningViewProps = { page: BedsidePage; stopping: Stopping };

/** Connected: running, held or away. Stop is always in view, and nothing stands beside it. */
export function RunningView({ page, stopping }: RunningViewProps) {
  const [panel, setPanel] = useState<'hold' | 'resume' | null>(null);
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => heading.current?.focus(), []);
  const close = () => setPanel(null);
  const lapsesAt = parseInstant(page.lapsesAt);
  const now = parseInstant(page.now) ?? 0;
  return (
    <>
      <main className="steps py-s4" id="main" tabIndex={-1}>
        <h1 ref={heading} tabIndex={-1} className="text-form font-bold outline-none">
          {isOnPump(page.state) ? 'Recorded as running' : STATE_WORDS[page.state]}
        </h1>
        {lapsesAt !== undefined && (
          <p className={lapsesAt < now ? 'font-semibold text-ochre' : 'soft'}>
            {lapsesAt < now ? 'Overdue: the order’s time ended at ' : 'The order’s time ends at '}
            {formatDayTime(lapsesAt, page.zone)}.
          </p>
        )}
        <AtTheBedside page={page} />
        <p className="mt-s4 flex flex-wrap gap-s3">
          {verdictOf(page, 'hold')?.allowed && (
            <Button glyph="held" onClick={() => setPanel('hold')}>
              Hold for a short time
            </Button>
          )}
          {verdictOf(page, 'resume')?.allowed && (
            <Button kind="primary" glyph="running" onClick={() => setPanel('resume')}>
              Compare the pump and resume
            </Button>
          )}
          <Link className="btn" to={`/orders/${page.versionId}`}>
            Go to the order
          </Link>
        </p>
        {panel === 'hold' && (
          <div className="mt-s4">
            <HoldPanel page={page} onClose={close} />
          </div>
        )}
        {panel === 'resume' && (
          <div className="mt-s4">
            <ResumePanel page={page} onClose={close} />
          </div>
        )}
      </main>
      <StopBar page={page} stopping={stopping} />
    </>
  );
}
