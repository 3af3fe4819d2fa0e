import type { ComponentProps } from 'react';
import type { FieldNotes } from './field';
import { Field, boxClass } from './field';

export type DateTimeFieldProps = Omit<ComponentProps<'input'>, 'size' | 'width' | 'type' | 'value'> &
  FieldNotes & {
    kind?: 'datetime-local' | 'date' | 'time';
    /** Local to the hospital: "2026-06-10T12:00". With it the field reads "10 Jun 2026, 12:00" at rest. */
    value?: string;
    /** Leaves the year out at rest: "10 Jun, 12:00". */
    short?: boolean;
  };

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const LOCAL = /^(\d{4})-(\d\d)-(\d\d)(?:T(\d\d:\d\d))?/;

/** A local date and time in words, so that no browser's order of day and month is misread; '' if it is neither. */
export function inWords(value: string, short = false): string {
  const [, year, month, day, time] = LOCAL.exec(value) ?? [];
  const name = MONTHS[Number(month) - 1];
  if (!name) return '';
  const date = `${Number(day)} ${name}${short ? '' : ` ${year}`}`;
  return time ? `${date}, ${time}` : date;
}

/** A local date and time; the browser's own entry and picker come with it. Pass `value` (RHF: `useWatch`). */
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
    ...others
  } = props;
  const { short = false, id, className, ...input } = others;
  const notes = { label, labelHidden, hint, error, overBrim, caution, width };
  const words = input.value ? inWords(input.value, short) : '';
  return (
    <Field {...notes} id={id}>
      {(wiring) => (
        <span
          className={boxClass(
            notes,
            'dt',
            words !== '' && 'said',
            input.readOnly === true && 'ro',
            className ?? '',
          )}
        >
          <input autoComplete="off" {...input} {...wiring} type={kind} />
          {words && (
            <span className="words" aria-hidden="true">
              {words}
            </span>
          )}
        </span>
      )}
    </Field>
  );
}
