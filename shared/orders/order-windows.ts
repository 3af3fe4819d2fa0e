import type { OrderInputs } from '../calc/types';
import type { Rulebook } from '../rulebook/document';
import { ruleValues } from '../rulebook/read';
import { HOUR, instant, MINUTE, type Instant } from '../time';

export type OrderWindows = {
  plannedStart: Instant;
  /** Signed and not started by then: lapsed. */
  startBy: Instant;
  /** Running past it: overdue. */
  lapsesAt: Instant;
};

/** The two clocks of an order, counted from its planned start. */
export function orderWindows(order: OrderInputs, plannedStart: Instant, rulebook: Rulebook): OrderWindows {
  const { startHours, startHoursBolus } = ruleValues(rulebook, 'windows');
  const after = (ms: number): Instant => instant(Math.round(plannedStart + ms));
  if (order.kind === 'maintenance') {
    const lapsesAt = after(order.hours * HOUR);
    const startBy = after(Math.min(startHours, order.hours) * HOUR);
    return { plannedStart, startBy, lapsesAt };
  }
  const startBy = after(startHoursBolus * HOUR);
  return { plannedStart, startBy, lapsesAt: after(startHoursBolus * HOUR + order.over * MINUTE) };
}
