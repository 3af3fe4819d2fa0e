import { readDecimal } from '../decimal-input';
import type { OrderContent } from '../orders/content';
import { above, formatNumber, snap } from '../rounding';
import type { BedsideEntries } from '../routes/bedside';
import type { BedsideContext, Finding } from './finding';
import { volumeToInfuse } from './volume-to-infuse';

type Setting = { context: BedsideContext; bagMl: number | null };

/** Whether a pump runs it: maintenance always, a bolus by its route. */
export const isByPump = ({ inputs }: OrderContent): boolean =>
  inputs.kind === 'maintenance' || inputs.route === 'pump';

/** Findings on the figures typed from the pump, or of a bolus by hand. */
export const comparePumpFigures = (
  content: OrderContent,
  entered: BedsideEntries['pump'],
  setting: Setting,
): Finding[] =>
  isByPump(content) ? pumpFindings(content, entered, setting) : handFindings(content, entered);

function pumpFindings(content: OrderContent, entered: BedsideEntries['pump'], setting: Setting): Finding[] {
  const device: Finding[] =
    entered.device.trim() === ''
      ? [{ field: 'device', code: 'missing', text: 'Say which pump: its number.' }]
      : [];
  const ordered = Number(content.figures.rateMlPerH);
  const rate = readDecimal(entered.rate, { decimals: 1, unit: 'mL/h' });
  const volume = readDecimal(entered.volume, { decimals: 1, unit: 'mL' });
  if (!rate.ok || !volume.ok) {
    const faults: Finding[] = [];
    if (!rate.ok) faults.push({ field: 'rate', code: rate.code, text: rate.message });
    if (!volume.ok) faults.push({ field: 'volume', code: volume.code, text: volume.message });
    if (rate.ok) faults.push(...differing('rate', rate.value, ordered, 'mL/h'));
    return [...device, ...faults];
  }
  if (rate.value !== ordered && volume.value === ordered) {
    const text = `Rate and volume swapped: the order says ${mlPerHour(ordered)}. Correct the pump, then type what it shows.`;
    return [...device, { field: 'rate', code: 'swapped', text }];
  }
  return [
    ...device,
    ...differing('rate', rate.value, ordered, 'mL/h'),
    ...volumeFindings(content, volume.value, setting),
  ];
}

const mlPerHour = (n: number): string => `${formatNumber(n, 1)} mL/h`;

function volumeFindings(content: OrderContent, volume: number, { context, bagMl }: Setting): Finding[] {
  if (volume <= 0) {
    return [
      {
        field: 'volume',
        code: 'nought',
        text: 'Set a volume to be infused, so that the pump stops by itself.',
      },
    ];
  }
  const most = volumeToInfuse(content, context, bagMl);
  if (!above(volume, most.ml)) return [];
  return [
    { field: 'volume', code: 'too-much', text: `Set at most ${formatNumber(most.ml, 1)} mL: ${most.words}.` },
  ];
}

function handFindings(content: OrderContent, entered: BedsideEntries['pump']): Finding[] {
  const volume = readDecimal(entered.volume, { decimals: 1, unit: 'mL' });
  const minutes = readDecimal(entered.minutes, { decimals: 0, unit: 'min' });
  const over = Number(content.figures.overMinutes);
  return [
    ...(volume.ok
      ? differing('volume', volume.value, Number(content.figures.volumeMl), 'mL')
      : [{ field: 'volume', code: volume.code, text: volume.message }]),
    ...(minutes.ok
      ? differing('minutes', minutes.value, over, 'min')
      : [{ field: 'minutes', code: minutes.code, text: minutes.message }]),
  ];
}

const TIMES: readonly [times: number, code: string, words: string][] = [
  [100, 'hundred-times', 'A hundred times the order.'],
  [10, 'ten-times', 'Ten times the order.'],
  [2, 'double', 'Twice the order.'],
  [0.5, 'half', 'Half the order.'],
  [0.1, 'a-tenth', 'A tenth of the order.'],
  [0.01, 'a-hundredth', 'A hundredth of the order.'],
];

/** How a typed figure differs from the ordered one; nothing where they are the same. */
function differing(field: string, typed: number, ordered: number, unit: string): Finding[] {
  if (typed === ordered) return [];
  const where = unit === 'mL/h' ? 'Correct the pump, then type what it shows.' : 'Look again.';
  const known = TIMES.find(([times]) => snap(ordered * times) === typed);
  if (known) return [{ field, code: known[1], text: `${known[2]} ${where}` }];
  const apart = `${formatNumber(Math.abs(snap(typed - ordered)), 1)} ${unit}`;
  const side = typed > ordered ? 'above' : 'below';
  const text = `${apart} ${side} the order, which says ${formatNumber(ordered, 1)} ${unit}. ${where}`;
  return [{ field, code: 'differs', text }];
}
