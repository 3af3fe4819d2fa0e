import type { ComponentProps, ReactNode } from 'react';
import type { FieldNotes } from './field';
import { Field, boxClass } from './field';

export type TextFieldProps = Omit<ComponentProps<'input'>, 'size' | 'width'> &
  FieldNotes & {
    /** A glyph before the text, as in a search field. */
    before?: ReactNode;
    size?: 'normal' | 'big';
  };

/** One line of text. Takes `ref` and everything that `register()` returns. */
export function TextField(props: TextFieldProps) {
  const { label, labelHidden, hint, error, overBrim, caution, width, before, size, id, className, ...input } =
    props;
  const notes = { label, labelHidden, hint, error, overBrim, caution, width };
  return (
    <Field {...notes} id={id}>
      {(wiring) => (
        <span
          className={boxClass(
            notes,
            size === 'big' && 'big',
            input.readOnly === true && 'ro',
            className ?? '',
          )}
        >
          {before}
          <input autoComplete="off" type="text" {...input} {...wiring} />
        </span>
      )}
    </Field>
  );
}
