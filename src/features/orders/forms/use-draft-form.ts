import { useMemo } from 'react';
import { useWatch, type UseFormRegister, type UseFormReturn } from 'react-hook-form';
import type { OrderForm, OrderFormField } from '@shared/orders/form';
import { workOutDraft, type DraftWork } from '@shared/orders/work-out-draft';
import type { DraftContext } from '@shared/routes/orders';
import { isFormField } from './apply-offer';
import { brimsByField } from './brim-fields';
import type { DraftForm } from './draft-form';

/**
 * Leaving a field may open a message under it, and what lies below moves. A press on one of those buttons has its
 * release then beside it and does nothing, so the message waits until a press is over.
 */
const PRESS_MS = 200;

function afterThePress(register: UseFormRegister<OrderForm>): UseFormRegister<OrderForm> {
  return (name, options) => {
    const wiring = register(name, options);
    const onBlur: typeof wiring.onBlur = (event) =>
      new Promise((resolve) => setTimeout(() => resolve(wiring.onBlur(event) as Promise<void>), PRESS_MS));
    return { ...wiring, onBlur };
  };
}

type Errors = { brims: Map<OrderFormField, string>; entries: Partial<Record<OrderFormField, string>> };

function errorsIn(work: DraftWork, typedRate: string): Errors {
  if ('fields' in work) return { brims: new Map(), entries: work.fields };
  if ('workOut' in work) return { brims: brimsByField(work.brims, typedRate), entries: {} };
  const { field, detail } = work;
  return { brims: new Map(), entries: field !== undefined && isFormField(field) ? { [field]: detail } : {} };
}

/** The order form, worked out at every key. `isAsked`: the person wants to sign, so empty entries speak up too. */
export function useDraftFormValue(
  form: UseFormReturn<OrderForm>,
  context: DraftContext,
  isAsked: boolean,
): DraftForm {
  const values = useWatch({ control: form.control }) as OrderForm;
  const work = useMemo(() => workOutDraft(values, context), [values, context]);
  const { touchedFields } = form.formState;
  const { brims, entries } = errorsIn(work, values.typedRate);
  const isRefused = 'detail' in work;
  const errorOf = (field: OrderFormField): string | undefined => {
    const brim = brims.get(field);
    if (brim !== undefined) return brim;
    const wasLeft = touchedFields[field] === true && values[field].trim() !== '';
    return isAsked || isRefused || wasLeft ? entries[field] : undefined;
  };
  const broken = 'workOut' in work ? work.workOut.limits : [];
  return {
    values,
    context,
    work,
    register: afterThePress(form.register),
    set: (changes) => {
      for (const [field, value] of Object.entries(changes)) {
        form.setValue(field as OrderFormField, value, { shouldDirty: true, shouldTouch: true });
      }
    },
    errorOf,
    isOver: (field) => brims.has(field),
    owes: (field) => values[field] !== '' || broken.some((limit) => !limit.met && limit.owes === field),
  };
}
