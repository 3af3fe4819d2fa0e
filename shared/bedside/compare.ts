import type { FluidComposition } from '../calc/types';
import { readDecimal } from '../decimal-input';
import type { OrderContent } from '../orders/content';
import type { BedsideEntries, BedsideStep, StepVerdict } from '../routes/bedside';
import { civilDate, formatCivilDate, isCivilDate } from '../time';
import { comparePumpFigures } from './compare-pump';
import { finding, type BedsideContext, type Finding } from './finding';
import { potassiumFinding } from './same-bag';

const verdict = (step: BedsideStep, findings: Finding[]): StepVerdict => ({
  step,
  agrees: findings.length === 0,
  findings,
});

const withoutSpaces = (text: string): string => text.replace(/[\s\u00a0]+/gu, '').toUpperCase();

/** Two identifiers read from the wristband: hospital number and date of birth. */
export function compareChild(content: OrderContent, entered: BedsideEntries['child']): StepVerdict {
  const { number, bornOn } = content.child;
  const findings: Finding[] = [];
  if (withoutSpaces(entered.number) === '') {
    findings.push(finding('number', 'missing', 'Read the hospital number from the wristband.'));
  } else if (withoutSpaces(entered.number) !== withoutSpaces(number)) {
    const text = 'This hospital number is not the one on the order. Stop: is this the right child?';
    findings.push(finding('number', 'wrong-child', text));
  }
  if (!isCivilDate(entered.bornOn.trim())) {
    findings.push(finding('bornOn', 'missing', 'Read the date of birth from the wristband.'));
  } else if (entered.bornOn.trim() !== bornOn) {
    const text = 'This date of birth is not the one on the order. Stop: is this the right child?';
    findings.push(finding('bornOn', 'wrong-child', text));
  }
  return verdict('child', findings);
}

/** The bag that hangs: product, size, expiry, and the batch of a high-risk one. */
export function compareBag(
  content: OrderContent,
  entered: BedsideEntries['bag'],
  context: BedsideContext,
): StepVerdict {
  const picked = context.products.find(({ id }) => id === entered.productId);
  const product = productFindings(content, picked);
  const size = product.length > 0 ? [] : sizeFindings(entered.sizeMl, picked);
  const batch =
    content.isHighRisk && entered.batch.trim() === ''
      ? [finding('batch', 'missing', 'Type the batch from the bag: this is a high-risk fluid.')]
      : [];
  return verdict('bag', [...product, ...size, ...expiryFindings(entered.expiry, context), ...batch]);
}

function productFindings(content: OrderContent, picked: FluidComposition | undefined): Finding[] {
  if (picked === undefined) return [finding('productId', 'missing', 'Choose what is printed on the bag.')];
  if (picked.id === content.fluid.id) return [];
  if (picked.base !== content.fluid.base) {
    const text = `Another fluid. The order says ${content.fluid.name}. Take this bag away.`;
    return [finding('productId', 'another-fluid', text)];
  }
  return [potassiumFinding(content.fluid, picked)];
}

function sizeFindings(typed: string, product: FluidComposition | undefined): Finding[] {
  const reading = readDecimal(typed, { decimals: 0, min: 1, unit: 'mL' });
  if (!reading.ok) return [finding('sizeMl', reading.code, reading.message)];
  const sizes = product?.bagSizes ?? [];
  if (sizes.length === 0 || sizes.some((size) => size === reading.value)) return [];
  const stocked = sizes.join(', ');
  return [
    finding('sizeMl', 'not-stocked', `This fluid comes in bags of ${stocked} mL. Read the size again.`),
  ];
}

function expiryFindings(typed: string, { at, zone }: BedsideContext): Finding[] {
  const expiry = typed.trim();
  if (!isCivilDate(expiry)) return [finding('expiry', 'missing', 'Type the expiry date from the bag.')];
  if (expiry >= civilDate(at, zone)) return [];
  return [finding('expiry', 'expired', `This bag expired on ${formatCivilDate(expiry)}. Take another.`)];
}

/** Rate and volume as the pump shows them, or the figures of a bolus by hand. */
export function comparePump(
  content: OrderContent,
  entered: BedsideEntries['pump'],
  context: BedsideContext,
  bagMl: number | null,
): StepVerdict {
  return verdict('pump', comparePumpFigures(content, entered, { context, bagMl }));
}

/** The line, traced by hand from the bag to the cannula. */
export function compareLine(content: OrderContent, entered: BedsideEntries['line']): StepVerdict {
  const findings: Finding[] = [];
  if (entered.lineClass === '') {
    findings.push(finding('lineClass', 'missing', 'Say what kind of line it is.'));
  } else if (entered.lineClass !== content.line) {
    const text = `The order is for a ${content.line} line, and this one is ${entered.lineClass}. Ask the prescriber.`;
    findings.push(finding('lineClass', 'another-line', text));
  }
  if (entered.site.trim() === '') {
    findings.push(finding('site', 'missing', 'Say where the cannula is, for instance left hand.'));
  }
  const seen: [keyof BedsideEntries['line'], string][] = [
    ['traced', 'Trace the line from the bag through the pump to the cannula.'],
    ['clampOpen', 'Open the clamp.'],
    ['siteLooksWell', 'Look at the site. Do not start into a site that is swollen, red or painful.'],
  ];
  for (const [field, text] of seen)
    if (entered[field] !== true) findings.push(finding(field, 'not-done', text));
  return verdict('line', findings);
}

/** The size of the bag as typed; null while it is not a number. */
export function bagSizeOf({ sizeMl }: BedsideEntries['bag']): number | null {
  const reading = readDecimal(sizeMl, { decimals: 0, min: 1 });
  return reading.ok ? reading.value : null;
}

/** All four comparisons, in the order of the bedside. */
export const compareAll = (
  content: OrderContent,
  entries: BedsideEntries,
  context: BedsideContext,
): StepVerdict[] => [
  compareChild(content, entries.child),
  compareBag(content, entries.bag, context),
  comparePump(content, entries.pump, context, bagSizeOf(entries.bag)),
  compareLine(content, entries.line),
];

/** One of the four. */
export function compareStep(
  step: BedsideStep,
  content: OrderContent,
  entries: BedsideEntries,
  context: BedsideContext,
): StepVerdict {
  if (step === 'child') return compareChild(content, entries.child);
  if (step === 'bag') return compareBag(content, entries.bag, context);
  if (step === 'line') return compareLine(content, entries.line);
  return comparePump(content, entries.pump, context, bagSizeOf(entries.bag));
}
