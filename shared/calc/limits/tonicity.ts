import { above, below, formatNumber } from '../../rounding';
import { HOUR } from '../../time';
import type { MaintenanceLimit } from '../facts';
import { broken } from '../findings';
import type { Scene } from '../scene';
import type { LimitFinding } from '../types';

/** Sodium of a maintenance fluid by age; NICE NG29 1.4, CPS 2013, NPSA 2007/22. */
export const tonicityLimit: MaintenanceLimit = ({ scene, order }, found) => {
  const { rules, sources, age } = scene;
  const { sodium } = order.fluid;
  const most = rules.tonicity.hypertonicAbove;
  if (above(sodium, most)) {
    const text = `${formatNumber(sodium, 0)} mmol/L of sodium is hypertonic: more than ${most}.`;
    const more = { value: sodium, limit: most, unit: 'mmol/L' };
    found.push(
      broken('hypertonic', 'brim', ['Hypertonic fluid', text], sources.tonicity.hypertonicAbove, more),
    );
  } else if (age.days < rules.tonicity.isotonicFromDays) {
    newbornFluid(scene, found);
  } else if (below(sodium, rules.tonicity.isotonicFrom)) {
    found.push(age.isNewborn ? hypotonicNewborn(scene) : hypotonicChild(scene));
  }
};

/** Usual in the first days: glucose 10% without sodium, then with a little; anything else is a caution. */
function newbornFluid({ age, rules, request, sources }: Scene, found: LimitFinding[]): void {
  const { noSodiumHours, newbornSodiumLow, newbornSodiumHigh } = rules.tonicity;
  const { sodium, glucoseGPerL } = request.order.fluid;
  const isEarly = (age.hours ?? age.days * 24) < noSodiumHours;
  const isUsualSodium = isEarly ? sodium === 0 : sodium >= newbornSodiumLow && sodium <= newbornSodiumHigh;
  if (isUsualSodium && glucoseGPerL === 100) return;
  const usual = isEarly
    ? `Before ${noSodiumHours} h glucose 10% without sodium is usual.`
    : `To ${rules.tonicity.isotonicFromDays} days glucose 10% with sodium ${newbornSodiumLow} to ${newbornSodiumHigh} mmol/L is usual.`;
  found.push(
    broken(
      'newborn-fluid',
      'caution',
      ['Not the usual fluid of this age', usual],
      sources.tonicity.noSodiumHours,
    ),
  );
}

const moreOf = ({ request, rules }: Scene) => ({
  value: request.order.fluid.sodium as number,
  limit: rules.tonicity.isotonicFrom,
  unit: 'mmol/L',
});

const says = ({ request }: Scene): string =>
  `The fluid carries ${formatNumber(request.order.fluid.sodium, 0)} mmol/L of sodium`;

function hypotonicNewborn(scene: Scene): LimitFinding {
  const text = `${says(scene)}, less than ${scene.rules.tonicity.isotonicFrom}. From ${scene.rules.tonicity.isotonicFromDays} days isotonic fluid is usual.`;
  return broken(
    'hypotonic',
    'caution',
    ['Hypotonic fluid', text],
    scene.sources.tonicity.isotonicFrom,
    moreOf(scene),
  );
}

function hypotonicChild(scene: Scene): LimitFinding {
  const { leastSodium } = scene.rules.tonicity;
  if (below(scene.request.order.fluid.sodium, leastSodium)) {
    const text = `${says(scene)}. Less than ${leastSodium} belongs to specialist areas.`;
    const more = { ...moreOf(scene), limit: leastSodium };
    return broken('hypotonic', 'brim', ['Hypotonic fluid', text], scene.sources.tonicity.leastSodium, more);
  }
  const why = hypotonicDanger(scene);
  const text = why === undefined ? `${says(scene)}: a senior agrees.` : `${says(scene)}, and ${why}.`;
  const strength = why === undefined ? 'senior' : 'brim';
  return broken(
    'hypotonic',
    strength,
    ['Hypotonic fluid', text],
    scene.sources.tonicity.hypotonicSodium,
    moreOf(scene),
  );
}

/** Why a hypotonic fluid is past the brim for this child; absent where a senior may agree. */
function hypotonicDanger({ request, rules }: Scene): string | undefined {
  const { sodiumFreshHours, hypotonicSodium } = rules.tonicity;
  const last = request.results.sodium;
  const { flags } = request.child;
  if (flags.includes('raised-adh')) return 'ADH may be raised';
  if (flags.includes('raised-icp')) return 'pressure in the head may be raised';
  if (last === undefined) return 'no blood sodium is known';
  if (request.at - last.at > sodiumFreshHours * HOUR)
    return `the last blood sodium is older than ${sodiumFreshHours} h`;
  if (below(last.value, hypotonicSodium)) {
    return `the last blood sodium is ${formatNumber(last.value, 0)}, below ${hypotonicSodium} mmol/L`;
  }
  return undefined;
}
