import { Group } from '@/components/ui/group';
import { Segmented } from '@/components/ui/segmented';
import { TextField } from '@/components/ui/text-field';
import { KINDS } from '@shared/calc/types';
import { KIND_WORDS } from '@shared/orders/words';
import { useDraftForm } from '../forms/draft-form';
import { FIELD_WORDS, fieldId } from '../forms/order-words';

const OPTIONS = KINDS.map((value) => ({ value, label: KIND_WORDS[value] }));

/** The kind of order, and why the child needs it. The other kind is a new order with the same text. */
export function WhatForGroup() {
  const { values, register, errorOf, changeKind } = useDraftForm();
  const choose = (next: string) => {
    const kind = KINDS.find((each) => each === next);
    if (kind !== undefined && kind !== values.kind) changeKind?.choose(kind);
  };
  return (
    <Group head="What for" align="label">
      <Segmented
        label={FIELD_WORDS.kind}
        labelHidden
        id={fieldId('kind')}
        options={OPTIONS.map((option) => ({
          ...option,
          disabled: option.value !== values.kind && (changeKind === undefined || changeKind.isChanging),
        }))}
        value={values.kind}
        onChoose={choose}
        error={errorOf('kind') ?? changeKind?.error}
        hint={changeKind?.isChanging ? 'Opening an order of the other kind…' : undefined}
      />
      <TextField
        label={FIELD_WORDS.reason}
        labelHidden
        id={fieldId('reason')}
        placeholder="Why, in a few words; the checker reads it"
        error={errorOf('reason')}
        {...register('reason')}
      />
    </Group>
  );
}
