import { createContext, use } from 'react';
import type { UseFormRegister } from 'react-hook-form';
import type { Kind } from '@shared/calc/types';
import type { OrderForm, OrderFormField } from '@shared/orders/form';
import type { DraftWork } from '@shared/orders/work-out-draft';
import type { DraftContext } from '@shared/routes/orders';

/** What every group of the order form reads: the text as typed, what it works out to, and how to change it. */
export type DraftForm = {
  values: OrderForm;
  context: DraftContext;
  work: DraftWork;
  register: UseFormRegister<OrderForm>;
  set: (entries: Partial<Record<OrderFormField, string>>) => void;
  /** What is wrong with an entry: a ceiling as it is typed, a malformed entry once the field was left. */
  errorOf: (field: OrderFormField) => string | undefined;
  isOver: (field: OrderFormField) => boolean;
  /** Goes over to a new order of the other kind with the same text; undefined where a version cannot. */
  changeKind?: { choose: (kind: Kind) => void; isChanging: boolean; error: string | undefined };
  /** The reason was typed, or a limit still asks for it. */
  owes: (field: 'fractionReason' | 'advisedBy') => boolean;
};

const Context = createContext<DraftForm | null>(null);
export const DraftFormProvider = Context.Provider;

export function useDraftForm(): DraftForm {
  const form = use(Context);
  if (form === null) throw new Error('A group of the order form stands outside the form.');
  return form;
}
