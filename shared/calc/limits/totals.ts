import { above, formatNumber } from '../../rounding';
import type { MaintenanceLimit } from '../facts';
import { broken, kept } from '../findings';
import { otherFlow } from '../solutes';
import { bolusesOf24h } from '../boluses';

/** Every fluid of 24 h together against full maintenance: senior above 150%, never a brim. Ours. */
export const allFluidsLimit: MaintenanceLimit = (facts, found) => {
  const { scene, totalMl, fullMl } = facts;
  const all = totalMl + otherFlow(scene) * 24 + bolusesOf24h(scene);
  const percent = (all / fullMl) * 100;
  const most = scene.rules.maintenance.allFluidsPercent;
  const more = { value: percent, limit: most, unit: '%' };
  const text = `This order, other fluids, counted intake and the boluses of 24 h come to ${formatNumber(all, 0)} mL, ${formatNumber(percent, 0)}% of full maintenance.`;
  const source = scene.sources.maintenance.allFluidsPercent;
  found.push(
    above(percent, most)
      ? broken('all-fluids', 'senior', [`All fluids above ${most}%`, text], source, more)
      : kept('all-fluids', 'senior', ['All fluids together', text], source, more),
  );
};
