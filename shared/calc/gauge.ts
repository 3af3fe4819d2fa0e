import { snap, volumeStep } from '../rounding';
import { millilitres } from '../units';
import type { MethodFigure } from './bands';
import type { MaintenanceFacts } from './facts';
import { takeFraction } from './intake';
import type { GaugeFigures } from './types';

/** The vessel of a maintenance order: bands of full maintenance, what is held back or comes otherwise, the ceiling. */
export function maintenanceGauge(facts: MaintenanceFacts, { bands, fullMl }: MethodFigure): GaugeFigures {
  const { order, scene, rate, ceiling } = facts;
  const asked = rate * 24;
  const withIntake = snap(asked + order.feeds + order.drugs);
  // a typed rate may use up some or all of what the fraction would hold back
  const byFraction = snap(fullMl - takeFraction(fullMl, order.fraction));
  const heldBack =
    order.typedRate === undefined ? byFraction : Math.min(byFraction, snap(fullMl - withIntake));
  const ghosts = [
    { label: 'held back', ml: heldBack },
    { label: 'as feeds', ml: order.feeds },
    { label: 'as drugs', ml: order.drugs },
  ];
  return {
    // the ceiling binds the order and the counted intake: past it the vessel shows what is judged
    orderMl: volumeStep(millilitres(withIntake > ceiling ? withIntake : asked), scene.steps),
    brimMl: ceiling,
    brimNote: 'in 24 h',
    bands,
    ghosts: ghosts.filter(({ ml }) => ml > 0),
  };
}
