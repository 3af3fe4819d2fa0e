import { formatNumber } from '../rounding';
import type { BolusFacts, MaintenanceFacts } from './facts';
import { glucoseFlow } from './limits/glucose';
import { potassiumFlow } from './limits/potassium-rate';
import { orderLifeHours } from './order-life';
import { potassiumBrim } from './solutes';
import type { OtherBrim } from './types';

type Shape = { decimals: number; unit: string };

const brim = (
  code: string,
  label: string,
  [value, limit]: [number, number],
  { decimals, unit }: Shape,
): OtherBrim => ({
  code,
  label,
  value,
  limit,
  text: `${formatNumber(value, decimals)} of ${formatNumber(limit, decimals)} ${unit}`,
});

/** The further ceilings a maintenance order is drawn against. */
export function maintenanceBrims(facts: MaintenanceFacts): OtherBrim[] {
  const { scene, order } = facts;
  const brims: OtherBrim[] = [];
  if (order.fluid.potassium > 0) {
    const most = potassiumBrim(scene) / scene.request.weight.kg;
    brims.push(
      brim('potassium-rate', 'Potassium', [potassiumFlow(facts).perKg, most], {
        decimals: 2,
        unit: 'mmol/kg/h',
      }),
    );
  }
  if (order.fluid.glucoseGPerL > 0 && scene.age.years < scene.rules.glucose.untilYears) {
    const pair: [number, number] = [glucoseFlow(facts), scene.rules.glucose.brim];
    brims.push(brim('glucose-rate', 'Glucose', pair, { decimals: 1, unit: 'mg/kg/min' }));
  }
  brims.push(
    brim('order-life', 'Valid for', [order.hours, orderLifeHours(scene)], { decimals: 1, unit: 'h' }),
  );
  return brims;
}

/** The further ceilings a bolus is drawn against; the total has no brim and is drawn against its last senior line. */
export function bolusBrims({ scene, perKg, totalPerKg }: BolusFacts): OtherBrim[] {
  const { brimMlPerKg, totalAdvice } = scene.rules.bolus;
  return [
    brim('bolus-per-kg', 'By weight', [perKg, brimMlPerKg], { decimals: 1, unit: 'mL/kg' }),
    brim('bolus-total', 'All boluses of 24 h', [totalPerKg, totalAdvice], { decimals: 1, unit: 'mL/kg' }),
  ];
}
