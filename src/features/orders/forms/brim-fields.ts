import type { LimitFinding } from '@shared/calc/types';
import type { OrderFormField } from '@shared/orders/form';

/** The entry each ceiling is shown at, where the limit's own offer does not say it. */
const AT: Readonly<Record<string, OrderFormField>> = {
  'maintenance-ceiling': 'typedRate',
  'above-method': 'typedRate',
  'bolus-volume': 'volumeMl',
  'bolus-slow': 'overMinutes',
  'order-life': 'hours',
  'potassium-rate': 'typedRate',
  'glucose-rate': 'typedRate',
  'newborn-brim': 'newbornMlPerKgPerDay',
};

/** The ceilings an order passes, by the entry to change; whatever names none belongs to the fluid. */
export function brimsByField(brims: readonly LimitFinding[], typedRate: string): Map<OrderFormField, string> {
  const found = new Map<OrderFormField, string>();
  for (const { code, text } of brims) {
    const at = AT[code] ?? 'productId';
    // without a typed rate the method and its fraction made the figure
    const field = at === 'typedRate' && typedRate.trim() === '' ? 'fraction' : at;
    const before = found.get(field);
    found.set(field, before === undefined ? text : `${before} ${text}`);
  }
  return found;
}
