import { formatNumber, pumpStep, roundVolumeUnder, snap } from '../../rounding';
import { flowOverMinutes, millilitres, millilitresPerKg, perKg } from '../../units';
import { bolusesOf24h } from '../boluses';
import type { BolusFacts } from '../facts';
import { circulatingPerKg } from '../gives';
import { isCareful } from '../limits/bolus-dose';
import { nextLine } from '../rate-line';
import type { BeforeOrder, Scene } from '../scene';
import { printed, step, YOUR_CHOICE } from '../step';
import type { BolusFigures, BolusOrder, Step } from '../types';

/** The dose the program proposes, mL/kg: 10, with heart, kidney or albumin trouble 5; NICE NG29 1.3. */
export function proposedDose({ request, rules, age }: Scene<BeforeOrder>): number {
  if (isCareful(request.child.flags)) return rules.bolus.carefulMlPerKg;
  return age.isNewborn ? rules.bolus.newbornMlPerKg : rules.bolus.childMlPerKg;
}

/** Every line one dose may meet, mL: its cautions, its brims, the totals of 24 h. */
function doseLines(scene: Scene<BeforeOrder>): number[] {
  const { carefulMlPerKg, cautionMlPerKg, brimMlPerKg, brimMl, totalSenior, totalAdvice } = scene.rules.bolus;
  const { kg } = scene.request.weight;
  const given = bolusesOf24h(scene);
  return [
    carefulMlPerKg * kg,
    cautionMlPerKg * kg,
    brimMlPerKg * kg,
    brimMl,
    totalSenior * kg - given,
    totalAdvice * kg - given,
  ];
}

/** A dose by weight at the volume step; rounding alone never carries it past a line, mL. */
export function doseVolume(scene: Scene<BeforeOrder>, dose: number): number {
  const exact = millilitres(snap(dose * scene.request.weight.kg));
  return roundVolumeUnder(exact, nextLine(exact, doseLines(scene)), scene.steps);
}

/** The volume, pace and totals of a bolus. */
export function bolusFigures(scene: Scene, order: BolusOrder): BolusFigures {
  const { kg } = scene.request.weight;
  const byWeight = order.dose.by === 'weight' ? order.dose.mlPerKg : proposedDose(scene);
  const workedOut = doseVolume(scene, byWeight);
  const volume = order.dose.by === 'volume' ? order.dose.volume : millilitres(workedOut);
  const facts = bolusFacts(scene, order, volume);
  const rate =
    order.route === 'pump' ? pumpStep(flowOverMinutes(volume, order.over), scene.steps) : undefined;
  return {
    kind: 'bolus',
    volume,
    workedOutVolume: millilitres(workedOut),
    mlPerKg: perKg(volume, kg),
    over: order.over,
    ...(rate === undefined ? {} : { rate }),
    percentOfCirculating: (facts.perKg / circulatingPerKg(facts)) * 100,
    totalMlPerKg24h: millilitresPerKg(facts.totalPerKg),
  };
}

/** What the limits look at. */
export function bolusFacts(scene: Scene, order: BolusOrder, volume: number): BolusFacts {
  const { kg } = scene.request.weight;
  return { scene, order, volume, perKg: volume / kg, totalPerKg: (volume + bolusesOf24h(scene)) / kg };
}

/** The workings of a bolus. */
export function bolusSteps(scene: Scene, order: BolusOrder, figures: BolusFigures): Step[] {
  const { kg } = scene.request.weight;
  const steps: Step[] = [];
  if (order.dose.by === 'weight') {
    const exact = snap(order.dose.mlPerKg * kg);
    steps.push(step('dose', `${printed(kg)} × ${printed(order.dose.mlPerKg)}`, [exact, 'mL'], YOUR_CHOICE));
    const isLowered = figures.volume < exact ? 'rounded down' : 'nearest step';
    if (exact !== figures.volume)
      steps.push(step('volume', isLowered, [figures.volume, 'mL'], 'volume step'));
  } else {
    steps.push(step('volume', 'typed', [figures.volume, 'mL'], YOUR_CHOICE));
  }
  steps.push(
    step('by weight', `${printed(figures.volume)} ÷ ${printed(kg)}`, [figures.mlPerKg, 'mL/kg'], ''),
  );
  if (figures.rate !== undefined) {
    const exact = (figures.volume * 60) / order.over;
    steps.push(
      step('per hour', `${printed(figures.volume)} × 60 ÷ ${printed(order.over)}`, [exact, 'mL/h'], ''),
    );
    steps.push(step('on the pump', 'nearest step', [figures.rate, 'mL/h'], 'pump step'));
  }
  const over = `over ${formatNumber(order.over, 1)} min`;
  return [
    ...steps,
    step('this bolus', over, [figures.volume, 'mL'], scene.sources.bolus.childMlPerKg, 'answer'),
  ];
}
