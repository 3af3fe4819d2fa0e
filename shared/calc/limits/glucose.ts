import { above, below, formatNumber, highestRate } from '../../rounding';
import type { CommonLimit, MaintenanceFacts, MaintenanceLimit } from '../facts';
import { broken } from '../findings';
import { soluteLines } from '../rate-line';
import type { Scene } from '../scene';
import { otherGlucose } from '../solutes';

/** Glucose by a peripheral line: brim above 12.5%; Leeds. */
export const glucoseStrengthLimit: CommonLimit = ({ request, rules, sources, peripheral }, found) => {
  const percent = request.order.fluid.glucoseGPerL / 10;
  const most = rules.glucose.peripheralPercent;
  if (!peripheral || !above(percent, most)) return;
  const text = `Glucose ${formatNumber(percent, 1)}% is over the brim of ${most}% for this line.`;
  const more = { value: percent, limit: most, unit: '%' };
  found.push(
    broken(
      'glucose-concentration',
      'brim',
      ['Glucose too strong', text],
      sources.glucose.peripheralPercent,
      more,
    ),
  );
};

/** Glucose of all fluids, mg/kg/min. */
export const glucoseFlow = ({ scene, order, rate }: MaintenanceFacts): number =>
  (((rate * order.fluid.glucoseGPerL) / 1000 + otherGlucose(scene)) * 1000) / 60 / scene.request.weight.kg;

const linesOf = ({ age, rules }: Scene) =>
  age.isNewborn
    ? { caution: rules.glucose.newbornCaution, least: rules.glucose.newbornLeast }
    : { caution: rules.glucose.infantCaution, least: rules.glucose.infantLeast };

/** Glucose rate of all fluids to 2 years: caution, and brim above 13 mg/kg/min; Koletzko. */
export const glucoseRateLimit: MaintenanceLimit = (facts, found) => {
  const { scene, order } = facts;
  const { rules, sources, request } = scene;
  if (scene.age.years >= rules.glucose.untilYears) return;
  const flow = glucoseFlow(facts);
  const { caution, least } = linesOf(scene);
  const says = `All fluids give ${formatNumber(flow, 1)} mg/kg/min of glucose`;
  const more = { value: flow, unit: 'mg/kg/min' };
  if (order.fluid.glucoseGPerL > 0 && above(flow, rules.glucose.brim)) {
    const text = `${says}; the brim to ${rules.glucose.untilYears} years is ${rules.glucose.brim}.`;
    const extra = { ...more, limit: rules.glucose.brim, ...offerRate(facts) };
    found.push(broken('glucose-rate', 'brim', ['Glucose too fast', text], sources.glucose.brim, extra));
  } else if (order.fluid.glucoseGPerL > 0 && above(flow, caution)) {
    const text = `${says}, more than ${caution}. Watch the blood glucose.`;
    found.push(
      broken('glucose-rate', 'caution', ['Much glucose', text], sources.glucose.infantCaution, {
        ...more,
        limit: caution,
      }),
    );
  } else if (request.child.flags.includes('nil-by-mouth') && below(flow, least)) {
    const text = `${says}, less than ${least}, and the child is nil by mouth.`;
    found.push(
      broken('glucose-low', 'caution', ['Little glucose', text], sources.glucose.infantLeast, {
        ...more,
        limit: least,
      }),
    );
  }
};

function offerRate({ scene, order }: MaintenanceFacts) {
  const most = highestRate(soluteLines(scene, order.fluid)[1], scene.steps);
  const value = formatNumber(most, 1);
  return most === 0 ? {} : { offer: { field: 'typedRate', value, label: `Set to ${value} mL/h` } };
}

/** A fluid without glucose under 1 year or with a metabolic flag is a caution; glucose on a ketogenic diet is senior. */
export const glucosePresenceLimit: MaintenanceLimit = ({ scene, order }, found) => {
  const { age, rules, sources, request } = scene;
  const { flags } = request.child;
  const source = sources.glucose.noneUnderYears;
  const isMetabolic = flags.includes('metabolic');
  if (order.fluid.glucoseGPerL > 0) {
    if (!flags.includes('ketogenic-diet')) return;
    const text = 'The child is on a ketogenic diet and this fluid carries glucose.';
    found.push(broken('glucose-ketogenic', 'senior', ['Glucose on a ketogenic diet', text], source));
  } else if (isMetabolic || age.years < rules.glucose.noneUnderYears) {
    const why = isMetabolic
      ? 'with a metabolic or adrenal flag'
      : `under ${rules.glucose.noneUnderYears} year`;
    found.push(
      broken(
        'glucose-none',
        'caution',
        ['No glucose in the fluid', `A child ${why} may need glucose.`],
        source,
      ),
    );
  }
};
