import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import { TextareaField } from '@/components/ui/textarea-field';
import { problemWords } from '@/features/orders/api/problem-words';
import { useAct } from '@/features/orders/api/use-act';
import { Refusal } from '@/features/orders/components/refusal';

const LEAST_WORDS = 3;

type SlipPanelProps = { versionId: string; onClose: () => void; onDone: () => void };

/** A slip of one's own: the figures stay as locked in, and the check goes to another person. */
export function SlipPanel({ versionId, onClose, onDone }: SlipPanelProps) {
  const slip = useAct('slip');
  const [reason, setReason] = useState('');
  const [isTried, setTried] = useState(false);
  const isReasoned = reason.trim().length >= LEAST_WORDS;
  const send = () => {
    setTried(true);
    if (!isReasoned) return;
    slip.mutate({ params: { id: versionId }, body: { reason: reason.trim() } }, { onSuccess: onDone });
  };
  return (
    <InlinePanel
      title="I made a slip"
      tone="plum"
      onClose={onClose}
      actions={
        <Button kind="plum" busy={slip.isPending} busyLabel="Passing on, please wait" onClick={send}>
          Record the slip and pass the check on
        </Button>
      }
    >
      {slip.error && <Refusal title="Nothing was recorded.">{problemWords(slip.error)}</Refusal>}
      <p>
        Your figures stay as you locked them in. Another person checks this order from the beginning; that is
        possible once for each version.
      </p>
      <TextareaField
        label="What the slip was"
        value={reason}
        onChange={({ target }) => setReason(target.value)}
        error={isTried && !isReasoned ? 'Say what it was, in a few words.' : undefined}
      />
    </InlinePanel>
  );
}
