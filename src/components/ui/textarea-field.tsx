import type { ComponentProps } from 'react';
import type { FieldNotes } from './field';
import { Field, boxClass } from './field';

export type TextareaFieldProps = Omit<ComponentProps<'textarea'>, 'width'> & FieldNotes;

/** Several lines of text; grows with what is typed where the browser can. */
export function TextareaField(props: TextareaFieldProps) {
  const { label, labelHidden, hint, error, overBrim, caution, width, id, className, ...rest } = props;
  const notes = { label, labelHidden, hint, error, overBrim, caution, width };
  return (
    <Field {...notes} id={id}>
      {(wiring) => (
        <span className={boxClass(notes, 'area', className ?? '')}>
          <textarea rows={2} {...rest} {...wiring} />
        </span>
      )}
    </Field>
  );
}
