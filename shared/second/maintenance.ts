import { civilDate } from '../time';
import { exact, lesser, minus, over, plus, positivePart, times, toNumber, whole, ZERO } from './exact';
import type { Exact } from './exact';
import { ceilingAgain, fullDay } from './full-day';
import type { MaintenanceAgain, RequestAgain, SecondFigures } from './request';
import type { Rule } from './rules';
import { inTheBag, onThePump } from './steps';

const DAY = whole(24);
const THOUSAND = whole(1000);

const SHARES: Record<MaintenanceAgain['fraction'], Exact> = {
  full: { n: 1n, d: 1n },
  'four-fifths': { n: 4n, d: 5n },
  'two-thirds': { n: 2n, d: 3n },
  half: { n: 1n, d: 2n },
};

/** Maintenance worked out again in exact fractions: rate and volume as ordered. */
export function maintenanceAgain(request: RequestAgain, order: MaintenanceAgain, rule: Rule): SecondFigures {
  const intake = plus(exact(order.feeds), exact(order.drugs));
  const left = positivePart(minus(times(fullDay(request, order, rule), SHARES[order.fraction]), intake));
  const room = minus(ceilingAgain(request.child.sex, rule), intake);
  const lines = [over(room, DAY), ...soluteLines(request, order, rule)];
  if (order.method === 'newborn') {
    const most = times(rule('newborn', 'brim'), exact(request.weight.kg));
    lines.push(over(minus(most, intake), DAY));
  }
  const rate =
    order.typedRate === undefined ? onThePump(over(left, DAY), lines, rule) : exact(order.typedRate);
  if (rate.n === 0n) return { ok: false, code: 'nothing-left' };
  const time = exact(order.hours);
  const volume = inTheBag(times(rate, time), [over(times(room, time), DAY)], rule);
  return { ok: true, rate: toNumber(rate), volume: toNumber(volume) };
}

/** The rates at which the order's fluid, with all others, meets the potassium and the glucose brim, mL/h. */
function soluteLines(request: RequestAgain, order: MaintenanceAgain, rule: Rule): Exact[] {
  const { running } = request.intake;
  const lines: Exact[] = [];
  const meets = (most: Exact, content: number, others: Exact) =>
    lines.push(over(times(minus(most, others), THOUSAND), exact(content)));
  if (order.fluid.potassium > 0) {
    const others = running.map(({ rate, fluid }) => times(exact(rate), exact(fluid.potassium)));
    meets(potassiumMost(request, rule), order.fluid.potassium, over(others.reduce(plus, ZERO), THOUSAND));
  }
  if (order.fluid.glucoseGPerL > 0 && !hasReached(request, rule('glucose', 'untilYears'))) {
    const others = running.map(({ rate, fluid }) => times(exact(rate), exact(fluid.glucoseGPerL)));
    const most = over(times(times(rule('glucose', 'brim'), exact(request.weight.kg)), whole(60)), THOUSAND);
    meets(most, order.fluid.glucoseGPerL, over(others.reduce(plus, ZERO), THOUSAND));
  }
  return lines;
}

function potassiumMost({ line, weight }: RequestAgain, rule: Rule): Exact {
  const where = line === 'central' ? 'central' : 'peripheral';
  const byWeight = times(rule('potassium', `${where}PerKg`), exact(weight.kg));
  return lesser(byWeight, rule('potassium', `${where}PerHour`));
}

/** Whether the birthday was reached: dates compare as text, and a 29 February that is not there sorts before 1 March. */
function hasReached({ at, zone, child }: RequestAgain, years: Exact): boolean {
  const birthday = `${Number(child.bornOn.slice(0, 4)) + toNumber(years)}${child.bornOn.slice(4)}`;
  return civilDate(at, zone) >= birthday;
}
