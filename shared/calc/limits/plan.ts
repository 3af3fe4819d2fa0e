import { above, below, formatNumber, highestRate, stepAt } from '../../rounding';
import type { MaintenanceFacts, MaintenanceLimit } from '../facts';
import { broken, kept } from '../findings';
import { fractionWords } from '../intake';

const SOURCE = 'fluid plan on the chart';

/** Where the chart holds a consultant's plan the order is held to it: more, or another fraction, is senior. */
export const planLimit: MaintenanceLimit = (facts, found) => {
  const { plan } = facts.scene.request;
  if (!plan) return;
  if (plan.kind === 'allowance') {
    found.push(allowanceFinding(facts, plan.mlPer24h));
    return;
  }
  const words = fractionWords(plan.fraction);
  if (plan.fraction === facts.order.fraction) {
    found.push(kept('plan-fraction', 'senior', ['Fluid plan', `The plan asks for ${words}.`], SOURCE));
    return;
  }
  const offer = { field: 'fraction', value: plan.fraction, label: `Set to ${words}` };
  const text = `The plan on the chart asks for ${words}, this order has ${fractionWords(facts.order.fraction)}.`;
  found.push(broken('plan-fraction', 'senior', ['Differs from the fluid plan', text], SOURCE, { offer }));
};

function allowanceFinding({ scene, totalMl, intake, rate }: MaintenanceFacts, allowance: number) {
  const slack = stepAt(rate, scene.steps) * 24;
  const more = { value: totalMl, limit: allowance, unit: 'mL/24 h' };
  const text = `The plan on the chart allows ${formatNumber(allowance, 1)} mL in 24 h, this order and the counted intake come to ${formatNumber(totalMl, 1)} mL.`;
  const isOver = above(totalMl, allowance + slack);
  if (!isOver && !below(totalMl, allowance - slack)) {
    return kept('plan-allowance', 'senior', ['Fluid plan', text], SOURCE, more);
  }
  const value = formatNumber(highestRate((allowance - intake) / 24, scene.steps), 1);
  const offer = value === '0' ? {} : { offer: { field: 'typedRate', value, label: `Set to ${value} mL/h` } };
  const title = isOver ? 'More than the fluid plan' : 'Less than the fluid plan';
  return broken('plan-allowance', isOver ? 'senior' : 'caution', [title, text], SOURCE, {
    ...more,
    ...offer,
  });
}
