import { HOUR } from '../time';
import type { BeforeOrder, Scene } from './scene';

/** Boluses given in the last 24 h, here and elsewhere, mL. */
export function bolusesOf24h({ request, rules }: Scene<BeforeOrder>): number {
  const since = request.at - rules.bolus.totalHours * HOUR;
  let sum = 0;
  for (const { ml, at } of request.intake.bolusesLast24h) if (at > since) sum += ml;
  return sum;
}
