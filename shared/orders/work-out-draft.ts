import type { LimitFinding, WorkOut, WorkOutRequest } from '../calc/types';
import { workOut } from '../calc/work-out';
import type { DraftContext } from '../routes/orders';
import { rulebookOf } from './chart-facts';
import type { OrderForm, OrderFormField } from './form';
import { readOrderForm, type OrderExtras } from './read-form';
import { sortLimits, type SortedLimits } from './sort-limits';

export type WorkedOutDraft = SortedLimits & {
  state: 'worked-out';
  request: WorkOutRequest;
  extras: OrderExtras;
  workOut: Extract<WorkOut, { ok: true }>;
};

export type DraftWork =
  | {
      state: 'incomplete';
      missing: OrderFormField[];
      /** Words for every field that is missing or malformed. */
      fields: Partial<Record<OrderFormField, string>>;
    }
  | {
      state: 'refused';
      code: string;
      detail: string;
      field?: string;
      offer?: LimitFinding['offer'];
    }
  | WorkedOutDraft;

export const isWorkedOut = (work: DraftWork): work is WorkedOutDraft => work.state === 'worked-out';
export const isIncomplete = (work: DraftWork): work is Extract<DraftWork, { state: 'incomplete' }> =>
  work.state === 'incomplete';

/** A draft as typed, worked out against its chart: the same function in the browser and on the server. */
export function workOutDraft(form: OrderForm, context: DraftContext): DraftWork {
  const reading = readOrderForm(form, context);
  if (!reading.ok) return { state: 'incomplete', missing: reading.missing, fields: reading.fields };
  const worked = workOut(reading.request, rulebookOf(context));
  if (!worked.ok) {
    const { code, detail, field, offer } = worked;
    return { state: 'refused', code, detail, field, offer };
  }
  const { request, extras } = reading;
  const isEmergency = extras.urgency === 'emergency';
  return {
    state: 'worked-out',
    request,
    extras,
    workOut: worked,
    ...sortLimits(worked.limits, form, isEmergency),
  };
}
