import { above, formatNumber, stepAt } from '../../rounding';
import type { MaintenanceLimit } from '../facts';
import { broken } from '../findings';
import { keepOpenRate } from './volume';

/** A typed rate against the worked-out one: senior past a step, brim past 1.5 times; newborns go by their band. Ours. */
export const aboveMethodLimit: MaintenanceLimit = (facts, found) => {
  const { scene, order, exact, workedOut, rate, differs } = facts;
  if (!differs || order.method === 'newborn' || !above(rate, keepOpenRate(facts))) return;
  const { aboveMethodSteps, aboveMethodTimes } = scene.rules.maintenance;
  if (!above(rate, exact + aboveMethodSteps * stepAt(exact, scene.steps))) return;
  const most = exact * aboveMethodTimes;
  const isBrim = above(rate, most);
  const typed = `${formatNumber(rate, 1)} mL/h`;
  const method = `the method gives ${formatNumber(exact, 2)} mL/h after fraction and other intake`;
  const text = isBrim
    ? `${typed} is more than ${aboveMethodTimes} times what is due: ${method}.`
    : `${typed} is above the method: ${method}.`;
  const value = formatNumber(workedOut, 1);
  found.push(
    broken(
      'above-method',
      isBrim ? 'brim' : 'senior',
      ['Above the method', text],
      scene.sources.maintenance.aboveMethodTimes,
      {
        value: rate,
        limit: isBrim ? most : exact,
        unit: 'mL/h',
        ...(workedOut > 0 ? { offer: { field: 'typedRate', value, label: `Set to ${value} mL/h` } } : {}),
      },
    ),
  );
};
