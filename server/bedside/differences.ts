import type { BedsideEntries, StepVerdict } from '@shared/routes/bedside';
import type { OrderContent } from '@shared/orders/content';
import type { NearMiss } from '../db/outcome';
import { nearMiss } from '../near-misses/near-miss';
import type { LoadedVersion } from '../orders/facts';

type Differing = { verdict: StepVerdict; entries: BedsideEntries; content: OrderContent };

const UNITS: Readonly<Record<string, string>> = { rate: 'mL/h', volume: 'mL', minutes: 'min', sizeMl: 'mL' };

/** What was left empty is not a near miss: nothing wrong was about to happen. */
const UNFINISHED = new Set(['missing', 'empty', 'not-done', 'unfinished']);

/** A near miss for each thing at the bedside that is not as ordered. */
export const bedsideMisses = ({ row }: LoadedVersion, { verdict, entries, content }: Differing): NearMiss[] =>
  verdict.findings
    .filter(({ code }) => !UNFINISHED.has(code))
    .map(({ field, code, text }) => {
      const read = readOf(entries, verdict.step, field);
      return nearMiss({
        class: code === 'wrong-child' ? 'wrong-child' : 'bedside',
        limitCode: `${verdict.step}-${code}`,
        childId: row.childId,
        versionId: row.id,
        kind: row.kind,
        value: read,
        limit: orderedOf(content, field),
        detail: text,
        once: [field, read],
      });
    });

function readOf(entries: BedsideEntries, step: StepVerdict['step'], field: string): string {
  const value = (entries[step] as Record<string, string | boolean>)[field];
  const unit = UNITS[field];
  return unit === undefined ? String(value ?? '') : `${String(value)} ${unit}`;
}

function orderedOf({ figures, fluid, line }: OrderContent, field: string): string | undefined {
  if (field === 'rate') return figures.rateMlPerH === null ? undefined : `${figures.rateMlPerH} mL/h`;
  if (field === 'volume') return `${figures.volumeMl} mL`;
  if (field === 'minutes') return figures.overMinutes === null ? undefined : `${figures.overMinutes} min`;
  if (field === 'productId') return fluid.name;
  return field === 'lineClass' ? line : undefined;
}

/** The differing steps in one sentence each, and beside the fields they are about. */
export const bedsideErrors = (verdicts: readonly StepVerdict[]) =>
  verdicts.flatMap(({ step, findings }) =>
    findings.map(({ field, text }) => ({ pointer: `/entries/${step}/${field}`, detail: text })),
  );
