import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { BottomBar } from '@/components/ui/bottom-bar';
import { Button, buttonClass, type ButtonKind } from '@/components/ui/button';
import { StateWord } from '@/components/ui/state-word';
import { useKnownMe } from '@/features/accounts/api/use-me';
import type { GlyphName } from '@shared/gauge/glyphs';
import { isAwaitingCheck, isConnected, isDraft, isEnded, isSigned } from '@shared/orders/states';
import type { Act } from '@shared/orders/transitions';
import type { OrderView } from '@shared/routes/orders';
import { problemWords } from '../api/problem-words';
import { useAct } from '../api/use-act';
import { useOrderActs, type Standing } from '../api/use-order-acts';
import { OrderPanels, type OrderPanel } from './order-panels';
import { PrintButton } from './print-button';
import { useStop } from './stop-button';

type ActButtonProps = {
  standing: Standing;
  kind?: ButtonKind;
  glyph?: GlyphName;
  busy?: boolean;
  onPress: () => void;
  children: string;
};

/** Open, or shut with its reason beside it; absent where it is not the reader's to do. */
function ActButton({ standing, kind, glyph, busy, onPress, children }: ActButtonProps) {
  if (standing === 'absent') return null;
  const shutReason = standing === 'open' ? undefined : standing.shut;
  return (
    <Button kind={kind} glyph={glyph} busy={busy} shutReason={shutReason} onClick={onPress}>
      {children}
    </Button>
  );
}

const says = (view: OrderView): string => {
  const { state, you } = view;
  if (isAwaitingCheck(state)) {
    return you.isAuthor
      ? `A second person works it out unseen; it ${view.waitingWords}.`
      : `Covered until it is checked; it ${view.waitingWords}.`;
  }
  if (isSigned(state))
    return 'Signed and checked. It starts at the bedside, when child, bag, pump and line agree.';
  if (isConnected(state))
    return 'On the child. Brimline never drives a pump: act at the pump, then record it here.';
  return '';
};

/** A covered dispute is opened on purpose: the opening is written down. */
function useOpenDispute(view: OrderView, onOpened: (opened: OrderView) => void) {
  const open = useAct('disputeMatter');
  const run = async () => {
    try {
      onOpened(await open.mutateAsync({ params: { id: view.versionId }, body: {} }));
    } catch {
      // told beside the bar's words
    }
  };
  return { run: () => void run(), isPending: open.isPending, error: open.error };
}

/** The next order of the same kind, with this one's text, on today's weight and times. */
function NextOrderButton({ view }: { view: OrderView }) {
  const start = useAct('startDraft');
  const navigate = useNavigate();
  const me = useKnownMe();
  const isUseful = isConnected(view.state) || (isEnded(view.state) && !isDraft(view.state));
  if (view.open === null || !isUseful || !me.account.roles.includes('prescriber')) return null;
  const run = async () => {
    try {
      const made = await start.mutateAsync({
        params: { id: view.child.id },
        body: { kind: view.kind, followsOrderId: view.orderId },
      });
      await navigate(`/drafts/${made.versionId}`);
    } catch {
      // told in the button's place
    }
  };
  return (
    <>
      {start.error && (
        <span className="note c-brim" role="alert">
          No draft was started. {problemWords(start.error)}
        </span>
      )}
      <Button busy={start.isPending} busyLabel="Opening a draft" onClick={() => void run()}>
        Write the next order
      </Button>
    </>
  );
}

type OrderBarProps = {
  view: OrderView;
  /** The device goes to a checker, or comes back. */
  onHanding: (isHanding: boolean) => void;
  onOpened: (opened: OrderView) => void;
  onSettled: () => void;
};

/** Where the order stands, and what the reader can do with it. */
export function OrderBar({ view, onHanding, onOpened, onSettled }: OrderBarProps) {
  const { versionId, state, open, you } = view;
  const [panel, setOnlyPanel] = useState<OrderPanel>('none');
  const setPanel = (next: OrderPanel) => {
    onHanding(next === 'beside');
    setOnlyPanel(next);
  };
  const standing = useOrderActs(view);
  const stop = useStop(versionId);
  const dispute = useOpenDispute(view, onOpened);
  const canBeside = you.isAuthor && isAwaitingCheck(state);
  const act = (name: Act, panelName: OrderPanel) => ({
    standing: standing(name),
    onPress: () => setPanel(panelName),
  });
  const isSettling = standing('settle') !== 'absent';
  return (
    <>
      {stop.trouble}
      {stop.panel}
      <OrderPanels open={panel} view={view} onClose={() => setPanel('none')} onSettled={onSettled} />
      <BottomBar
        kind={open === null ? 'covered' : 'plain'}
        state={<StateWord state={state} />}
        say={
          <>
            {says(view)} {dispute.error && <b className="c-brim">{problemWords(dispute.error)}</b>}
          </>
        }
      >
        {panel === 'none' && (
          <>
            <ActButton {...act('withdraw', 'withdraw')} kind="quiet">
              Withdraw
            </ActButton>
            {open !== null && <PrintButton versionId={versionId} />}
            <NextOrderButton view={view} />
            <ActButton {...act('revise', 'revise')}>{`Revise: make version ${view.version + 1}`}</ActButton>
            <ActButton {...act('hold', 'hold')}>Hold</ActButton>
            <ActButton {...act('finish', 'finish')}>Finish</ActButton>
            {standing('resume') === 'open' && (
              <Link className={buttonClass()} to={`/orders/${versionId}/bedside`}>
                Resume at the bedside
              </Link>
            )}
            {isSettling && open === null && (
              <ActButton
                standing={standing('settle')}
                kind="primary"
                busy={dispute.isPending}
                onPress={dispute.run}
              >
                Open the dispute to settle it
              </ActButton>
            )}
            {isSettling && open !== null && (
              <ActButton {...act('settle', 'settle')} kind="primary">
                Settle the dispute
              </ActButton>
            )}
            {canBeside && (
              <Button kind="plum" glyph="covered" onClick={() => setPanel('beside')}>
                Check beside me
              </Button>
            )}
            {standing('open-check') === 'open' && (
              <Link className={buttonClass('plum')} to={`/checks/${versionId}`}>
                Open the check
              </Link>
            )}
            {standing('countersign') === 'open' && (
              <Link className={buttonClass('plum')} to={`/orders/${versionId}/countersign`}>
                Countersign, or say what differs
              </Link>
            )}
            {standing('start') === 'open' && (
              <Link className={buttonClass('primary')} to={`/orders/${versionId}/bedside`}>
                Go to the bedside
              </Link>
            )}
            {standing('stop') === 'open' && stop.button}
          </>
        )}
      </BottomBar>
    </>
  );
}
