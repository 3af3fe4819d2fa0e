import type { ClipboardEvent, ComponentProps, DragEvent } from 'react';
import { useState } from 'react';
import type { FieldNotes } from './field';
import { Field, boxClass } from './field';

export type NumberFieldProps = Omit<ComponentProps<'input'>, 'size' | 'width' | 'type'> &
  FieldNotes & {
    unit?: string;
    /** key: the one large figure of a check; big: the bedside. */
    size?: 'normal' | 'big' | 'key';
    /** The checker's and the pump's fields: typed by hand, never pasted, dropped or filled in. */
    ownHand?: boolean;
  };

const SHUT_PASTE = 'Type this figure yourself: pasting is shut here.';

/** A decimal as typed: text, so that neither the wheel nor an arrow key changes a dose. */
export function NumberField(props: NumberFieldProps) {
  const {
    label,
    labelHidden,
    hint,
    error,
    errorId,
    overBrim,
    caution,
    width,
    unit,
    size,
    ownHand,
    id,
    className,
    ...input
  } = props;
  const [hasTriedPaste, setHasTriedPaste] = useState(false);
  const notes = { label, labelHidden, error, errorId, overBrim, caution, width };
  const refuse = (event: ClipboardEvent | DragEvent) => {
    event.preventDefault();
    setHasTriedPaste(true);
  };
  const byHand = ownHand && {
    onPaste: refuse,
    onDrop: refuse,
    'data-1p-ignore': true,
    'data-lpignore': 'true',
    'data-form-type': 'other',
  };
  const isSized = size && size !== 'normal' ? size : '';
  return (
    <Field {...notes} hint={hasTriedPaste ? SHUT_PASTE : hint} id={id}>
      {(wiring) => (
        <span className={boxClass(notes, isSized, input.readOnly === true && 'ro', className ?? '')}>
          <input
            {...input}
            {...byHand}
            {...wiring}
            type="text"
            inputMode="decimal"
            autoComplete="off"
            autoCorrect="off"
            spellCheck={false}
            className="num"
          />
          {unit && <em>{unit}</em>}
        </span>
      )}
    </Field>
  );
}
