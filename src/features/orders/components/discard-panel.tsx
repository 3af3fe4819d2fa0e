import { useNavigate } from 'react-router-dom';
import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import type { Draft } from '@shared/routes/orders';
import { problemWords } from '../api/problem-words';
import { useAct } from '../api/use-act';
import { rereadOrder } from '../api/use-order';
import { Refusal } from './refusal';

/** Discarding is asked about once, in the page. */
export function DiscardPanel({
  draft,
  onDone,
  onClose,
}: {
  draft: Draft;
  onDone: () => void;
  onClose: () => void;
}) {
  const navigate = useNavigate();
  const discard = useAct('discardDraft');
  const send = async () => {
    try {
      await discard.mutateAsync({ params: { id: draft.versionId }, body: {} });
    } catch {
      return;
    }
    onDone();
    await rereadOrder(draft.versionId);
    await navigate(`/children/${draft.context.child.id}`, { replace: true });
  };
  return (
    <InlinePanel
      title="Discard this draft?"
      tone="ochre"
      aboveBar
      onClose={onClose}
      closeLabel="Go on with it"
      actions={
        <Button
          kind="primary"
          busy={discard.isPending}
          busyLabel="Discarding, please wait"
          onClick={() => void send()}
        >
          Discard the draft
        </Button>
      }
    >
      {discard.error && <Refusal title="The draft was not discarded.">{problemWords(discard.error)}</Refusal>}
      <p>It was never signed, so nothing else changes. Its ledger keeps that it was here.</p>
    </InlinePanel>
  );
}
