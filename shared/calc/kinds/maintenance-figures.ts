import { formatNumber, pumpStep, roundRateUnder, roundVolumeUnder, snap, stepAt } from '../../rounding';
import { flowOver, hours, millilitres, volumeIn } from '../../units';
import { ceilingOf } from '../ceiling';
import type { MaintenanceFacts } from '../facts';
import { nextLine, soluteLines } from '../rate-line';
import { countedIntake } from '../scene';
import type { Scene } from '../scene';
import { printed, PUMP_STEP, step, YOUR_CHOICE } from '../step';
import type { MaintenanceFigures, MaintenanceOrder, Step } from '../types';

const DAY = hours(24);

/** The brims of 24 h that a rate may meet, mL/h. */
function rateBrims(scene: Scene, order: MaintenanceOrder): number[] {
  const room = (most: number) => (most - countedIntake(order)) / 24;
  const lines = [room(ceilingOf(scene)), ...soluteLines(scene, order.fluid)];
  if (order.method === 'newborn') lines.push(room(scene.rules.newborn.brim * scene.request.weight.kg));
  return lines;
}

/** From the volume left for the line to the pump: rates in mL/h, volumes in mL. */
export function pumpFigures(
  scene: Scene,
  order: MaintenanceOrder,
  fullMl: number,
  dayMl: number,
): MaintenanceFigures {
  const exact = flowOver(millilitres(dayMl), DAY);
  const workedOut = roundRateUnder(exact, nextLine(exact, rateBrims(scene, order)), scene.steps);
  const rate = order.typedRate ?? workedOut;
  const room = (ceilingOf(scene) - countedIntake(order)) * (order.hours / 24);
  return {
    kind: 'maintenance',
    fullMl: millilitres(fullMl),
    dayMl: millilitres(dayMl),
    perHourExact: exact,
    rate,
    workedOutRate: workedOut,
    hours: order.hours,
    volume: roundVolumeUnder(volumeIn(rate, order.hours), room, scene.steps),
  };
}

/** The lines of the workings from the day's volume to the pump. */
export function pumpSteps(scene: Scene, order: MaintenanceOrder, figures: MaintenanceFigures): Step[] {
  const { dayMl, perHourExact, workedOutRate } = figures;
  const unit = stepAt(perHourExact, scene.steps);
  const isLowered = workedOutRate !== pumpStep(perHourExact, scene.steps);
  const nearest = isLowered
    ? 'one step down, rounding up would pass a brim'
    : `nearest ${formatNumber(unit, 2)}`;
  const perHour = step('per hour', `${printed(dayMl)} ÷ 24`, [perHourExact, 'mL/h'], '');
  if (order.typedRate === undefined) {
    return [perHour, step('on the pump', nearest, [workedOutRate, 'mL/h'], PUMP_STEP, 'answer')];
  }
  return [
    perHour,
    step('worked out', nearest, [workedOutRate, 'mL/h'], PUMP_STEP),
    step('on the pump', 'typed', [order.typedRate, 'mL/h'], YOUR_CHOICE, 'answer'),
  ];
}

/** What the limits look at. */
export function maintenanceFacts(
  scene: Scene,
  order: MaintenanceOrder,
  figures: MaintenanceFigures,
): MaintenanceFacts {
  const intake = countedIntake(order);
  return {
    scene,
    order,
    fullMl: figures.fullMl,
    exact: figures.perHourExact,
    workedOut: figures.workedOutRate,
    rate: figures.rate,
    intake,
    totalMl: snap(figures.rate * 24 + intake),
    ceiling: ceilingOf(scene),
    differs: figures.rate !== figures.workedOutRate,
  };
}
