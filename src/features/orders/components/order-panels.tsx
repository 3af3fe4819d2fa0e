import { useNavigate } from 'react-router-dom';
import type { OrderView } from '@shared/routes/orders';
import { useAct } from '../api/use-act';
import { rereadOrder } from '../api/use-order';
import { ActPanel } from './act-panel';
import { BesidePanel } from './beside-panel';

export type OrderPanel = 'none' | 'withdraw' | 'revise' | 'hold' | 'finish' | 'beside' | 'settle';

type PanelProps = { view: OrderView; onClose: () => void; onSettled: () => void };
type OneProps = { versionId: string; onDone: () => void; onClose: () => void };

function WithdrawPanel({ versionId, onDone, onClose }: OneProps) {
  const withdraw = useAct('withdraw');
  return (
    <ActPanel
      title="Withdraw this order?"
      tone="ochre"
      act="Withdraw the order"
      busy="Withdrawing, please wait"
      failed="The order was not withdrawn."
      reason="Why it is withdrawn"
      send={({ reason }) => withdraw.mutateAsync({ params: { id: versionId }, body: { reason } })}
      onDone={onDone}
      onClose={onClose}
    >
      <p>Nobody can start it afterwards. Whoever was asked to check it is told.</p>
    </ActPanel>
  );
}

function RevisePanel({
  versionId,
  version,
  onClose,
}: {
  versionId: string;
  version: number;
  onClose: () => void;
}) {
  const revise = useAct('revise');
  const navigate = useNavigate();
  const send = async () => {
    const made = await revise.mutateAsync({ params: { id: versionId }, body: {} });
    await rereadOrder(versionId);
    await navigate(`/drafts/${made.versionId}`);
  };
  return (
    <ActPanel
      title={`Make version ${version + 1}?`}
      tone="ochre"
      act={`Revise: make version ${version + 1}`}
      busy="Opening the new version"
      failed="No new version was made."
      send={send}
      onDone={() => undefined}
      onClose={onClose}
    >
      <p>The signatures on this version become void at once, and the new one needs its own check.</p>
    </ActPanel>
  );
}

function HoldPanel({ versionId, onDone, onClose }: OneProps) {
  const hold = useAct('hold');
  return (
    <ActPanel
      title="Hold the infusion"
      tone="ochre"
      act="Hold for up to 1 h"
      busy="Holding, please wait"
      failed="The hold was not recorded."
      reason="Why it is held"
      reasonIsOptional
      send={({ reason }) => hold.mutateAsync({ params: { id: versionId }, body: { reason } })}
      onDone={onDone}
      onClose={onClose}
    >
      <p>Pause the pump first. Where does the child’s glucose come from meanwhile?</p>
    </ActPanel>
  );
}

function FinishPanel({ versionId, onDone, onClose }: OneProps) {
  const finish = useAct('finish');
  return (
    <ActPanel
      title="Finish the infusion"
      act="Record that it is finished"
      busy="Recording, please wait"
      failed="The end was not recorded."
      volume="Volume infused, as the pump shows it"
      send={({ volumeMl }) =>
        finish.mutateAsync({ params: { id: versionId }, body: { volumeInfusedMl: volumeMl } })
      }
      onDone={onDone}
      onClose={onClose}
    />
  );
}

function SettlePanel({ versionId, onDone, onClose }: OneProps) {
  const settle = useAct('settle');
  return (
    <ActPanel
      title="Settle the dispute"
      tone="ochre"
      act="Return it to the prescriber with this reason"
      busy="Returning, please wait"
      failed="The dispute was not settled."
      reason="What you found, and what has to change"
      withPassword
      send={({ reason, password }) =>
        settle.mutateAsync({ params: { id: versionId }, body: { reason, password } })
      }
      onDone={onDone}
      onClose={onClose}
    >
      <p>Neither set becomes the order. It goes back, and the new version gets a new check.</p>
    </ActPanel>
  );
}

/** The panel of an act, above the bar. */
export function OrderPanels({ open, view, onClose, onSettled }: PanelProps & { open: OrderPanel }) {
  const { versionId, version } = view;
  const done = () => {
    onClose();
    void rereadOrder(versionId);
  };
  const parts = { versionId, onDone: done, onClose };
  switch (open) {
    case 'withdraw':
      return <WithdrawPanel {...parts} />;
    case 'revise':
      return <RevisePanel versionId={versionId} version={version} onClose={onClose} />;
    case 'hold':
      return <HoldPanel {...parts} />;
    case 'finish':
      return <FinishPanel {...parts} />;
    case 'beside':
      return <BesidePanel versionId={versionId} onClose={onClose} />;
    case 'settle':
      return (
        <SettlePanel
          {...parts}
          onDone={() => {
            onSettled();
            done();
          }}
        />
      );
    default:
      return null;
  }
}
