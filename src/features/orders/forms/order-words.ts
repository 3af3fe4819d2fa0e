import { METHOD_WORDS as WEIGHT_METHOD_WORDS } from '@shared/weights/chart-weight';
import { FRACTION_WORDS, METHOD_WORDS } from '@shared/checks/words';
import {
  BOLUS_ROUTES,
  LINE_CLASSES,
  MAINTENANCE_METHODS,
  type BolusRoute,
  type Fraction,
  type LineClass,
} from '@shared/calc/types';
import { URGENCIES, type OrderForm, type OrderFormField, type Urgency } from '@shared/orders/form';
import { KIND_WORDS } from '@shared/orders/words';
import type { DraftContext } from '@shared/routes/orders';
import type { WeightRow } from '@shared/routes/children';
import { formatDayTime, instant, parseInstant } from '@shared/time';

/** What the page calls each entry, wherever it names one. */
export const FIELD_WORDS: Readonly<Record<OrderFormField, string>> = {
  kind: 'What for',
  reason: 'Reason for fluids',
  weightId: 'Weight',
  method: 'Formula',
  fraction: 'Fraction',
  fractionReason: 'Why this fraction',
  temperatureC: 'Temperature',
  newbornMlPerKgPerDay: 'Volume by weight',
  feedsMl: 'Feeds and drinks',
  feedsNote: 'Feeds, remark',
  drugsMl: 'Drug volumes',
  drugsNote: 'Drug volumes, remark',
  typedRate: 'Rate',
  doseBy: 'Dose',
  mlPerKg: 'Dose by weight',
  volumeMl: 'Volume',
  overMinutes: 'Give over',
  route: 'How it is given',
  advisedBy: 'Advised by',
  productId: 'Fluid',
  line: 'Line',
  plannedStart: 'Start',
  hours: 'Valid for',
  reviewBy: 'Review by',
  bloodsBy: 'Bloods by',
  urgency: 'How urgent',
  checkerId: 'Who checks',
};

/** A title within a sentence: "Old weight" becomes "old weight", "ADH risk" stays. */
export const inSentence = (title: string): string =>
  /^[A-Z][a-z ]/.test(title) ? title.charAt(0).toLowerCase() + title.slice(1) : title;

/** The element of a field, for labels, jumps and focus. */
export const fieldId = (field: OrderFormField): string => `order-${field}`;

/** Puts the cursor into a field; a strip of choices has it on its chosen one. */
export function focusField(field: OrderFormField): void {
  // one dose, two boxes: by weight is the first of them
  const element = document.getElementById(fieldId(field === 'doseBy' ? 'mlPerKg' : field));
  if (element === null) return;
  const isStrip = element.getAttribute('role') === 'radiogroup';
  const target = isStrip
    ? (element.querySelector<HTMLElement>('input:checked') ?? element.querySelector<HTMLElement>('input'))
    : element;
  target?.focus();
  element.scrollIntoView?.({ block: 'center' });
}

export const LINE_WORDS: Readonly<Record<LineClass, string>> = {
  peripheral: 'Peripheral',
  central: 'Central',
  intraosseous: 'Intraosseous',
};
export const ROUTE_WORDS: Readonly<Record<BolusRoute, string>> = {
  pump: 'Pump',
  syringe: 'Syringe, by hand',
  'pressure-bag': 'Pressure bag',
  gravity: 'Gravity',
};
export const URGENCY_WORDS: Readonly<Record<Urgency, string>> = {
  routine: 'Routine',
  urgent: 'Urgent',
  emergency: 'Emergency',
};
export const FRACTION_LABELS: Readonly<Record<Fraction, string>> = {
  full: '100%',
  'four-fifths': '80%',
  'two-thirds': '66.7%',
  half: '50%',
};

const options = <Value extends string>(values: readonly Value[], words: Readonly<Record<Value, string>>) =>
  values.map((value) => ({ value, label: words[value] }));

/** Short enough to be read whole in the closed field. */
export const METHOD_OPTIONS = options(MAINTENANCE_METHODS, {
  'bands-daily': 'Bands, per day',
  'bands-hourly': 'Bands, 4-2-1 per hour',
  who: 'WHO',
  newborn: 'Newborn, by hours',
});
export const LINE_OPTIONS = options(LINE_CLASSES, LINE_WORDS);
export const ROUTE_OPTIONS = options(BOLUS_ROUTES, ROUTE_WORDS);
export const urgencyOptions = (kind: string) =>
  options(
    URGENCIES.filter((urgency) => kind !== 'maintenance' || urgency !== 'emergency'),
    URGENCY_WORDS,
  );

/** "10 Jun 07:50" of an instant on the wire. */
export const dayTime = (at: string, zone: string): string =>
  formatDayTime(parseInstant(at) ?? instant(0), zone);

/** "16.4 kg" of a decimal on the wire: every digit recorded, no trailing zero. */
export const kgWords = (kg: string): string => `${String(Number(kg))}\u00a0kg`;

/** "16.4 kg, standing scales, 10 Jun 07:50". */
export const weightWords = (
  { kg, method, at }: Pick<WeightRow, 'kg' | 'method' | 'at'>,
  zone: string,
): string => `${kgWords(kg)}, ${WEIGHT_METHOD_WORDS[method]}, ${dayTime(at, zone)}`;

/** Entries that are a choice among words. */
const CHOICES: Partial<Record<OrderFormField, Readonly<Record<string, string>>>> = {
  kind: KIND_WORDS,
  method: METHOD_WORDS,
  fraction: FRACTION_WORDS,
  line: LINE_WORDS,
  route: ROUTE_WORDS,
  urgency: URGENCY_WORDS,
  doseBy: { weight: 'by weight', volume: 'by volume' },
};

const weightEntry = (id: string, { weights, zone }: DraftContext): string => {
  const row = weights.find((each) => each.id === id);
  return row ? weightWords(row, zone) : id && 'a weight that is not on this page';
};

const fluidEntry = (id: string, { products }: DraftContext): string =>
  products.find((each) => each.id === id)?.name ?? (id && 'a fluid that is not on this page');

/** One entry of a form in words, for comparing two texts of a draft; empty where nothing is entered. */
export function entryWords(field: OrderFormField, form: OrderForm, context: DraftContext): string {
  const value = form[field];
  if (field === 'weightId') return weightEntry(value, context);
  if (field === 'productId') return fluidEntry(value, context);
  if (field === 'checkerId') return value === '' ? 'Anyone on the ward' : 'a named colleague';
  // local date-times read better with a space
  return CHOICES[field]?.[value] ?? value.replace(/^(\d{4}-\d{2}-\d{2})T/, '$1, ');
}
