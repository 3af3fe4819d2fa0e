import type { ComponentProps } from 'react';
import type { FieldNotes } from './field';
import { Field, boxClass } from './field';
import { Glyph } from './glyph';

export type SelectOption = { value: string; label: string; disabled?: boolean };
export type SelectGroup = { group: string; options: readonly SelectOption[] };

export type SelectFieldProps = Omit<ComponentProps<'select'>, 'size' | 'width'> &
  FieldNotes & {
    options: readonly (SelectOption | SelectGroup)[];
    /** Shown while nothing is chosen; it cannot be chosen again. */
    placeholder?: string;
    size?: 'normal' | 'big';
  };

const asOption = (option: SelectOption) => (
  <option key={option.value} value={option.value} disabled={option.disabled}>
    {option.label}
  </option>
);

/** A native select: arrow keys, type-ahead and the phone's own wheel come with it. */
export function SelectField(props: SelectFieldProps) {
  const {
    label,
    labelHidden,
    hint,
    error,
    overBrim,
    caution,
    width,
    options,
    placeholder,
    size,
    id,
    className,
    ...rest
  } = props;
  const notes = { label, labelHidden, hint, error, overBrim, caution, width };
  return (
    <Field {...notes} id={id}>
      {(wiring) => (
        <span className={boxClass(notes, 'sel', size === 'big' && 'big', className ?? '')}>
          <select {...rest} {...wiring}>
            {placeholder !== undefined && (
              <option value="" disabled hidden>
                {placeholder}
              </option>
            )}
            {options.map((entry) =>
              'group' in entry ? (
                <optgroup key={entry.group} label={entry.group}>
                  {entry.options.map(asOption)}
                </optgroup>
              ) : (
                asOption(entry)
              ),
            )}
          </select>
          <Glyph name="chevron-down" />
        </span>
      )}
    </Field>
  );
}
