import { formatNumber } from '../rounding';
import {
  glucoseEnergy,
  glucoseRate,
  gramsPerLitre,
  kilograms,
  millilitres,
  millilitresPerHour,
} from '../units';
import type { BolusFacts, MaintenanceFacts } from './facts';
import type { Given } from './types';

const given = (
  code: string,
  label: string,
  [value, unit]: [value: number, unit: string],
  decimals: number,
): Given => ({
  code,
  label,
  value,
  text: formatNumber(value, decimals),
  unit,
});

/** What a maintenance order gives the child in 24 h; energy at 4 kcal for a gram of glucose. */
export function maintenanceGives({ scene, order, rate, fullMl }: MaintenanceFacts): Given[] {
  const { kg } = scene.request.weight;
  const { fluid } = order;
  const day = millilitres(rate * 24);
  const glucose = gramsPerLitre(fluid.glucoseGPerL);
  const moles = (content: number) => (content * day) / 1000 / kg;
  return [
    given('ml-per-kg-per-hour', 'Volume', [rate / kg, 'mL/kg/h'], 2),
    given('percent-of-full', 'Of full maintenance', [(day / fullMl) * 100, '%'], 1),
    given(
      'glucose',
      'Glucose',
      [glucoseRate(glucose, millilitresPerHour(rate), kilograms(kg)), 'mg/kg/min'],
      2,
    ),
    given('sodium', 'Sodium', [moles(fluid.sodium), 'mmol/kg/day'], 1),
    given('potassium', 'Potassium', [moles(fluid.potassium), 'mmol/kg/day'], 1),
    given('energy', 'Energy', [glucoseEnergy(glucose, day, kg), 'kcal/kg/day'], 1),
    given('chloride', 'Chloride', [moles(fluid.chloride), 'mmol/kg/day'], 1),
    given('ml-per-kg-per-day', 'Volume of a day', [day / kg, 'mL/kg/day'], 1),
    given('osmolarity', 'Osmolarity', [fluid.osmolarity, 'mOsm/L'], 0),
  ];
}

/** Estimated circulating volume by age, mL/kg; textbook ranges. */
export function circulatingPerKg({ scene }: BolusFacts): number {
  const { age, rules } = scene;
  if (age.isNewborn) return rules.circulating.newborn;
  if (age.years < rules.circulating.infantUntilYears) return rules.circulating.infant;
  return age.years < rules.circulating.childUntilYears ? rules.circulating.child : rules.circulating.older;
}

/** What a bolus gives. */
export function bolusGives(facts: BolusFacts): Given[] {
  const { order, volume, perKg, totalPerKg } = facts;
  return [
    given('ml-per-kg', 'By weight', [perKg, 'mL/kg'], 1),
    given(
      'percent-of-circulating',
      'Of circulating volume',
      [(perKg / circulatingPerKg(facts)) * 100, '%'],
      1,
    ),
    given('ml-per-minute', 'Pace', [volume / order.over, 'mL/min'], 1),
    given('sodium', 'Sodium', [(order.fluid.sodium * perKg) / 1000, 'mmol/kg'], 2),
    given('total-24h', 'All boluses of 24 h', [totalPerKg, 'mL/kg'], 1),
  ];
}
