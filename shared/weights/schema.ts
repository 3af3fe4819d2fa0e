import { z } from 'zod';
import { WEIGHT_METHODS, type WeightMethod } from '../calc/types';
import { readDecimal } from '../decimal-input';
import { civilDate, DAY, localDateTimeToInstant, type Instant } from '../time';
import { kilograms, type Kilograms } from '../units';
import type { WeighedChild } from './chart-weight';
import { KG_FIELD } from './limits';

/** A weight as a person enters it: text for the figure, local date and time for the moment. */
export const weightForm = z.object({
  kg: z.string().max(40),
  method: z.enum(WEIGHT_METHODS),
  at: z.string().max(40),
});
export type WeightForm = z.infer<typeof weightForm>;

export type WeightReading =
  | { ok: true; kg: Kilograms; method: WeightMethod; at: Instant }
  | { ok: false; field: 'kg' | 'at'; code: string; message: string; instants?: [Instant, Instant] };

/** Reads an entered weight against the child and the clock; the first fault is the answer. */
export function readWeightForm(
  form: WeightForm,
  child: WeighedChild,
  now: Instant,
  zone: string,
): WeightReading {
  const figure = readDecimal(form.kg, KG_FIELD);
  if (!figure.ok) return { ...figure, field: 'kg' };
  const moment = localDateTimeToInstant(form.at, zone);
  if (!moment.ok) return { ...moment, field: 'at' };
  const at = moment.instant;
  if (at > now) return refuse('in-future', 'The time of weighing lies ahead.');
  if (isBeforeBirth(at, child, zone)) return refuse('before-birth', 'The child was not born then.');
  if (form.method === 'birth-weight' && at - (child.bornAt ?? at) > DAY) {
    return refuse('not-at-birth', 'A birth weight is taken within a day of birth.');
  }
  return { ok: true, kg: kilograms(figure.value), method: form.method, at };
}

const isBeforeBirth = (at: Instant, child: WeighedChild, zone: string): boolean =>
  child.bornAt === undefined ? civilDate(at, zone) < child.bornOn : at < child.bornAt;

const refuse = (code: string, message: string): WeightReading => ({ ok: false, field: 'at', code, message });
