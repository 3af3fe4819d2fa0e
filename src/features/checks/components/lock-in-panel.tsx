import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import { Notice } from '@/components/ui/notice';
import { problemWords } from '@/features/orders/api/problem-words';
import { Refusal } from '@/features/orders/components/refusal';
import { problemCode } from '@/lib/query-client';
import { ProblemError } from '@/lib/server-answer';
import { FRACTION_WORDS, METHOD_WORDS, potassiumWords } from '@shared/checks/words';
import type { CheckEntries } from '@shared/checks/read-form';
import { formatNumber } from '@shared/rounding';
import type { CheckPage } from '@shared/routes/checks';
import { kgText } from '@shared/weights/chart-weight';
import { useCheckActs, type CheckSource } from '../api/check-source';
import type { CheckFormState } from '../forms/use-check-form';

const lower = (text: string): string => text.charAt(0).toLowerCase() + text.slice(1);

/** The figures about to be fixed, in one sentence. */
export function ownWords({ kg, order }: CheckEntries): string {
  const n = (value: number) => formatNumber(value, 1);
  if (order.kind === 'bolus') {
    return `${n(order.volume)} mL of ${order.base} over ${n(order.over)} min, for ${kgText(kg)}.`;
  }
  const { rate, volume, hours, base, addedPotassium, fraction, method } = order;
  const intake = order.feeds + order.drugs;
  return [
    `${n(rate)} mL/h, ${n(volume)} mL over ${n(hours)} h, of ${base}, ${lower(potassiumWords(addedPotassium))}.`,
    `For ${kgText(kg)}: ${lower(METHOD_WORDS[method])}, ${lower(FRACTION_WORDS[fraction])}, ${n(intake)} mL of other intake.`,
  ].join(' ');
}

type LockInPanelProps = {
  source: CheckSource;
  check: CheckFormState;
  onUncovered: (page: CheckPage) => void;
  onWrongChild: (words: string) => void;
  /** The server names single fields: they are marked, and the panel makes way. */
  onFault: () => void;
  onClose: () => void;
};

/** Asks once; afterwards these figures are fixed and both sets open. */
export function LockInPanel(props: LockInPanelProps) {
  const { source, check, onUncovered, onWrongChild, onFault, onClose } = props;
  const { lockIn, isLocking } = useCheckActs(source);
  const [trouble, setTrouble] = useState<string | null>(null);
  const { reading, hangs, form } = check;

  const send = async () => {
    setTrouble(null);
    check.saver.close();
    try {
      onUncovered(await lockIn(form));
    } catch (error) {
      check.saver.reopen();
      const namesFields = check.takeRefusal(error);
      if (problemCode(error) === 'wrong-child' && error instanceof ProblemError)
        return onWrongChild(error.problem.detail);
      if (namesFields) return onFault();
      setTrouble(problemWords(error));
    }
  };

  return (
    <InlinePanel
      title="Lock in these figures?"
      tone="plum"
      onClose={onClose}
      closeLabel="Look at them again"
      actions={
        <Button
          kind="plum"
          glyph="covered"
          busy={isLocking}
          busyLabel="Locking in, please wait"
          onClick={() => void send()}
        >
          Lock in my figures
        </Button>
      }
    >
      {trouble && <Refusal title="Nothing is uncovered yet.">{trouble}</Refusal>}
      <p className="text-under">
        <b>Yours can’t be changed after that.</b> Then both sets open side by side.
      </p>
      {reading.ok && <p>{ownWords(reading.entries)}</p>}
      {hangs !== null && !hangs.agrees && (
        <Notice kind="caution" title="Your own figures do not hang together.">
          {hangs.words}
        </Notice>
      )}
    </InlinePanel>
  );
}
