import { isByPump } from '@shared/bedside/compare-pump';
import { readDecimal } from '@shared/decimal-input';
import type { OrderContent } from '@shared/orders/content';
import { formatNumber } from '@shared/rounding';
import {
  BEDSIDE_STEPS,
  type BedsideEntries,
  type BedsidePage,
  type BedsideStep,
} from '@shared/routes/bedside';
import { formatDuration, formatTime, HOUR, parseInstant } from '@shared/time';
import { agrees, type Verdicts } from './bedside-work';

export const STEP_WORDS: Readonly<Record<BedsideStep, { title: string; how: string }>> = {
  child: { title: 'Child', how: 'two identifiers' },
  bag: { title: 'Bag', how: 'read what is printed' },
  pump: { title: 'Pump', how: 'type what it shows' },
  line: { title: 'Line', how: 'trace it by hand' },
};
export const BY_HAND = { title: 'By hand', how: 'type what is drawn up' };

const COUNTS = ['None', 'One', 'Two', 'Three', 'Four'] as const;

/** "1056 mL over 24 h. This bag, 500 mL, lasts 11 h 22 min." */
export function lastingWords(content: OrderContent, bagSize: string): string {
  const rate = Number(content.figures.rateMlPerH ?? 0);
  const size = readDecimal(bagSize, { decimals: 0, min: 1 });
  if (rate === 0 || !size.ok) return '';
  return ` This bag, ${size.value}\u00a0mL, lasts ${formatDuration((size.value / rate) * HOUR)}.`;
}

const SIGNED: Readonly<Record<string, string>> = {
  author: '',
  'independent-check': 'checked ',
  pharmacist: 'pharmacist, ',
  witness: 'witness, ',
  bedside: 'started ',
};

/** Who signed this order, each with what it meant and when. */
export const signedWords = ({ signatures, zone }: BedsidePage): string[] =>
  signatures.flatMap(({ meaning, name, at, isVoid }) => {
    const moment = parseInstant(at);
    const what = SIGNED[meaning];
    if (isVoid || what === undefined || moment === undefined) return [];
    return [`${name}, ${what}${formatTime(moment, zone)}`];
  });

type BarWords = { tone: 'brim' | 'leaf' | 'ink'; head: string; text: string };

/** The figures of the pump that differ, in one line: what it shows and what the order says. */
function pumpShows(
  { rate, volume }: BedsideEntries['pump'],
  content: OrderContent,
  field: string,
): string | null {
  if (!isByPump(content)) return null;
  const ordered = formatNumber(Number(content.figures.rateMlPerH), 1);
  if (field === 'rate' && rate.trim() !== '') {
    return `Not yet: the pump shows ${rate.trim()} mL/h, the order says ${ordered}`;
  }
  return field === 'volume' && volume.trim() !== '' ? 'Not yet: the volume on the pump is refused' : null;
}

const REFUSED: Readonly<Record<BedsideStep, string>> = {
  child: 'Not yet: this is not the child of the order',
  bag: 'Not yet: this is not the bag of the order',
  pump: 'Not yet: the pump is not set as ordered',
  line: 'Not yet: the line is not as ordered',
};
const UNFINISHED = ['missing', 'empty', 'not-done'];

/** What stands between here and the start. */
export function barWords(content: OrderContent, entries: BedsideEntries, verdicts: Verdicts): BarWords {
  const done = BEDSIDE_STEPS.filter((step) => agrees(verdicts, step)).length;
  if (done === BEDSIDE_STEPS.length) {
    return { tone: 'leaf', head: 'All four agree with the signed order', text: '' };
  }
  const text = `${COUNTS[done]} of four steps ${done === 1 ? 'agrees' : 'agree'}. Start opens when all four do.`;
  const refused = BEDSIDE_STEPS.find((step) => verdicts[step] !== undefined && !agrees(verdicts, step));
  if (refused === undefined) return { tone: 'ink', head: 'Not yet: compare each step with the order', text };
  const findings = verdicts[refused]?.findings ?? [];
  const isOnlyUnfinished = findings.every(({ code }) => UNFINISHED.includes(code));
  const shown = refused === 'pump' ? pumpShows(entries.pump, content, findings[0]?.field ?? '') : null;
  const head = isOnlyUnfinished
    ? `Not yet: ${STEP_WORDS[refused].title.toLowerCase()} is not finished`
    : REFUSED[refused];
  return { tone: isOnlyUnfinished ? 'ink' : 'brim', head: shown ?? head, text };
}
