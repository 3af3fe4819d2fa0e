import { above, formatNumber } from '../../rounding';
import { HOUR } from '../../time';
import type { CommonLimit } from '../facts';
import { broken, kept } from '../findings';
import type { Scene } from '../scene';
import { isPotassiumBag } from '../solutes';
import type { LimitFinding } from '../types';

/** Concentration by a peripheral line: brim above 40 mmol/L; MSF, NHS Highland. */
export const potassiumConcentrationLimit: CommonLimit = ({ request, rules, sources, peripheral }, found) => {
  const { potassium } = request.order.fluid;
  const most = rules.potassium.peripheralMost;
  if (!peripheral || !above(potassium, most)) return;
  const text = `${formatNumber(potassium, 1)} mmol/L of potassium is over the brim of ${most} mmol/L for this line.`;
  const more = { value: potassium, limit: most, unit: 'mmol/L' };
  found.push(
    broken(
      'potassium-concentration',
      'brim',
      ['Potassium too strong', text],
      sources.potassium.peripheralMost,
      more,
    ),
  );
};

/** Potassium withheld or asked about by the last blood result and, in newborns, age and urine; RCH. */
export const potassiumResultLimit: CommonLimit = (scene, found) => {
  const { request, rules } = scene;
  if (request.order.fluid.potassium === 0) return;
  if (!isPotassiumBag(request.order.fluid, rules.potassium.bagAbove)) {
    balancedFinding(scene, found);
    return;
  }
  newbornFinding(scene, found);
  serumFinding(scene, found);
};

function serumFinding({ request, rules, sources }: Scene, found: LimitFinding[]): void {
  const { serumBrim, serumSenior, resultHours } = rules.potassium;
  const source = sources.potassium.serumBrim;
  const last = request.results.potassium;
  const isFresh = last !== undefined && request.at - last.at <= resultHours * HOUR;
  const value = last?.value;
  const more = { value, limit: serumSenior, unit: 'mmol/L' };
  const says = `Last blood potassium ${value === undefined ? '' : formatNumber(value, 1)} mmol/L.`;
  if (value !== undefined && above(value, serumBrim)) {
    const text = `${says} No potassium is added above ${serumBrim}.`;
    found.push(
      broken('potassium-serum', 'brim', ['Potassium withheld', text], source, { ...more, limit: serumBrim }),
    );
  } else if (value !== undefined && above(value, serumSenior)) {
    found.push(
      broken(
        'potassium-serum',
        'senior',
        ['High potassium', `${says} Above ${serumSenior} a senior agrees.`],
        source,
        more,
      ),
    );
  } else if (isFresh) {
    found.push(kept('potassium-serum', 'caution', ['Potassium may be added', says], source, more));
  } else {
    const isRenal = request.child.flags.includes('renal');
    const text = `No blood potassium in the last ${resultHours} h${isRenal ? ', and the kidneys are flagged' : ''}.`;
    found.push(
      broken('potassium-unknown', isRenal ? 'senior' : 'caution', ['Potassium not known', text], source),
    );
  }
}

function newbornFinding({ age, request, rules, sources }: Scene, found: LimitFinding[]): void {
  if (!age.isNewborn) return;
  const { newbornHours } = rules.potassium;
  const isTooYoung = age.hours === undefined ? age.days < newbornHours / 24 : age.hours < newbornHours;
  const hasPassedUrine = request.results.urinePassedAt !== undefined;
  if (!isTooYoung && hasPassedUrine) return;
  const text = isTooYoung
    ? `No potassium before ${newbornHours} h of age.`
    : 'No potassium before urine has been passed and recorded.';
  found.push(
    broken('potassium-newborn', 'brim', ['Newborn: no potassium yet', text], sources.potassium.newbornHours),
  );
}

/** A balanced fluid's few mmol are not added potassium, yet a high result is said. */
function balancedFinding({ request, rules, sources }: Scene, found: LimitFinding[]): void {
  const last = request.results.potassium;
  if (last === undefined || !above(last.value, rules.potassium.serumSenior)) return;
  const text = `Last blood potassium ${formatNumber(last.value, 1)} mmol/L; this fluid carries ${formatNumber(request.order.fluid.potassium, 1)} mmol/L.`;
  found.push(
    broken('potassium-balanced', 'caution', ['High potassium', text], sources.potassium.serumSenior),
  );
}
