import type { ClipboardEvent, DragEvent } from 'react';
import { useState } from 'react';
import { NumberField } from '@/components/ui/number-field';
import { Segmented } from '@/components/ui/segmented';
import { SelectField } from '@/components/ui/select-field';
import { TextField } from '@/components/ui/text-field';
import type { CheckEntry, Option } from '@shared/checks/entries';
import type { CheckPage } from '@shared/routes/checks';
import { baseOptions, potassiumOptions } from '../forms/entry-options';
import { entryId, type CheckFormState } from '../forms/use-check-form';

type EntryFieldProps = {
  entry: CheckEntry;
  check: CheckFormState;
  products: CheckPage['products'];
  /** The row's own head says it. */
  labelHidden: boolean;
  isLarge: boolean;
  width?: string;
  /** A refusal of the whole row stands elsewhere: the field is only marked. */
  message?: string;
};

const NO_FILL = { 'data-1p-ignore': true, 'data-lpignore': 'true', 'data-form-type': 'other' } as const;
const SHORT_STRIP = new Set(['fraction', 'workedOutBy']);

/** A word in one's own hand: as with the figures, nothing is pasted or filled in. */
function OwnText({ maxLength, ...field }: { maxLength: number } & React.ComponentProps<typeof TextField>) {
  const [hasTriedPaste, setTriedPaste] = useState(false);
  const refuse = (event: ClipboardEvent | DragEvent) => {
    event.preventDefault();
    setTriedPaste(true);
  };
  return (
    <TextField
      {...field}
      {...NO_FILL}
      maxLength={maxLength}
      autoCapitalize="characters"
      autoCorrect="off"
      spellCheck={false}
      onPaste={refuse}
      onDrop={refuse}
      hint={hasTriedPaste ? 'Type it yourself.' : undefined}
    />
  );
}

/** The control of one entry. Empty until typed or chosen; what it offers comes from the shelf and the rules. */
export function EntryField(props: EntryFieldProps) {
  const { entry, check, products, labelHidden, isLarge, width, message } = props;
  const { field, control, label } = entry;
  const value = check.form[field];
  const error = message ?? check.errorOf(field);
  const common = { id: entryId(field), label, labelHidden, width, error, value };
  const onChange = ({ target }: { target: { value: string } }) => check.set({ [field]: target.value });
  const onBlur = () => check.leave(field);
  const select = (options: readonly Option[], placeholder = 'Choose', disabled = false) => (
    <SelectField {...common} {...{ options, placeholder, disabled, onBlur, onChange }} autoComplete="off" />
  );
  switch (control.type) {
    case 'text':
      return <OwnText {...common} onChange={onChange} onBlur={onBlur} maxLength={control.maxLength} />;
    case 'decimal':
      return (
        <NumberField
          {...common}
          onChange={onChange}
          onBlur={onBlur}
          ownHand
          unit={control.spec.unit}
          size={isLarge ? 'key' : 'normal'}
        />
      );
    case 'options':
      return SHORT_STRIP.has(field) ? (
        <Segmented
          {...common}
          tone="plum"
          options={control.options}
          onChoose={(chosen) => check.set({ [field]: chosen })}
        />
      ) : (
        select(control.options)
      );
    case 'base':
      return (
        <SelectField
          {...common}
          options={baseOptions(products, check.asked.kind)}
          placeholder="Choose"
          autoComplete="off"
          onBlur={onBlur}
          // another fluid comes with other strengths: the one chosen before is asked again
          onChange={({ target }) => check.set({ base: target.value, addedPotassium: '' })}
        />
      );
    case 'potassium': {
      const { kind } = check.asked;
      const isOpen = check.form.base !== '';
      return select(
        potassiumOptions(products, kind, check.form.base),
        isOpen ? 'Choose' : 'Choose the fluid first',
        !isOpen,
      );
    }
  }
}
