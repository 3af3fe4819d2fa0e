import { workOut } from '@shared/calc/work-out';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import type { MaintenanceOrder, WorkOutRequest } from '@shared/calc/types';
import { maintenance, request, USUAL_20, fluid } from '../calc/make-request';
import { interleave, perSecond, round, tell } from './interleave';

/** The same arithmetic by hand: bands, fraction, intake, ceiling, pump step, what it gives. No words, no limits. */
function flat({ weight, order, child }: WorkOutRequest): number {
  const { feeds, drugs, fluid: bag, hours } = order as MaintenanceOrder;
  const kg = weight.kg as number;
  const full = 100 * Math.min(kg, 10) + 50 * Math.min(Math.max(kg - 10, 0), 10) + 20 * Math.max(kg - 20, 0);
  const day = Math.max(
    0,
    Math.min(full, child.sex === 'male' ? 2500 : 2000) - (feeds as number) - (drugs as number),
  );
  const exact = day / 24;
  const step = exact < 100 ? 10 : 1;
  const rate = Math.round(exact * step) / step;
  const volume = Math.round(rate * (hours as number));
  const perKgDay = (rate * 24) / kg;
  const sodium = (perKgDay * (bag.sodium as number)) / 1000;
  const potassium = (perKgDay * (bag.potassium as number)) / 1000;
  const glucose = (rate * bag.glucoseGPerL) / (60 * kg);
  const energy = (perKgDay * bag.glucoseGPerL * 4) / 1000;
  return volume + perKgDay + sodium + potassium + glucose + energy + (rate / kg) * 24 + (100 * day) / full;
}

/** Whole maintenance work-outs a second (figures, workings, limits, gauge, read-back) against the flat arithmetic. */
export async function benchWorkOut(): Promise<void> {
  const requests = Array.from({ length: 64 }, (_, i) =>
    request({ kg: 4 + i * 0.7, order: maintenance({ fluid: fluid(USUAL_20) }) }),
  );
  let turn = 0;
  const next = () => requests[(turn = (turn + 1) & 63)]!;
  const { subject, baseline, ratio } = await interleave(
    9,
    () => perSecond(() => workOut(next(), DEFAULT_RULEBOOK)),
    () => perSecond(() => flat(next())),
  );
  tell(
    'maintenance work-out',
    `${round(subject)}/s, flat arithmetic ${round(baseline)}/s, ratio ${round(ratio)}`,
    '≥ 50 000/s',
  );
}
