import type { CommonLimit } from '../facts';
import { broken } from '../findings';

/** Calcium and ceftriaxone: brim to 28 days, later never in the same line; FDA. */
export const ceftriaxoneLimit: CommonLimit = ({ request, rules, sources, age }, found) => {
  if (request.order.fluid.calcium === 0 || !request.child.flags.includes('ceftriaxone')) return;
  const isBrim = age.days <= rules.tonicity.ceftriaxoneDays;
  const text = isBrim
    ? `This fluid carries calcium; with ceftriaxone it is never given to ${rules.tonicity.ceftriaxoneDays} days of age.`
    : 'This fluid carries calcium: not by the same line as ceftriaxone.';
  const title = 'Calcium with ceftriaxone';
  found.push(
    broken(
      'calcium-ceftriaxone',
      isBrim ? 'brim' : 'caution',
      [title, text],
      sources.tonicity.ceftriaxoneDays,
    ),
  );
};
