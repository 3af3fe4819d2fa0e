import type { SectionName } from '../../rulebook/read';
import { holdAtCeiling } from '../ceiling';
import type { CommonLimit, MaintenanceFacts, MaintenanceLimit } from '../facts';
import { kept } from '../findings';
import { maintenanceGauge } from '../gauge';
import { maintenanceGives } from '../gives';
import { leftForTheLine } from '../intake';
import { aboveMethodLimit } from '../limits/above-method';
import { raisedAdhLimit, restrictedLimit } from '../limits/adh';
import { bloodSodiumLimit } from '../limits/blood-sodium';
import { ceftriaxoneLimit } from '../limits/ceftriaxone';
import { fluidListLimit } from '../limits/fluid-list';
import { glucosePresenceLimit, glucoseRateLimit, glucoseStrengthLimit } from '../limits/glucose';
import { hoursLimit } from '../limits/hours';
import { newbornBandLimit } from '../limits/newborn-band';
import { osmolarityLimit } from '../limits/osmolarity';
import { otherKindLimit } from '../limits/other-kind';
import { planLimit } from '../limits/plan';
import { potassiumConcentrationLimit, potassiumResultLimit } from '../limits/potassium';
import { potassiumRateLimit } from '../limits/potassium-rate';
import { tonicityLimit } from '../limits/tonicity';
import { allFluidsLimit } from '../limits/totals';
import { ceilingLimit } from '../limits/volume';
import { weightAgeLimit } from '../limits/weight-age';
import { methodFigure } from '../method';
import { maintenanceBrims } from '../other-brims';
import { readBackMaintenance } from '../read-back';
import { isRefusal, refuse } from '../scene';
import type { Scene } from '../scene';
import type { LimitFinding, MaintenanceOrder, WorkOut } from '../types';
import { CALC_VERSION } from '../version';
import { maintenanceFacts, pumpFigures, pumpSteps } from './maintenance-figures';

export const MAINTENANCE_NEEDS: readonly SectionName[] = [
  'scope',
  'maintenance',
  'who',
  'newborn',
  'fraction',
  'tonicity',
  'potassium',
  'glucose',
  'osmolarity',
  'pump',
  'weight',
  'bolus',
];

const OWN: readonly MaintenanceLimit[] = [
  ceilingLimit,
  aboveMethodLimit,
  newbornBandLimit,
  raisedAdhLimit,
  restrictedLimit,
  planLimit,
  allFluidsLimit,
  hoursLimit,
  tonicityLimit,
  bloodSodiumLimit,
  potassiumRateLimit,
  glucoseRateLimit,
  glucosePresenceLimit,
  otherKindLimit,
];

const COMMON: readonly CommonLimit[] = [
  weightAgeLimit,
  potassiumConcentrationLimit,
  potassiumResultLimit,
  glucoseStrengthLimit,
  osmolarityLimit,
  fluidListLimit,
  ceftriaxoneLimit,
];

/** Method, fever, ceiling, fraction, other intake, ÷ 24, pump step: in this order, every line shown. */
export function workOutMaintenance(scene: Scene, order: MaintenanceOrder): WorkOut {
  const method = methodFigure(scene, order);
  if (isRefusal(method)) return method;
  const full = holdAtCeiling(scene, method);
  const left = leftForTheLine(full.fullMl, order);
  const figures = pumpFigures(scene, order, full.fullMl, left.ml);
  if (figures.rate === 0) {
    return refuse(
      'nothing-left',
      'Feeds and drug volumes already cover the whole amount: nothing is left for the line.',
      'feedsMl',
    );
  }
  const facts = maintenanceFacts(scene, order, figures);
  return {
    ok: true,
    figures,
    steps: [...full.steps, ...left.steps, ...pumpSteps(scene, order, figures)],
    gives: maintenanceGives(facts),
    limits: maintenanceLimits(facts),
    otherBrims: maintenanceBrims(facts),
    gauge: maintenanceGauge(facts, full),
    readBack: readBackMaintenance(scene.request, figures),
    calc: CALC_VERSION,
    rulebook: scene.rulebook,
  };
}

function maintenanceLimits(facts: MaintenanceFacts): LimitFinding[] {
  const found: LimitFinding[] = [];
  for (const limit of OWN) limit(facts, found);
  for (const limit of COMMON) limit(facts.scene, found);
  found.push(
    kept(
      'not-a-feed',
      'information',
      ['Not a feed', 'Glucose alone does not feed a child.'],
      'common practice',
    ),
  );
  return found;
}
