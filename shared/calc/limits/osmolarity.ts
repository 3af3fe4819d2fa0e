import { above, formatNumber } from '../../rounding';
import type { CommonLimit } from '../facts';
import { broken } from '../findings';

/** Osmolarity by a peripheral line: senior above 900, brim above 1000 mOsm/L; ASPEN 2014. */
export const osmolarityLimit: CommonLimit = ({ request, rules, sources, peripheral }, found) => {
  const { osmolarity } = request.order.fluid;
  const { peripheralSenior, peripheralBrim } = rules.osmolarity;
  if (!peripheral || !above(osmolarity, peripheralSenior)) return;
  const isBrim = above(osmolarity, peripheralBrim);
  const limit = isBrim ? peripheralBrim : peripheralSenior;
  const text = `${formatNumber(osmolarity, 0)} mOsm/L is more than ${limit} for this line.`;
  const title = isBrim ? 'Too concentrated for this line' : 'Concentrated for this line';
  const more = { value: osmolarity, limit, unit: 'mOsm/L' };
  found.push(
    broken('osmolarity', isBrim ? 'brim' : 'senior', [title, text], sources.osmolarity.peripheralBrim, more),
  );
};
