import { formatNumber } from '../../rounding';
import type { CommonLimit } from '../facts';
import { broken } from '../findings';
import { hoursSinceWeighed, isMeasured, isWeightOld, weightFreshHours } from '../order-life';

const inWords = (hours: number): string =>
  hours < 72 ? `${formatNumber(hours, 0)} h` : `${formatNumber(Math.floor(hours / 24), 0)} days`;

/** An old last weight is senior, an estimated one a caution; common practice. */
export const weightAgeLimit: CommonLimit = (scene, found) => {
  if (!isMeasured(scene.request.weight.method)) {
    const text =
      'The dosing weight is not measured: the order lives half as long. Weigh as soon as possible.';
    found.push(
      broken('weight-estimated', 'caution', ['Estimated weight', text], scene.sources.weight.lifeDivisor),
    );
  }
  if (!isWeightOld(scene)) return;
  const hours = hoursSinceWeighed(scene);
  const most = weightFreshHours(scene);
  const last = hours === undefined ? 'No measured weight yet.' : `Last weighed ${inWords(hours)} ago.`;
  const text = `${last} A weight counts as fresh for ${inWords(most)}.`;
  const more = { limit: most, unit: 'h', ...(hours === undefined ? {} : { value: hours }) };
  found.push(broken('weight-old', 'senior', ['Old weight', text], scene.sources.weight.freshDays, more));
};
