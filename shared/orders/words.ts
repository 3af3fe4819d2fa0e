import type { Fraction, Kind } from '../calc/types';
import { formatNumber } from '../rounding';
import { formatDuration } from '../time';
import type { OrderContent } from './content';

export const KIND_WORDS: Readonly<Record<Kind, string>> = { maintenance: 'Maintenance', bolus: 'Bolus' };

export const FRACTION_WORDS: Readonly<Record<Fraction, string>> = {
  full: 'in full',
  'four-fifths': 'four fifths',
  'two-thirds': 'two thirds',
  half: 'half',
};

/** Title of an order as lists have it: "Maintenance, two thirds", "Bolus, 10 mL/kg". */
export function titleOf({ inputs, figures }: Pick<OrderContent, 'inputs' | 'figures'>): string {
  if (inputs.kind === 'maintenance') {
    return inputs.typedRate === null
      ? `Maintenance, ${FRACTION_WORDS[inputs.fraction]}`
      : 'Maintenance, rate typed';
  }
  return figures.mlPerKg === null ? 'Bolus' : `Bolus, ${formatNumber(Number(figures.mlPerKg), 1)}\u00a0mL/kg`;
}

/** How long a version has waited for its check: "waits 38 min"; "late by 5 min" from its due time on. */
export function waitingWords(signedAt: number, dueAt: number | null, now: number): string {
  if (dueAt !== null && now > dueAt) return `late by ${formatDuration(now - dueAt)}`;
  return `waits ${formatDuration(Math.max(0, now - signedAt))}`;
}

/** What the author is told when limits stop the signing: each one's own sentence. */
export const limitSentences = (limits: readonly { text: string }[]): string =>
  limits.map(({ text }) => text).join(' ');
