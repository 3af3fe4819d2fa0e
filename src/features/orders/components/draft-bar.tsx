import { BottomBar } from '@/components/ui/bottom-bar';
import { Button } from '@/components/ui/button';
import { StateWord } from '@/components/ui/state-word';
import type { LimitFinding } from '@shared/calc/types';
import type { DraftWork } from '@shared/orders/work-out-draft';
import { formatTime, parseInstant } from '@shared/time';
import type { SaveStatus } from '../api/draft-saver';
import { offeredEntries, type Offer } from '../forms/apply-offer';
import { inSentence } from '../forms/order-words';

export type BarActs = {
  onDiscard: () => void;
  onKeep: () => void;
  onSign: () => void;
  onAskSenior: () => void;
  onOffer: (offer: Offer) => void;
  /** The sign button is pressed while something is missing: the empty entries speak up. */
  onMissing: () => void;
};

type DraftBarProps = BarActs & {
  work: DraftWork;
  seniors: readonly LimitFinding[];
  /** A senior has been asked and has not answered. */
  isSeniorAsked: boolean;
  status: SaveStatus;
  zone: string;
  /** A panel is open above: its own buttons act. */
  isPanelOpen: boolean;
};

/** "Kept 10:42", or why it is not. */
function KeptWords({ status, zone }: Pick<DraftBarProps, 'status' | 'zone'>) {
  const { phase, savedAt, words } = status;
  const at = parseInstant(savedAt);
  if (words !== '') return <b className="c-ochre">{words}</b>;
  if (phase === 'waiting' || phase === 'saving') return <>Keeping…</>;
  return <>Kept {at === undefined ? '' : formatTime(at, zone)}.</>;
}

const missingWords = (work: DraftWork): string | undefined => {
  if ('missing' in work) {
    const count = Object.keys(work.fields).length;
    return count === 1 ? 'One entry is missing or wrong.' : `${count} entries are missing or wrong.`;
  }
  if ('detail' in work) return 'This cannot be worked out.';
  return work.reasonsOwed.length > 0
    ? `A reason is owed: ${inSentence(work.reasonsOwed[0]?.title ?? '')}.`
    : undefined;
};

/** The first sentence, and what follows it. */
function splitSentence(text: string): [first: string, rest: string] {
  const end = text.search(/[.:] [A-Z]/);
  return end < 0 ? [text, ''] : [`${text.slice(0, end)}.`, text.slice(end + 2)];
}

function OverBar({
  brims,
  onKeep,
  onOffer,
  isPanelOpen,
}: Pick<DraftBarProps, 'onKeep' | 'onOffer' | 'isPanelOpen'> & { brims: readonly LimitFinding[] }) {
  const [what, rest] = splitSentence(brims[0]?.text ?? '');
  const offers = brims.flatMap(({ offer }) => (offer && offeredEntries(offer) ? [offer] : []));
  const [offer] = offers;
  return (
    <BottomBar
      kind="over"
      say={
        <>
          <b>This order cannot be signed: {what}</b>
          {rest} Put it right and the sign button comes back.
        </>
      }
    >
      {!isPanelOpen && (
        <>
          <Button onClick={onKeep}>Keep as a draft</Button>
          {offer && (
            <Button kind="primary" onClick={() => onOffer(offer)}>
              {offer.label}
            </Button>
          )}
        </>
      )}
    </BottomBar>
  );
}

function SignButton({ work, seniors, isSeniorAsked, onSign, onAskSenior, onMissing }: DraftBarProps) {
  const missing = missingWords(work);
  if (missing !== undefined) {
    return (
      // the shut button keeps its place; pressing it shows what is missing
      <span onClick={onMissing}>
        <Button kind="primary" glyph="signed" shutReason={missing}>
          Sign and ask for a check
        </Button>
      </span>
    );
  }
  if (seniors.length > 0) {
    return (
      <Button kind={isSeniorAsked ? 'secondary' : 'primary'} glyph="senior" onClick={onAskSenior}>
        {isSeniorAsked ? 'Ask again, or by telephone' : 'Ask a senior to agree'}
      </Button>
    );
  }
  return (
    <Button kind="primary" glyph="signed" onClick={onSign}>
      Sign and ask for a check
    </Button>
  );
}

/** Where the draft stands and what can be done with it. Over a brim there is no sign button. */
export function DraftBar(props: DraftBarProps) {
  const { work, seniors, isSeniorAsked, status, zone, isPanelOpen, onDiscard, onKeep } = props;
  if ('workOut' in work && work.brims.length > 0 && status.words === '')
    return <OverBar {...props} brims={work.brims} />;
  const isOver = 'workOut' in work && work.brims.length > 0;
  const says =
    seniors.length > 0 ? (
      <>
        <b>
          {isSeniorAsked
            ? 'A senior has been asked and has not answered yet:'
            : 'A senior has to agree before you sign:'}
        </b>{' '}
        {inSentence(seniors[0]?.title ?? '')}.
      </>
    ) : (
      <>
        <b>Signing locks these figures.</b> A second person then works them out unseen. Nothing runs until
        both agree.
      </>
    );
  return (
    <BottomBar
      state={<StateWord state="draft" />}
      say={
        <>
          {says} <KeptWords status={status} zone={zone} />
        </>
      }
    >
      {!isPanelOpen && (
        <>
          <Button kind="quiet" onClick={onDiscard}>
            Discard
          </Button>
          <Button onClick={onKeep}>Keep as a draft</Button>
          {!isOver && <SignButton {...props} />}
        </>
      )}
    </BottomBar>
  );
}
