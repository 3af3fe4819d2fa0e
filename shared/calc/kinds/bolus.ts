import type { SectionName } from '../../rulebook/read';
import type { BolusFacts, BolusLimit, CommonLimit } from '../facts';
import { deferSeniors, kept } from '../findings';
import { bolusGives } from '../gives';
import { bolusBrim, bolusCautionLimit, bolusDoseLimit, bolusTotalLimit } from '../limits/bolus-dose';
import { bolusFluidLimit, bolusPaceLimit } from '../limits/bolus-fluid';
import { ceftriaxoneLimit } from '../limits/ceftriaxone';
import { fluidListLimit } from '../limits/fluid-list';
import { potassiumConcentrationLimit, potassiumResultLimit } from '../limits/potassium';
import { weightAgeLimit } from '../limits/weight-age';
import { bolusBrims } from '../other-brims';
import { readBackBolus } from '../read-back';
import { refuse } from '../scene';
import type { Refusal, Scene } from '../scene';
import type { BolusOrder, LimitFinding, WorkOut } from '../types';
import { CALC_VERSION } from '../version';
import { bolusFacts, bolusFigures, bolusSteps } from './bolus-figures';

export const BOLUS_NEEDS: readonly SectionName[] = [
  'scope',
  'maintenance',
  'bolus',
  'circulating',
  'tonicity',
  'potassium',
  'pump',
  'weight',
];

const OWN: readonly BolusLimit[] = [
  bolusDoseLimit,
  bolusCautionLimit,
  bolusTotalLimit,
  bolusFluidLimit,
  bolusPaceLimit,
];

/** Rescue doses are outside the rate and osmolarity rows; concentration and blood potassium stay. */
const COMMON: readonly CommonLimit[] = [
  weightAgeLimit,
  potassiumConcentrationLimit,
  potassiumResultLimit,
  fluidListLimit,
  ceftriaxoneLimit,
];

/** A bolus for shock: dose, volume, pace, totals; NICE NG29 1.3. */
export function workOutBolus(scene: Scene, order: BolusOrder): WorkOut {
  const wrong = wrongKind(scene);
  if (wrong) return wrong;
  const figures = bolusFigures(scene, order);
  if (figures.volume === 0)
    return refuse('nothing-left', 'A bolus holds more than nothing.', doseField(order));
  const facts = bolusFacts(scene, order, figures.volume);
  return {
    ok: true,
    figures,
    steps: bolusSteps(scene, order, figures),
    gives: bolusGives(facts),
    limits: bolusLimits(facts),
    otherBrims: bolusBrims(facts),
    gauge: {
      orderMl: figures.volume,
      brimMl: bolusBrim(scene),
      brimNote: 'in one bolus',
      bands: [],
      ghosts: [],
    },
    readBack: readBackBolus(scene.request, figures),
    calc: CALC_VERSION,
    rulebook: scene.rulebook,
  };
}

const doseField = (order: BolusOrder): string => (order.dose.by === 'weight' ? 'mlPerKg' : 'volumeMl');

/** Children whose shock has a kind of its own. */
function wrongKind({ request }: Scene): Refusal | undefined {
  const { flags } = request.child;
  if (flags.includes('dka')) {
    return refuse(
      'wrong-kind',
      'Diabetic ketoacidosis is flagged: its fluids are a kind of their own, not this bolus.',
      'kind',
    );
  }
  if (flags.includes('severe-malnutrition')) {
    const detail =
      'Severe malnutrition is flagged: shock fluids there are a kind of their own, slower and smaller.';
    return refuse('wrong-kind', detail, 'kind');
  }
  return undefined;
}

function bolusLimits(facts: BolusFacts): LimitFinding[] {
  const found: LimitFinding[] = [];
  for (const limit of OWN) limit(facts, found);
  for (const limit of COMMON) limit(facts.scene, found);
  const text =
    'Look again after each: pulse, refill, breathing, liver edge. Bleeding: major haemorrhage pathway, not crystalloid.';
  found.push(kept('look-again', 'information', ['Look again', text], facts.scene.sources.bolus.childMlPerKg));
  return deferSeniors(found);
}
