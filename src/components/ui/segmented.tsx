import type { ChangeEvent, ComponentProps, ReactNode } from 'react';
import { useId } from 'react';
import type { FieldNotes } from './field';
import { Field } from './field';

export type SegmentOption = {
  value: string;
  label: ReactNode;
  /** What choosing it comes to: "1056 mL" under "80%". */
  consequence?: ReactNode;
  disabled?: boolean;
};

export type SegmentedProps = Omit<
  ComponentProps<'input'>,
  'size' | 'width' | 'type' | 'value' | 'defaultValue'
> &
  FieldNotes & {
    options: readonly SegmentOption[];
    value?: string | null;
    defaultValue?: string;
    tone?: 'tide' | 'plum';
    onChoose?: (value: string) => void;
  };

const SHORT = 8;
const isShort = (option: SegmentOption) => typeof option.label === 'string' && option.label.length <= SHORT;

/** A strip of at most a few choices on native radios: one tab stop, arrow keys choose. */
export function Segmented(props: SegmentedProps) {
  const { label, labelHidden, hint, error, overBrim, caution, width, id, ...strip } = props;
  const { options, value, defaultValue, tone = 'tide', onChoose, onChange, name, ...input } = strip;
  const ownName = useId();
  const hasConsequences = options.some((option) => option.consequence !== undefined);
  const classes = ['seg', hasConsequences && 'frac', options.every(isShort) && 'short', tone, error && 'bad'];
  const choose = (event: ChangeEvent<HTMLInputElement>) => {
    onChange?.(event);
    onChoose?.(event.target.value);
  };
  return (
    <Field {...{ label, labelHidden, hint, error, overBrim, caution, width }} id={id} caption>
      {(wiring, labelId) => (
        <div
          className={classes.filter(Boolean).join(' ')}
          role="radiogroup"
          aria-labelledby={labelId}
          {...wiring}
        >
          {options.map((option) => (
            <label key={option.value}>
              <input
                {...input}
                type="radio"
                name={name ?? ownName}
                value={option.value}
                disabled={input.disabled || option.disabled}
                checked={value === undefined ? undefined : value === option.value}
                defaultChecked={value === undefined && defaultValue === option.value ? true : undefined}
                onChange={choose}
              />
              {hasConsequences ? <b>{option.label}</b> : option.label}{' '}
              {option.consequence !== undefined && <span>{option.consequence}</span>}
            </label>
          ))}
        </div>
      )}
    </Field>
  );
}
