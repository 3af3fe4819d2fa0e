import { exact, minus, over, plus, times, toNumber, whole, ZERO } from './exact';
import type { Exact } from './exact';
import type { BolusAgain, RequestAgain, SecondFigures } from './request';
import type { Rule } from './rules';
import { inTheBag, onThePump } from './steps';

const HOUR_MS = 3_600_000;
const LINES_PER_KG = ['carefulMlPerKg', 'cautionMlPerKg', 'brimMlPerKg'];
const TOTALS_PER_KG = ['totalSenior', 'totalAdvice'];

/** A bolus worked out again in exact fractions: volume as ordered, and the pump's rate. */
export function bolusAgain(request: RequestAgain, order: BolusAgain, rule: Rule): SecondFigures {
  const volume =
    order.dose.by === 'volume'
      ? exact(order.dose.volume)
      : byWeight(request, exact(order.dose.mlPerKg), rule);
  if (volume.n === 0n) return { ok: false, code: 'nothing-left' };
  if (order.route !== 'pump') return { ok: true, volume: toNumber(volume) };
  const rate = onThePump(over(times(volume, whole(60)), exact(order.over)), [], rule);
  return { ok: true, rate: toNumber(rate), volume: toNumber(volume) };
}

function byWeight(request: RequestAgain, dose: Exact, rule: Rule): Exact {
  const weight = exact(request.weight.kg);
  const since = request.at - toNumber(rule('bolus', 'totalHours')) * HOUR_MS;
  const counted = request.intake.bolusesLast24h.filter(({ at }) => at > since);
  const given = counted.map(({ ml }) => exact(ml)).reduce(plus, ZERO);
  const lines = [
    rule('bolus', 'brimMl'),
    ...LINES_PER_KG.map((entry) => times(rule('bolus', entry), weight)),
    ...TOTALS_PER_KG.map((entry) => minus(times(rule('bolus', entry), weight), given)),
  ];
  return inTheBag(times(dose, weight), lines, rule);
}
