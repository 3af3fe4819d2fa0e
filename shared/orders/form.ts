import { z } from 'zod';

/** Every field of the order form, in the order of the page. */
export const ORDER_FORM_FIELDS = [
  'kind',
  'reason',
  'weightId',
  'method',
  'fraction',
  'fractionReason',
  'temperatureC',
  'newbornMlPerKgPerDay',
  'feedsMl',
  'feedsNote',
  'drugsMl',
  'drugsNote',
  'typedRate',
  'doseBy',
  'mlPerKg',
  'volumeMl',
  'overMinutes',
  'route',
  'advisedBy',
  'productId',
  'line',
  'plannedStart',
  'hours',
  'reviewBy',
  'bloodsBy',
  'urgency',
  'checkerId',
] as const;
export type OrderFormField = (typeof ORDER_FORM_FIELDS)[number];

/** A reason owed by a limit sits beside the fields, keyed by the limit's code. */
export type OrderForm = Record<OrderFormField, string> & { limitReasons: Record<string, string> };

const text = z.string().max(2000);

/**
 * The draft exactly as typed: half-typed and wrong input must survive, so every field is text.
 * `plannedStart`, `reviewBy`, `bloodsBy` are local date-times "2026-06-10T12:00" in the hospital's zone.
 * An empty `checkerId` means anyone on the ward.
 */
export const orderFormSchema: z.ZodType<OrderForm> = z.object({
  ...(Object.fromEntries(ORDER_FORM_FIELDS.map((field) => [field, text])) as Record<
    OrderFormField,
    typeof text
  >),
  limitReasons: z.record(z.string().max(80), text),
});

export const emptyOrderForm = (kind: string): OrderForm => ({
  ...(Object.fromEntries(ORDER_FORM_FIELDS.map((field) => [field, ''])) as Record<OrderFormField, string>),
  kind,
  limitReasons: {},
});

export const URGENCIES = ['routine', 'urgent', 'emergency'] as const;
export type Urgency = (typeof URGENCIES)[number];
