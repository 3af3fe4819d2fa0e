import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import { Segmented } from '@/components/ui/segmented';
import { SelectField } from '@/components/ui/select-field';
import { TextareaField } from '@/components/ui/textarea-field';
import { problemWords } from '@/features/orders/api/problem-words';
import { useAct } from '@/features/orders/api/use-act';
import { colleagueOption, mayCheck, useColleagues } from '@/features/orders/api/use-colleagues';
import { Refusal } from '@/features/orders/components/refusal';
import type { CheckPage } from '@shared/routes/checks';

type HandOnPanelProps = { page: CheckPage; versionId: string; onClose: () => void; onDone: () => void };

const SEEN = [
  { value: 'no', label: 'No, I have not' },
  { value: 'yes', label: 'Yes, I have seen them' },
];
const LEAST_WORDS = 3;

/** Passes the check to another person before lock-in, with whether the other figures were seen. */
export function HandOnPanel({ page, versionId, onClose, onDone }: HandOnPanelProps) {
  const { data: people = [] } = useColleagues(page.child.ward?.id);
  const passOn = useAct('passOn');
  const [toId, setToId] = useState('');
  const [seen, setSeen] = useState('');
  const [reason, setReason] = useState('');
  const [isTried, setTried] = useState(false);
  const fit = people.filter((person) => mayCheck(person, page.order.isHighRisk)).map(colleagueOption);
  const isReasoned = reason.trim().length >= LEAST_WORDS;

  const send = () => {
    setTried(true);
    if (seen === '' || !isReasoned) return;
    passOn.mutate(
      {
        params: { id: versionId },
        body: { toId: toId === '' ? null : toId, seenFigures: seen === 'yes', reason: reason.trim() },
      },
      { onSuccess: onDone },
    );
  };

  return (
    <InlinePanel
      title="Hand this check to someone else"
      tone="plum"
      onClose={onClose}
      actions={
        <Button kind="plum" busy={passOn.isPending} busyLabel="Handing on, please wait" onClick={send}>
          Hand it on
        </Button>
      }
    >
      {passOn.error && <Refusal title="The check is still yours.">{problemWords(passOn.error)}</Refusal>}
      <SelectField
        label="To whom"
        value={toId}
        onChange={({ target }) => setToId(target.value)}
        options={[{ value: '', label: 'Anyone on the ward who may check' }, ...fit]}
        hint={page.order.isHighRisk ? 'High risk: a senior checker or a pharmacist.' : undefined}
      />
      <Segmented
        label="Have you seen the author’s figures?"
        tone="plum"
        options={SEEN}
        value={seen}
        onChoose={setSeen}
        error={isTried && seen === '' ? 'Say whether you have seen them.' : undefined}
      />
      <TextareaField
        label="Why you hand it on"
        value={reason}
        onChange={({ target }) => setReason(target.value)}
        error={isTried && !isReasoned ? 'Say why, in a few words.' : undefined}
      />
    </InlinePanel>
  );
}
