import { formatNumber, snap } from '../rounding';
import { sumBands, sumLine } from './bands';
import type { MethodFigure } from './bands';
import { newbornFigure } from './newborn';
import { refuse } from './scene';
import type { Refusal, Scene } from './scene';
import { printed, step } from './step';
import type { MaintenanceOrder } from './types';

/** The 24 h figure of the order's method, mL; Holliday & Segar 1957, 4-2-1, WHO 2013 or NICE NG29 1.4. */
export function methodFigure(scene: Scene, order: MaintenanceOrder): MethodFigure | Refusal {
  const misfit = methodMisfit(scene, order);
  if (misfit) return misfit;
  switch (order.method) {
    case 'newborn':
      return newbornFigure(scene, order);
    case 'who':
      return whoFigure(scene, order);
    case 'bands-hourly':
      return hourlyFigure(scene);
    case 'bands-daily':
      return dailyFigure(scene);
  }
}

function methodMisfit({ age, rules }: Scene, order: MaintenanceOrder): Refusal | undefined {
  const isForNewborns = order.method === 'newborn';
  if (age.isNewborn && !isForNewborns) {
    const offer = { field: 'method', value: 'newborn', label: 'Use the newborn method' };
    return refuse(
      'method-not-for-age',
      'Under 28 days the amount goes by hours since birth.',
      'method',
      offer,
    );
  }
  if (!age.isNewborn && isForNewborns) {
    const { method } = rules.maintenance;
    const offer = { field: 'method', value: method, label: 'Use the weight bands' };
    return refuse('method-not-for-age', 'The newborn method ends at 28 days.', 'method', offer);
  }
  return undefined;
}

function dailyFigure({ request, rules, sources }: Scene): MethodFigure {
  const m = rules.maintenance;
  const figure = sumBands(request.weight.kg, {
    perKg: [m.firstMlPerKg, m.secondMlPerKg, m.restMlPerKg],
    edges: [m.firstBandKg, m.secondBandKg],
    unit: 'mL',
    source: sources.maintenance.firstMlPerKg,
  });
  figure.steps.push(sumLine('in full, 24 h', figure.bands, figure.fullMl, 'mL'));
  return figure;
}

function hourlyFigure({ request, rules, sources }: Scene): MethodFigure {
  const m = rules.maintenance;
  const hourly = sumBands(request.weight.kg, {
    perKg: [m.firstHourly, m.secondHourly, m.restHourly],
    edges: [m.firstBandKg, m.secondBandKg],
    unit: 'mL/h',
    source: sources.maintenance.firstHourly,
  });
  const fullMl = snap(hourly.fullMl * 24);
  const steps = [
    ...hourly.steps,
    sumLine('in full, each hour', hourly.bands, hourly.fullMl, 'mL/h'),
    step('in full, 24 h', `${printed(hourly.fullMl)} × 24`, [fullMl, 'mL'], '', 'sum'),
  ];
  const bands = hourly.bands.map(({ label, ml }) => ({ label, ml: snap(ml * 24), fullMl: snap(ml * 24) }));
  return { fullMl, bands, steps };
}

function whoFigure({ request, rules, sources }: Scene, order: MaintenanceOrder): MethodFigure | Refusal {
  const { who, maintenance } = rules;
  const heat = order.temperatureC;
  if (heat !== undefined && !(heat >= who.temperatureLeast && heat <= who.temperatureMost)) {
    const range = `${who.temperatureLeast} to ${who.temperatureMost}`;
    return refuse('temperature-range', `A temperature lies between ${range} °C.`, 'temperatureC');
  }
  const figure = sumBands(request.weight.kg, {
    perKg: [who.firstMlPerKg, who.secondMlPerKg, who.restMlPerKg],
    edges: [maintenance.firstBandKg, maintenance.secondBandKg],
    unit: 'mL',
    source: sources.who.restMlPerKg,
  });
  figure.steps.push(sumLine('in full, 24 h', figure.bands, figure.fullMl, 'mL'));
  const degrees = heat === undefined ? 0 : Math.max(0, snap(heat - who.feverFrom));
  return degrees === 0 ? figure : addFever(figure, degrees, who.feverPercent, sources.who.feverPercent);
}

function addFever(figure: MethodFigure, degrees: number, percent: number, source: string): MethodFigure {
  const factor = snap(1 + (degrees * percent) / 100);
  const fullMl = snap(figure.fullMl * factor);
  const label = `fever, ${formatNumber(degrees, 1)} °C above`;
  const more = snap(fullMl - figure.fullMl);
  return {
    fullMl,
    bands: [...figure.bands, { label: 'fever', ml: more, fullMl: more }],
    steps: [
      ...figure.steps,
      step(label, `${printed(figure.fullMl)} × ${printed(factor)}`, [fullMl, 'mL'], source, 'sum'),
    ],
  };
}
