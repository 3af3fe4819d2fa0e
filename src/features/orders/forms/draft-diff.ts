import { ORDER_FORM_FIELDS, type OrderForm, type OrderFormField } from '@shared/orders/form';

export type Side = 'mine' | 'theirs';

/** The entries in which two texts of one draft differ, in the order of the page. */
export const differingFields = (mine: OrderForm, theirs: OrderForm): OrderFormField[] =>
  ORDER_FORM_FIELDS.filter((field) => mine[field] !== theirs[field]);

/** The limits whose reasons differ. */
export const differingReasons = (mine: OrderForm, theirs: OrderForm): string[] =>
  [...new Set([...Object.keys(mine.limitReasons), ...Object.keys(theirs.limitReasons)])].filter(
    (code) => (mine.limitReasons[code] ?? '') !== (theirs.limitReasons[code] ?? ''),
  );

/** One text of two, entry by entry as chosen; reasons are keyed "reason:<limit>". */
export function mergeForms(
  mine: OrderForm,
  theirs: OrderForm,
  choices: Readonly<Record<string, Side>>,
): OrderForm {
  const entries = ORDER_FORM_FIELDS.map((field) => [
    field,
    choices[field] === 'theirs' ? theirs[field] : mine[field],
  ]);
  const reasons = { ...theirs.limitReasons, ...mine.limitReasons };
  for (const code of differingReasons(mine, theirs)) {
    const from = choices[`reason:${code}`] === 'theirs' ? theirs : mine;
    reasons[code] = from.limitReasons[code] ?? '';
  }
  return { ...(Object.fromEntries(entries) as Record<OrderFormField, string>), limitReasons: reasons };
}
