import { HOUR } from '../time';
import type { BeforeOrder, Scene } from './scene';
import { MEASURED_METHODS } from './types';
import type { WeightMethod } from './types';

/** Whether scales gave the weight; age formulas, tapes and say-so are estimates. */
export const isMeasured = (method: WeightMethod): boolean => MEASURED_METHODS.includes(method);

/** Hours since the last measured weight; absent where none was ever measured. */
export function hoursSinceWeighed({ request }: Scene<BeforeOrder>): number | undefined {
  const own = isMeasured(request.weight.method) ? request.weight.at : undefined;
  const last = request.lastMeasuredAt ?? own;
  return last === undefined ? undefined : (request.at - last) / HOUR;
}

/** How old a measured weight may be before it is called old, h: 7 days, newborn 48 h; common practice. */
export const weightFreshHours = ({ age, rules }: Scene<BeforeOrder>): number =>
  age.isNewborn ? rules.weight.freshHoursNewborn : rules.weight.freshDays * 24;

/** Whether the last measured weight is too old, or there is none. */
export function isWeightOld(scene: Scene<BeforeOrder>): boolean {
  const hours = hoursSinceWeighed(scene);
  return hours === undefined || hours > weightFreshHours(scene);
}

/** How long a maintenance order may live, h: 24, divided on an estimated or old weight. */
export function orderLifeHours(scene: Scene<BeforeOrder>): number {
  const { hoursMost } = scene.rules.maintenance;
  const isShortened = !isMeasured(scene.request.weight.method) || isWeightOld(scene);
  return isShortened ? hoursMost / scene.rules.weight.lifeDivisor : hoursMost;
}
