import { above, atLeast, formatNumber, largestVolume } from '../../rounding';
import type { BolusLimit } from '../facts';
import { broken, kept } from '../findings';
import type { BeforeOrder, Scene } from '../scene';

/** The brim of one dose, mL: 20 mL/kg and 500 mL, whichever is less; NICE NG29 1.3 and common practice. */
export const bolusBrim = ({ rules, request }: Scene<BeforeOrder>): number =>
  Math.min(rules.bolus.brimMl, rules.bolus.brimMlPerKg * request.weight.kg);

/** One dose against its brim. */
export const bolusDoseLimit: BolusLimit = (facts, found) => {
  const { scene, volume } = facts;
  const { brimMl, brimMlPerKg } = scene.rules.bolus;
  const brim = bolusBrim(scene);
  const most = largestVolume(brim, scene.steps);
  const printed = formatNumber(most, 1);
  const source = brim < brimMl ? scene.sources.bolus.brimMlPerKg : scene.sources.bolus.brimMl;
  const more = { value: volume, limit: brim, unit: 'mL' };
  const rule = `${brimMlPerKg} mL/kg, or ${brimMl} mL, whichever is less`;
  if (!above(volume, brim)) {
    const text = `${formatNumber(volume, 1)} of ${printed} mL. One bolus holds ${rule}.`;
    found.push(kept('bolus-volume', 'brim', ['One bolus', text], source, more));
    return;
  }
  const over = formatNumber(volume - brim, 1);
  const text = `${formatNumber(volume, 1)} mL is ${over} mL over the brim. One bolus may hold ${printed} mL at most: ${rule}.`;
  const label = `Set to ${printed} mL (${formatNumber(most / scene.request.weight.kg, 1)} mL/kg)`;
  const offer = { field: 'volumeMl', value: printed, label };
  found.push(broken('bolus-volume', 'brim', ['Over the brim', text], source, { ...more, offer }));
};

/** More than 10 mL/kg from 28 days on, or any dose with a careful flag: caution; NICE NG29 1.3. */
export const bolusCautionLimit: BolusLimit = ({ scene, perKg }, found) => {
  const { rules, sources, age } = scene;
  const { cautionMlPerKg } = rules.bolus;
  const dose = `${formatNumber(perKg, 1)} mL/kg`;
  const more = { value: perKg, unit: 'mL/kg' };
  if (isCareful(scene.request.child.flags)) {
    const limit = rules.bolus.carefulMlPerKg;
    const text = `Heart, kidney or albumin trouble: ${limit} mL/kg is proposed, this is ${dose}. Look again before more.`;
    const make = above(perKg, limit) ? broken : kept;
    found.push(
      make('bolus-careful', 'caution', ['Smaller boluses', text], sources.bolus.carefulMlPerKg, {
        ...more,
        limit,
      }),
    );
  }
  if (age.isNewborn || !above(perKg, cautionMlPerKg)) return;
  const text = `${dose} is more than the usual ${cautionMlPerKg} mL/kg.`;
  found.push(
    broken('bolus-large', 'caution', ['Large dose', text], sources.bolus.cautionMlPerKg, {
      ...more,
      limit: cautionMlPerKg,
    }),
  );
};

/** Flags under which boluses are halved and looked at. */
export const isCareful = (flags: readonly string[]): boolean =>
  flags.includes('cardiac') || flags.includes('renal') || flags.includes('low-albumin');

/** All boluses of 24 h: senior from 40 mL/kg, above 60 a named advice as well; NICE NG29, never a brim. */
export const bolusTotalLimit: BolusLimit = ({ scene, order, totalPerKg }, found) => {
  const { totalSenior, totalAdvice } = scene.rules.bolus;
  const source = scene.sources.bolus.totalSenior;
  const text = `With this dose ${formatNumber(totalPerKg, 1)} mL/kg in 24 h, here and elsewhere.`;
  const more = { value: totalPerKg, limit: totalSenior, unit: 'mL/kg' };
  if (!atLeast(totalPerKg, totalSenior)) {
    found.push(kept('bolus-total', 'senior', ['All boluses of 24 h', text], source, more));
    return;
  }
  const says = `${text} From ${totalSenior} mL/kg a senior agrees; think of bleeding and the heart.`;
  found.push(broken('bolus-total', 'senior', ['Many boluses', says], source, more));
  if (!above(totalPerKg, totalAdvice)) return;
  const isNamed = Boolean(order.advisedBy?.trim());
  const advice = `Above ${totalAdvice} mL/kg name the intensive-care doctor or consultant who advised it.`;
  const extra = {
    ...more,
    limit: totalAdvice,
    ...(isNamed ? {} : { owes: 'advisedBy' as const }),
  };
  const make = isNamed ? kept : broken;
  found.push(
    make('bolus-advice', 'senior', ['Named advice', advice], scene.sources.bolus.totalAdvice, extra),
  );
};
