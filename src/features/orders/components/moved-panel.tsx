import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import { Choice } from '@/components/ui/choice';
import type { OrderForm, OrderFormField } from '@shared/orders/form';
import type { Draft, DraftContext } from '@shared/routes/orders';
import { differingFields, differingReasons, mergeForms, type Side } from '../forms/draft-diff';
import { dayTime, entryWords, FIELD_WORDS } from '../forms/order-words';

type Difference = { key: string; label: string; mine: string; theirs: string };

function differencesOf(mine: OrderForm, theirs: OrderForm, context: DraftContext): Difference[] {
  const fields = differingFields(mine, theirs).map((field: OrderFormField) => ({
    key: field,
    label: FIELD_WORDS[field],
    mine: entryWords(field, mine, context),
    theirs: entryWords(field, theirs, context),
  }));
  const reasons = differingReasons(mine, theirs).map((code) => ({
    key: `reason:${code}`,
    label: 'A reason you gave',
    mine: mine.limitReasons[code] ?? '',
    theirs: theirs.limitReasons[code] ?? '',
  }));
  return [...fields, ...reasons];
}

function Cell({
  side,
  difference,
  chosen,
  onChoose,
}: {
  side: Side;
  difference: Difference;
  chosen: Side | undefined;
  onChoose: () => void;
}) {
  return (
    <td className={side === 'mine' ? 'pp' : 'mine'}>
      <Choice kind="radio" name={`moved-${difference.key}`} checked={chosen === side} onChange={onChoose}>
        <span className="whitespace-normal">{difference[side] || 'empty'}</span>
      </Choice>
    </td>
  );
}

const CHOSEN = { mine: 'this page', theirs: 'the other place', open: 'still to choose' } as const;

type MovedPanelProps = {
  mine: OrderForm;
  theirs: Draft;
  onSettle: (form: OrderForm) => void;
};

/** Two places changed one draft: both texts side by side, entry by entry; nothing is overwritten before a choice. */
export function MovedPanel({ mine, theirs, onSettle }: MovedPanelProps) {
  const [choices, setChoices] = useState<Record<string, Side>>({});
  const { context } = theirs;
  const differences = differencesOf(mine, theirs.form, context);
  const open = differences.filter(({ key }) => choices[key] === undefined).length;
  const takeAll = (side: Side) => onSettle(side === 'mine' ? mine : theirs.form);
  return (
    <InlinePanel
      title="This draft was changed in another place"
      tone="ochre"
      aboveBar
      onClose={() => document.getElementById('main')?.focus()}
      closeLabel="Look at the form first"
      actions={
        <>
          <Button
            kind="primary"
            shutReason={open > 0 ? `${open} still to choose.` : undefined}
            onClick={() => onSettle(mergeForms(mine, theirs.form, choices))}
          >
            Go on with what I chose
          </Button>
          <Button onClick={() => takeAll('mine')}>Take all of this page</Button>
          <Button onClick={() => takeAll('theirs')}>Take all of the other place</Button>
        </>
      }
    >
      <p>
        The other text was kept at {dayTime(theirs.savedAt, context.zone)}. Both are shown; what you typed
        here is not sent until you choose.
      </p>
      <table className="cmp">
        <caption className="vh">Entries that differ</caption>
        <thead>
          <tr>
            <th scope="col">Entry</th>
            <th scope="col" className="pp">
              <b>On this page</b>
            </th>
            <th scope="col" className="mine">
              <b>In the other place</b>
            </th>
            <th scope="col">
              <span className="vh">Chosen</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {differences.map((difference) => (
            <tr key={difference.key}>
              <th scope="row">{difference.label}</th>
              {(['mine', 'theirs'] as const).map((side) => (
                <Cell
                  key={side}
                  side={side}
                  difference={difference}
                  chosen={choices[difference.key]}
                  onChoose={() => setChoices({ ...choices, [difference.key]: side })}
                />
              ))}
              <td className="v note">{CHOSEN[choices[difference.key] ?? 'open']}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </InlinePanel>
  );
}
