import { above, below, formatNumber } from '../../rounding';
import type { BolusFacts, BolusLimit } from '../facts';
import { broken } from '../findings';
import { isPotassiumBag } from '../solutes';

/** A bolus is glucose-free isotonic crystalloid without added potassium: anything else is a brim; NICE NG29 1.3. */
export const bolusFluidLimit: BolusLimit = ({ scene, order }, found) => {
  const { rules, sources } = scene;
  const { fluid } = order;
  const brim = (code: string, title: string, text: string, source: string) =>
    found.push(broken(code, 'brim', [title, text], source));
  const sodium = `It carries ${formatNumber(fluid.sodium, 0)} mmol/L of sodium`;
  if (fluid.glucoseGPerL > 0) {
    brim('bolus-glucose', 'Glucose in a bolus', 'A bolus carries no glucose.', sources.bolus.childMlPerKg);
  }
  if (isPotassiumBag(fluid, rules.potassium.bagAbove)) {
    brim(
      'bolus-potassium',
      'Potassium in a bolus',
      'A potassium bag is never given as a bolus.',
      sources.potassium.bagAbove,
    );
  }
  if (below(fluid.sodium, rules.tonicity.isotonicFrom)) {
    brim(
      'bolus-hypotonic',
      'Hypotonic bolus',
      `${sodium}: a bolus is isotonic.`,
      sources.tonicity.isotonicFrom,
    );
  }
  if (above(fluid.sodium, rules.tonicity.hypertonicAbove)) {
    brim(
      'hypertonic',
      'Hypertonic fluid',
      `${sodium}: a bolus is isotonic.`,
      sources.tonicity.hypertonicAbove,
    );
  }
};

/** Slow boluses, and pump rates no pump reaches, are cautions; far too slow is no bolus. */
export const bolusPaceLimit: BolusLimit = ({ scene, order, volume }, found) => {
  const { overMinutes, minutesMost } = scene.rules.bolus;
  const more = { value: order.over as number, unit: 'min' };
  if (above(order.over, minutesMost)) {
    const text = `A bolus over ${formatNumber(order.over, 1)} min is no bolus: ${minutesMost} min at most.`;
    const offer = { field: 'overMinutes', value: String(overMinutes), label: `Set to ${overMinutes} min` };
    found.push(
      broken('bolus-slow', 'brim', ['Too slow for shock', text], scene.sources.bolus.minutesMost, {
        ...more,
        limit: minutesMost,
        offer,
      }),
    );
  } else if (above(order.over, overMinutes)) {
    const text = `In shock a bolus goes in over ${overMinutes} min or less.`;
    found.push(
      broken('bolus-slow', 'caution', ['Slow bolus', text], scene.sources.bolus.overMinutes, {
        ...more,
        limit: overMinutes,
      }),
    );
  }
  if (order.route === 'pump') pumpFinding({ scene, order, volume }, found);
};

function pumpFinding(
  { scene, order, volume }: Pick<BolusFacts, 'scene' | 'order' | 'volume'>,
  found: Parameters<BolusLimit>[1],
) {
  const rate = (volume * 60) / order.over;
  const most = scene.rules.bolus.pumpMost;
  if (!above(rate, most)) return;
  const text = `${formatNumber(volume, 1)} mL in ${formatNumber(order.over, 1)} min is ${formatNumber(rate, 0)} mL/h, beyond a pump (${most} mL/h). Use a syringe or a pressure bag.`;
  const offer = { field: 'route', value: 'syringe', label: 'Give by syringe' };
  found.push(
    broken('bolus-pump', 'caution', ['Beyond the pump', text], scene.sources.bolus.pumpMost, {
      value: rate,
      limit: most,
      unit: 'mL/h',
      offer,
    }),
  );
}
