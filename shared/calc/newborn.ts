import { snap } from '../rounding';
import type { RuleValues } from '../rulebook/read';
import type { MethodFigure } from './bands';
import { refuse } from './scene';
import type { Refusal, Scene } from './scene';
import { printed, step } from './step';
import type { MaintenanceOrder } from './types';

export type NewbornBand = { day: 1 | 2 | 3 | 4 | 5; low: number; high: number };

/** The band of a term newborn by hours since birth, mL/kg/24 h; NICE NG29 1.4, counting of days ours. */
export function newbornBand(hours: number, rules: RuleValues['newborn']): NewbornBand {
  if (hours < 24) return { day: 1, low: rules.day1Low, high: rules.day1High };
  if (hours < 48) return { day: 2, low: rules.day2Low, high: rules.day2High };
  if (hours < 72) return { day: 3, low: rules.day3Low, high: rules.day3High };
  if (hours < 96) return { day: 4, low: rules.day4Low, high: rules.day4High };
  return { day: 5, low: rules.day5Low, high: rules.day5High };
}

/** The 24 h figure of a newborn; the lower end of the band where the order states none, mL. */
export function newbornFigure(scene: Scene, order: MaintenanceOrder): MethodFigure | Refusal {
  const { age, request, rules, sources } = scene;
  if (age.hours === undefined) {
    return refuse(
      'birth-time-needed',
      'Under 28 days the amount goes by hours since birth: record the time.',
      'bornAt',
    );
  }
  const band = newbornBand(age.hours, rules.newborn);
  const perKg = order.newbornMlPerKgPerDay ?? band.low;
  const ml = snap(request.weight.kg * perKg);
  const label = band.day === 5 ? 'from 96 h' : `day ${band.day}, ${Math.floor(age.hours)} h`;
  const working = `${printed(request.weight.kg)} × ${printed(perKg)}`;
  return {
    fullMl: ml,
    bands: [{ label, ml, fullMl: ml }],
    steps: [
      step(label, working, [ml, 'mL'], sources.newborn.day1Low),
      step('in full, 24 h', printed(ml), [ml, 'mL'], '', 'sum'),
    ],
  };
}
