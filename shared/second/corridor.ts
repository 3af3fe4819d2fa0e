import type { Rulebook } from '../rulebook/document';
import { exact, minus, over, times, toNumber, whole } from './exact';
import { dailyBands, hourlyBands } from './full-day';
import { rulesOf } from './rules';

/** The other published way to count the bands beside the one used; mL in 24 h, before ceiling and fraction. */
export type Corridor = { used: number; other: number; percentApart: number; isWithin: boolean };

/** Daily bands against 4-2-1 for a weight in kg: a sanity range of ±10%, shown and never a refusal. */
export function corridor(kg: number, method: 'bands-daily' | 'bands-hourly', rulebook: Rulebook): Corridor {
  const rule = rulesOf(rulebook);
  const [daily, hourly] = [dailyBands(exact(kg), rule), hourlyBands(exact(kg), rule)];
  const [used, other] = method === 'bands-daily' ? [daily, hourly] : [hourly, daily];
  const percentApart = toNumber(over(times(minus(used, other), whole(100)), other));
  const most = toNumber(rule('check', 'corridorPercent'));
  return {
    used: toNumber(used),
    other: toNumber(other),
    percentApart,
    isWithin: Math.abs(percentApart) <= most,
  };
}
