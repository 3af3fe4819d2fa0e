import { above, atMost, formatNumber, highestRate } from '../../rounding';
import type { MaintenanceFacts, MaintenanceLimit } from '../facts';
import { broken, kept } from '../findings';
import { soluteLines } from '../rate-line';
import { otherPotassium, potassiumBrim } from '../solutes';

/** Potassium of all fluids, mmol/h, and what each kg gets. */
export function potassiumFlow({ scene, order, rate }: MaintenanceFacts): { perHour: number; perKg: number } {
  const perHour = (rate * order.fluid.potassium) / 1000 + otherPotassium(scene);
  return { perHour, perKg: perHour / scene.request.weight.kg };
}

/** Potassium of all fluids by the line's limits; Irish formulary, Perth Children's Hospital. */
export const potassiumRateLimit: MaintenanceLimit = (facts, found) => {
  const { scene, order } = facts;
  if (order.fluid.potassium === 0) return;
  const { perHour, perKg } = potassiumFlow(facts);
  const brim = potassiumBrim(scene);
  const { peripheralPerKg, peripheralPerHour } = scene.rules.potassium;
  const usual = Math.min(peripheralPerKg * scene.request.weight.kg, peripheralPerHour);
  const source = scene.peripheral
    ? scene.sources.potassium.peripheralPerKg
    : scene.sources.potassium.centralPerKg;
  const line = scene.peripheral ? 'a peripheral' : 'a central';
  const gives = `All fluids give ${formatNumber(perKg, 2)} mmol/kg/h of potassium, ${formatNumber(perHour, 1)} mmol/h`;
  const more = { value: perHour, limit: brim, unit: 'mmol/h' };
  if (above(perHour, brim)) {
    const text = `${gives}; by ${line} line ${formatNumber(brim, 2)} mmol/h is the brim for this child.`;
    found.push(
      broken('potassium-rate', 'brim', ['Potassium too fast', text], source, {
        ...more,
        ...offerRate(facts),
      }),
    );
  } else if (!scene.peripheral && above(perHour, usual)) {
    const text = `${gives}: high dependency and ECG monitoring, and a senior agrees.`;
    found.push(
      broken('potassium-rate', 'senior', ['Fast potassium by central line', text], source, {
        ...more,
        limit: usual,
      }),
    );
  } else {
    found.push(kept('potassium-rate', 'brim', ['Potassium rate', `${gives}.`], source, more));
  }
};

function offerRate(facts: MaintenanceFacts) {
  const most = highestRate(soluteLines(facts.scene, facts.order.fluid)[0], facts.scene.steps);
  if (most === 0 || !atMost(most, facts.rate)) return {};
  const value = formatNumber(most, 1);
  return { offer: { field: 'typedRate', value, label: `Set to ${value} mL/h` } };
}
