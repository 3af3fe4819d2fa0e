import { snap, volumeStep } from '../rounding';
import { millilitres } from '../units';
import type { MethodFigure } from './bands';
import type { MaintenanceFacts } from './facts';
import { takeFraction } from './intake';
import type { GaugeFigures } from './types';

/** The vessel of a maintenance order: bands of full maintenance, what is held back or comes otherwise, the ceiling. */
export function maintenanceGauge(facts: MaintenanceFacts, { bands, fullMl }: MethodFigure): GaugeFigures {
  const { order, scene, rate, ceiling } = facts;
  const heldBack = snap(fullMl - takeFraction(fullMl, order.fraction));
  const ghosts = [
    { label: 'held back', ml: heldBack },
    { label: 'as feeds', ml: order.feeds },
    { label: 'as drugs', ml: order.drugs },
  ];
  return {
    orderMl: volumeStep(millilitres(rate * 24), scene.steps),
    brimMl: ceiling,
    brimNote: 'in 24 h',
    bands,
    ghosts: ghosts.filter(({ ml }) => ml > 0),
  };
}
