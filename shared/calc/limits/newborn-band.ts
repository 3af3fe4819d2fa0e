import { above, below, formatNumber, highestRate, pumpStep } from '../../rounding';
import { millilitresPerHour } from '../../units';
import type { MaintenanceFacts, MaintenanceLimit } from '../facts';
import { broken } from '../findings';
import { shareOf } from '../intake';
import { newbornBand } from '../newborn';
import type { NewbornBand } from '../newborn';

const CODE = 'newborn-band';

/** A newborn's amount against the band of its hours: outside senior, above 180 mL/kg/24 h brim; NICE NG29 1.4. */
export const newbornBandLimit: MaintenanceLimit = (facts, found) => {
  const { scene, order, differs } = facts;
  if (order.method !== 'newborn' || scene.age.hours === undefined) return;
  const band = newbornBand(scene.age.hours, scene.rules.newborn);
  const stated = order.newbornMlPerKgPerDay ?? band.low;
  const given = facts.totalMl / scene.request.weight.kg;
  const most = scene.rules.newborn.brim;
  const high = differs ? Math.max(stated, given) : stated;
  const low = differs ? given : stated * shareOf(order.fraction);
  if (above(high, most)) found.push(overBrim(facts, high, band));
  else if (isAbove(facts, stated, band)) found.push(outside(facts, 'above', high, band));
  else if (isBelow(facts, low, band)) found.push(outside(facts, 'below', low, band));
};

const isAbove = (facts: MaintenanceFacts, stated: number, band: NewbornBand): boolean =>
  above(stated, band.high) || (facts.differs && above(facts.rate, bandRate(facts, band.high)));

const isBelow = (facts: MaintenanceFacts, low: number, band: NewbornBand): boolean =>
  facts.differs ? below(facts.rate, bandRate(facts, band.low)) : below(low, band.low);

/** The pump rate of so many mL/kg/24 h less the other intake, mL/h. */
function bandRate({ scene, intake }: MaintenanceFacts, perKg: number): number {
  const left = Math.max(0, perKg * scene.request.weight.kg - intake);
  return pumpStep(millilitresPerHour(left / 24), scene.steps);
}

const range = (band: NewbornBand): string => `${band.low} to ${band.high} mL/kg/24 h`;

function outside(facts: MaintenanceFacts, side: 'above' | 'below', value: number, band: NewbornBand) {
  const { scene, order } = facts;
  // less than the band has its reasons, such as asphyxia or meningitis; more has none
  const hasReason = side === 'below' && Boolean(order.fractionReason?.trim());
  const text = `${formatNumber(value, 1)} mL/kg/24 h is ${side} the band of this age, ${range(band)}.`;
  return broken(
    CODE,
    hasReason ? 'caution' : 'senior',
    [`Newborn: ${side} the band`, text],
    scene.sources.newborn.day1Low,
    {
      value,
      limit: side === 'above' ? band.high : band.low,
      unit: 'mL/kg/24 h',
      ...(side === 'below' && !hasReason ? { reasonOwed: true, owes: 'fractionReason' as const } : {}),
    },
  );
}

function overBrim(facts: MaintenanceFacts, value: number, band: NewbornBand) {
  const { scene, order, workedOut } = facts;
  const most = scene.rules.newborn.brim;
  const rate = formatNumber(
    Math.min(workedOut, highestRate((most * scene.request.weight.kg - facts.intake) / 24, scene.steps)),
    1,
  );
  const isStated = order.newbornMlPerKgPerDay !== undefined && above(order.newbornMlPerKgPerDay, most);
  const offer = isStated
    ? { field: 'newbornMlPerKgPerDay', value: String(band.high), label: `Set to ${band.high} mL/kg/24 h` }
    : { field: 'typedRate', value: rate, label: `Set to ${rate} mL/h` };
  const text = `${formatNumber(value, 1)} mL/kg/24 h is over the brim of ${most}. This age usually has ${range(band)}.`;
  const more = { value, limit: most, unit: 'mL/kg/24 h', ...(offer.value === '0' ? {} : { offer }) };
  return broken('newborn-brim', 'brim', ['Newborn: over the brim', text], scene.sources.newborn.brim, more);
}
