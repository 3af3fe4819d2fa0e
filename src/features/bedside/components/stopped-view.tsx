import { useEffect, useRef, useState } from 'react';
import { Link } from 'react-router-dom';
import { Button, buttonClass } from '@/components/ui/button';
import { NumberField } from '@/components/ui/number-field';
import { TextareaField } from '@/components/ui/textarea-field';
import { problemWords } from '@/features/orders/api/problem-words';
import { useAct } from '@/features/orders/api/use-act';
import { Refusal } from '@/features/orders/components/refusal';
import { readDecimal } from '@shared/decimal-input';
import type { BedsidePage } from '@shared/routes/bedside';
import { formatTime, parseInstant } from '@shared/time';
import { rereadBedside } from '../api/use-bedside';
import type { Stopping } from '../api/use-stop';

const LEAST_WORDS = 3;
const INFUSED = { decimals: 1, min: 0, max: 9999, unit: 'mL' } as const;

/** The reason of a stop, after it: why, and how much went in. */
function WhyStopped({ versionId, onDone }: { versionId: string; onDone: () => void }) {
  const act = useAct('stopReason');
  const [reason, setReason] = useState('');
  const [volume, setVolume] = useState('');
  const [isTried, setTried] = useState(false);
  const isReasoned = reason.trim().length >= LEAST_WORDS;
  const reading = volume.trim() === '' ? null : readDecimal(volume, INFUSED);
  const send = () => {
    setTried(true);
    if (!isReasoned || reading?.ok === false) return;
    const body = { reason: reason.trim(), volumeInfusedMl: volume.trim() === '' ? null : volume.trim() };
    act.mutate(
      { params: { id: versionId }, body },
      {
        onSuccess: () => {
          onDone();
          void rereadBedside(versionId);
        },
      },
    );
  };
  return (
    <section className="sec max-w-prose" aria-labelledby="why-stopped">
      <h2 id="why-stopped">
        Why it was stopped
        <span>the stop itself is recorded</span>
      </h2>
      <div className="mt-s3 grid gap-s3">
        {act.error && <Refusal title="The reason is not recorded.">{problemWords(act.error)}</Refusal>}
        <TextareaField
          label="Reason"
          value={reason}
          onChange={({ target }) => setReason(target.value)}
          error={isTried && !isReasoned ? 'Say why, in a few words.' : undefined}
        />
        <NumberField
          label="Volume infused, if the pump shows it"
          unit="mL"
          size="big"
          ownHand
          value={volume}
          onChange={({ target }) => setVolume(target.value)}
          error={isTried && reading?.ok === false ? reading.message : undefined}
        />
        <Button kind="primary" busy={act.isPending} busyLabel="Recording, please wait" onClick={send}>
          Record the reason
        </Button>
      </div>
    </section>
  );
}

/** Stopped: since when, by whom, and the reason that may follow. */
export function StoppedView({ page, stopping }: { page: BedsidePage; stopping: Stopping }) {
  const [isTold, setTold] = useState(false);
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => heading.current?.focus(), []);
  const { stopped } = stopping;
  const at = parseInstant(stopped?.stoppedAt ?? '');
  return (
    <main className="steps py-s4" id="main" tabIndex={-1}>
      <h1 ref={heading} tabIndex={-1} className="text-form font-bold outline-none">
        {stopped && at !== undefined
          ? `Stopped at ${formatTime(at, page.zone)}, recorded by ${stopped.stoppedBy}`
          : 'Stopped'}
      </h1>
      <p className="soft">Make sure that the pump itself has stopped and the line is clamped.</p>
      {stopped?.reasonOwed && !isTold && (
        <WhyStopped versionId={page.versionId} onDone={() => setTold(true)} />
      )}
      {isTold && <p className="mt-s3 font-semibold text-leaf">The reason is recorded.</p>}
      <p className="mt-s4">
        <Link className={buttonClass()} to={`/orders/${page.versionId}`}>
          Go to the order
        </Link>
      </p>
    </main>
  );
}
