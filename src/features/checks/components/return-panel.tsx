import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import { SelectField } from '@/components/ui/select-field';
import { TextareaField } from '@/components/ui/textarea-field';
import { problemWords } from '@/features/orders/api/problem-words';
import { useAct } from '@/features/orders/api/use-act';
import { Refusal } from '@/features/orders/components/refusal';
import { RETURN_WORDS, type ReturnMatter } from '@shared/checks/words';

const MATTERS = Object.entries(RETURN_WORDS).map(([value, label]) => ({ value, label }));
const isMatter = (text: string): text is ReturnMatter => text in RETURN_WORDS;
const LEAST_WORDS = 3;

type ReturnPanelProps = { versionId: string; onClose: () => void; onDone: () => void };

/** Cannot verify: the order goes back to its prescriber with what is wrong and why. */
export function ReturnPanel({ versionId, onClose, onDone }: ReturnPanelProps) {
  const cannotVerify = useAct('cannotVerify');
  const [what, setWhat] = useState('');
  const [reason, setReason] = useState('');
  const [isTried, setTried] = useState(false);
  const isReasoned = reason.trim().length >= LEAST_WORDS;

  const send = () => {
    setTried(true);
    if (!isMatter(what) || !isReasoned) return;
    cannotVerify.mutate(
      { params: { id: versionId }, body: { what, reason: reason.trim() } },
      { onSuccess: onDone },
    );
  };

  return (
    <InlinePanel
      title="Cannot verify: return to the prescriber"
      tone="ochre"
      onClose={onClose}
      actions={
        <Button
          kind="primary"
          glyph="returned"
          busy={cannotVerify.isPending}
          busyLabel="Returning, please wait"
          onClick={send}
        >
          Return to prescriber with this reason
        </Button>
      }
    >
      {cannotVerify.error && (
        <Refusal title="The order was not returned.">{problemWords(cannotVerify.error)}</Refusal>
      )}
      <SelectField
        label="What you cannot verify"
        placeholder="Choose"
        options={MATTERS}
        value={what}
        onChange={({ target }) => setWhat(target.value)}
        error={isTried && !isMatter(what) ? 'Choose one.' : undefined}
      />
      <TextareaField
        label="Your reason, in a sentence"
        hint="The reason is kept with the order, and the prescriber reads it."
        value={reason}
        onChange={({ target }) => setReason(target.value)}
        error={isTried && !isReasoned ? 'Say why, in a few words.' : undefined}
      />
    </InlinePanel>
  );
}
