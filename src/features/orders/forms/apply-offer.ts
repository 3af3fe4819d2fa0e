import { ORDER_FORM_FIELDS, type OrderForm, type OrderFormField } from '@shared/orders/form';

export type Offer = { field: string; value: string; label: string };

export const isFormField = (field: string): field is OrderFormField =>
  ORDER_FORM_FIELDS.some((each) => each === field);

/** The entries an offer changes; undefined where it belongs to no entry of this form. */
export function offeredEntries({ field, value }: Offer): Partial<Record<OrderFormField, string>> | undefined {
  if (!isFormField(field)) return undefined;
  if (field === 'volumeMl') return { doseBy: 'volume', volumeMl: value, mlPerKg: '' };
  if (field === 'mlPerKg') return { doseBy: 'weight', mlPerKg: value, volumeMl: '' };
  return { [field]: value };
}

/** The form as it would be with the offer taken. */
export const withOffer = (form: OrderForm, offer: Offer): OrderForm => ({
  ...form,
  ...offeredEntries(offer),
});
