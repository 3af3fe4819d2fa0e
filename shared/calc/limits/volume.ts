import { above, formatNumber, highestRate } from '../../rounding';
import type { MaintenanceFacts, MaintenanceLimit } from '../facts';
import { broken, kept } from '../findings';

/** Maintenance and counted other intake against the 24 h ceiling; NICE NG29 1.4. */
export const ceilingLimit: MaintenanceLimit = (facts, found) => {
  const { scene, totalMl, ceiling, intake } = facts;
  const source = scene.sources.maintenance.ceilingBoys;
  const most = formatNumber(ceiling, 1);
  const asked = formatNumber(totalMl, 1);
  const more = { value: totalMl, limit: ceiling, unit: 'mL/24 h' };
  if (!above(totalMl, ceiling)) {
    const text = `${asked} of ${most} mL. The brim is ${most} mL in 24 h.`;
    found.push(kept('maintenance-ceiling', 'brim', ['Volume in 24 h', text], source, more));
    return;
  }
  const over = formatNumber(totalMl - ceiling, 1);
  const with_ = intake > 0 ? ` with ${formatNumber(intake, 1)} mL other intake` : '';
  const text = `${asked} mL in 24 h${with_} is ${over} mL over the brim. 24 h may hold ${most} mL at most.`;
  found.push(
    broken('maintenance-ceiling', 'brim', ['Over the brim', text], source, { ...more, ...offerRate(facts) }),
  );
};

/** The highest rate under the ceiling that is also not above the method, as a button. */
function offerRate({ scene, ceiling, intake, workedOut }: MaintenanceFacts) {
  const most = highestRate((ceiling - intake) / 24, scene.steps);
  const value = formatNumber(workedOut > 0 ? Math.min(most, workedOut) : most, 1);
  return value === '0' ? {} : { offer: { field: 'typedRate', value, label: `Set to ${value} mL/h` } };
}

/** The rate that only keeps a vein open, mL/h; common practice. */
export const keepOpenRate = ({ scene }: MaintenanceFacts): number => {
  const { keepOpenSmall, keepOpenLarge, keepOpenSmallBelow } = scene.rules.maintenance;
  return scene.request.weight.kg < keepOpenSmallBelow ? keepOpenSmall : keepOpenLarge;
};
