import type { ComponentProps } from 'react';
import type { FieldNotes } from './field';
import { Field, boxClass } from './field';

export type DateTimeFieldProps = Omit<ComponentProps<'input'>, 'size' | 'width' | 'type'> &
  FieldNotes & { kind?: 'datetime-local' | 'date' | 'time' };

/** A local date and time in the hospital's zone ("2026-06-10T12:00"); the browser's own picker comes with it. */
export function DateTimeField(props: DateTimeFieldProps) {
  const {
    label,
    labelHidden,
    hint,
    error,
    overBrim,
    caution,
    width,
    kind = 'datetime-local',
    id,
    className,
    ...rest
  } = props;
  const notes = { label, labelHidden, hint, error, overBrim, caution, width };
  return (
    <Field {...notes} id={id}>
      {(wiring) => (
        <span className={boxClass(notes, rest.readOnly === true && 'ro', className ?? '')}>
          <input autoComplete="off" {...rest} {...wiring} type={kind} />
        </span>
      )}
    </Field>
  );
}
