import { exact, lesser, minus, over, plus, positivePart, times, whole } from './exact';
import type { Exact } from './exact';
import type { MaintenanceAgain, RequestAgain } from './request';
import type { Rule } from './rules';

const HOUR_MS = 3_600_000;

/**
 * Bands in closed form: a·w − (a−b)·(w−10)⁺ − (b−c)·(w−20)⁺, with the default numbers
 * 100w − 50·(w−10)⁺ − 30·(w−20)⁺; Holliday & Segar 1957.
 */
export function closedForm(weight: Exact, [a, b, c]: [Exact, Exact, Exact], rule: Rule): Exact {
  const firstEdge = rule('maintenance', 'firstBandKg');
  const secondEdge = plus(firstEdge, rule('maintenance', 'secondBandKg'));
  const beyond = (edge: Exact) => positivePart(minus(weight, edge));
  const fallen = plus(times(minus(a, b), beyond(firstEdge)), times(minus(b, c), beyond(secondEdge)));
  return minus(times(a, weight), fallen);
}

export function dailyBands(weight: Exact, rule: Rule): Exact {
  const perKg = ['firstMlPerKg', 'secondMlPerKg', 'restMlPerKg'].map((entry) => rule('maintenance', entry));
  return closedForm(weight, perKg as [Exact, Exact, Exact], rule);
}

export function hourlyBands(weight: Exact, rule: Rule): Exact {
  const perKg = ['firstHourly', 'secondHourly', 'restHourly'].map((entry) => rule('maintenance', entry));
  return times(whole(24), closedForm(weight, perKg as [Exact, Exact, Exact], rule));
}

function whoBands(weight: Exact, order: MaintenanceAgain, rule: Rule): Exact {
  const perKg = ['firstMlPerKg', 'secondMlPerKg', 'restMlPerKg'].map((entry) => rule('who', entry));
  const well = closedForm(weight, perKg as [Exact, Exact, Exact], rule);
  if (order.temperatureC === undefined) return well;
  const heat = positivePart(minus(exact(order.temperatureC), rule('who', 'feverFrom')));
  return over(times(well, plus(whole(100), times(heat, rule('who', 'feverPercent')))), whole(100));
}

function newbornDay({ at, child, weight }: RequestAgain, order: MaintenanceAgain, rule: Rule): Exact {
  const stated = order.newbornMlPerKgPerDay;
  if (stated !== undefined) return times(exact(weight.kg), exact(stated));
  const day = Math.min(5, 1 + Math.floor((at - (child.bornAt ?? NaN)) / (24 * HOUR_MS)));
  return times(exact(weight.kg), rule('newborn', `day${day}Low`));
}

/** The most of 24 h for the child's sex, mL; not recorded: the lower. */
export function ceilingAgain(sex: RequestAgain['child']['sex'], rule: Rule): Exact {
  const [boys, girls] = [rule('maintenance', 'ceilingBoys'), rule('maintenance', 'ceilingGirls')];
  if (sex === undefined) return lesser(boys, girls);
  return sex === 'male' ? boys : girls;
}

/** Full maintenance of 24 h under its ceiling, mL. */
export function fullDay(request: RequestAgain, order: MaintenanceAgain, rule: Rule): Exact {
  const weight = exact(request.weight.kg);
  const methods = {
    'bands-daily': () => dailyBands(weight, rule),
    'bands-hourly': () => hourlyBands(weight, rule),
    who: () => whoBands(weight, order, rule),
    newborn: () => newbornDay(request, order, rule),
  };
  return lesser(methods[order.method](), ceilingAgain(request.child.sex, rule));
}
