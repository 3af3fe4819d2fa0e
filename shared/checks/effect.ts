import type { FluidComposition } from '../calc/types';
import { formatNumber, snap } from '../rounding';

type MaintenanceSide = { rate: number; hours: number; fluid: FluidComposition; kg: number };
type BolusSide = { volume: number; over: number; kg: number };

const moreOrLess = (difference: number): 'more' | 'less' => (difference > 0 ? 'more' : 'less');

/** One difference in words, or nothing when it prints as 0. */
function part(difference: number, decimals: number, unit: string): string[] {
  const text = formatNumber(Math.abs(difference), decimals);
  return Number(text) === 0 ? [] : [`${text} ${unit} ${moreOrLess(difference)}`];
}

/** What the checker's figures would have done to the child against the ordered ones, in a sentence. */
export function effectOfMaintenance(author: MaintenanceSide, checker: MaintenanceSide | undefined): string {
  if (checker === undefined) return 'The shelf has no such bag, so nothing can be said of its effect.';
  const day = (side: MaintenanceSide) => side.rate * 24;
  const perDay = (of: (fluid: FluidComposition) => number) =>
    snap((of(checker.fluid) * day(checker) - of(author.fluid) * day(author)) / 1000);
  const parts = [
    ...part(snap(day(checker) - day(author)), 0, 'mL'),
    ...part(
      perDay((fluid) => fluid.potassium),
      1,
      'mmol of potassium',
    ),
    ...part(
      perDay((fluid) => fluid.sodium),
      0,
      'mmol of sodium',
    ),
    ...part(
      perDay((fluid) => fluid.glucoseGPerL),
      0,
      'g of glucose',
    ),
  ];
  if (parts.length > 0) return `At the checker’s figures the child would get, in 24 h, ${listed(parts)}.`;
  const longer = snap(checker.hours - author.hours);
  if (longer !== 0) {
    const word = longer > 0 ? 'longer' : 'shorter';
    return `At the checker’s figures the rate is the same and the order would run ${formatNumber(Math.abs(longer), 1)} h ${word}.`;
  }
  return 'What goes on the pump would be the same.';
}

/** The same of a bolus. */
export function effectOfBolus(author: BolusSide, checker: BolusSide): string {
  const volume = part(snap(checker.volume - author.volume), 1, 'mL');
  const perKg = snap(checker.volume / checker.kg - author.volume / author.kg);
  const sentences = [
    ...volume.map(
      (words) =>
        `At the checker’s figures the child would get ${words} (${formatNumber(Math.abs(perKg), 1)} mL/kg apart).`,
    ),
    ...part(snap(checker.over - author.over), 0, 'min').map((words) => `It would take ${words}.`),
  ];
  return sentences.length > 0 ? sentences.join(' ') : 'The child would get the same volume in the same time.';
}

const listed = (parts: string[]): string =>
  parts.length < 2 ? parts.join('') : `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)}`;
