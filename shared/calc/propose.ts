import { atMost, formatNumber, largestVolume } from '../rounding';
import type { Rulebook } from '../rulebook/document';
import { KIND_MODULES } from './kinds';
import { doseVolume, proposedDose } from './kinds/bolus-figures';
import { bolusBrim } from './limits/bolus-dose';
import { newbornBand } from './newborn';
import { orderLifeHours } from './order-life';
import { isRefusal, refuse } from './scene';
import type { BeforeOrder, Refusal, Scene } from './scene';
import type { Fraction, Kind, MaintenanceMethod } from './types';
import { openScene } from './work-out';

export type MaintenanceProposal = {
  kind: 'maintenance';
  method: MaintenanceMethod;
  /** Absent where the amount is asked for: heart, kidney or liver disease without a plan on the chart. */
  fraction?: Fraction;
  /** Lower end of the band of these hours, mL/kg/24 h; newborn method only. */
  newbornMlPerKgPerDay?: number;
  hours: number;
  why: string;
};

export type BolusProposal = {
  kind: 'bolus';
  mlPerKg: number;
  /** Where the dose by weight would pass the brim: the brim, mL, to be ordered by volume. */
  volumeMl?: number;
  overMinutes: number;
  why: string;
};

export type Proposal = MaintenanceProposal | BolusProposal;

/** The program's proposals for an order of this kind; none passes a line by rounding, each can be overwritten. */
export function propose(kind: Kind, context: BeforeOrder, rulebook: Rulebook): Proposal | Refusal {
  const scene = openScene(context, rulebook, KIND_MODULES[kind]);
  if (isRefusal(scene)) return scene;
  return PROPOSERS[kind](scene);
}

const PROPOSERS: Record<Kind, (scene: Scene<BeforeOrder>) => Proposal | Refusal> = {
  maintenance: proposeMaintenance,
  bolus: proposeBolus,
};

function proposeMaintenance(scene: Scene<BeforeOrder>): MaintenanceProposal | Refusal {
  const { age, rules } = scene;
  const fraction = proposedFraction(scene);
  const base = { kind: 'maintenance' as const, hours: orderLifeHours(scene), ...fraction };
  if (!age.isNewborn) return { ...base, method: rules.maintenance.method };
  if (age.hours === undefined) {
    return refuse(
      'birth-time-needed',
      'Under 28 days the amount goes by hours since birth: record the time.',
      'bornAt',
    );
  }
  const band = newbornBand(age.hours, rules.newborn);
  return { ...base, method: 'newborn', newbornMlPerKgPerDay: band.low };
}

/** The plan on the chart first; with raised ADH two thirds; with heart, kidney or liver disease it is asked for. */
function proposedFraction({ request, rules }: Scene<BeforeOrder>): { fraction?: Fraction; why: string } {
  const { flags } = request.child;
  if (request.plan?.kind === 'fraction')
    return { fraction: request.plan.fraction, why: 'The fluid plan on the chart.' };
  if (flags.includes('cardiac') || flags.includes('renal') || flags.includes('hepatic')) {
    return { why: 'Heart, kidney or liver disease: say how much, there is no default.' };
  }
  if (flags.includes('raised-adh')) return { fraction: rules.fraction.raisedAdh, why: 'Raised ADH risk.' };
  return { fraction: 'full', why: '' };
}

function proposeBolus(scene: Scene<BeforeOrder>): BolusProposal {
  const mlPerKg = proposedDose(scene);
  const brim = bolusBrim(scene);
  const base = { kind: 'bolus' as const, mlPerKg, overMinutes: scene.rules.bolus.overMinutes };
  if (atMost(doseVolume(scene, mlPerKg), brim)) return { ...base, why: '' };
  const volumeMl = largestVolume(brim, scene.steps);
  return {
    ...base,
    volumeMl,
    why: `${mlPerKg} mL/kg would pass the brim of ${formatNumber(volumeMl, 1)} mL.`,
  };
}
