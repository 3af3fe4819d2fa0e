import { canonicalText } from '@shared/canonical';
import { compareCheck } from '@shared/checks/compare';
import { contextOf } from '@shared/checks/context';
import { isShortForm } from '@shared/checks/entries';
import type { CheckForm, Comparison } from '@shared/checks/form';
import { readCheckForm, type CheckEntries } from '@shared/checks/read-form';
import { reenterChild } from '@shared/checks/reenter-child';
import type { OrderContent } from '@shared/orders/content';
import type { DraftContext } from '@shared/routes/orders';
import { parseInstant, type Instant } from '@shared/time';
import { createHash } from 'node:crypto';
import { refused, type Refused } from '../db/outcome';
import type { Tx } from '../db/transaction';
import { nearMiss } from '../near-misses/near-miss';
import type { LoadedVersion } from '../orders/facts';
import { noteOf } from '../orders/lock-version';
import { loadVersionContext } from '../orders/work-out-version';
import { rulebookByNumber } from '../rulebook/in-force';
import type { LedgerAct } from '../ledger/entries';

export type OwnFigures = { entries: CheckEntries; text: string; sha256: string; chart: DraftContext };
type Read = { ok: true; own: OwnFigures } | { ok: false; refusal: Refused };

type Checker = { id: string; hospitalId: string };

/**
 * Reads a checker's figures and holds the child they re-entered against the chart. A wrong child refuses the act,
 * is kept as a near miss, and is told by entry, never by what the chart has.
 */
export async function readOwnFigures(
  tx: Tx,
  checker: Checker,
  version: LoadedVersion,
  { form, ledger, now }: { form: CheckForm; ledger: LedgerAct; now: Instant },
): Promise<Read> {
  const { row } = version;
  const reading = readCheckForm(form, { kind: row.kind, shortForm: isShortForm(row.kind, row.urgency) });
  if (!reading.ok) {
    const errors = reading.errors.map(({ field, message }) => ({
      pointer: `/form/${field}`,
      detail: message,
    }));
    return {
      ok: false,
      refusal: refused('bad-input', { detail: 'Some entries need another look.', errors }),
    };
  }
  const loaded = await loadVersionContext(tx, row, checker.hospitalId, now);
  if (loaded === null) throw new Error('the child of this version is gone');
  const chart = loaded.context;
  const wrong = wrongChild(version, reading.entries, { chart, checker, ledger, now });
  if (wrong) return { ok: false, refusal: wrong };
  const text = canonicalText(form);
  const sha256 = createHash('sha256').update(text, 'utf8').digest('hex');
  return { ok: true, own: { entries: reading.entries, text, sha256, chart } };
}

type Look = { chart: DraftContext; checker: Checker; ledger: LedgerAct; now: Instant };

function wrongChild(version: LoadedVersion, entries: CheckEntries, look: Look): Refused | undefined {
  const { child, zone } = look.chart;
  const bornAt = child.bornAt === null ? undefined : parseInstant(child.bornAt);
  const fits = reenterChild(entries.child, { ...child, bornAt }, look.now, zone);
  if (fits.ok) return undefined;
  const { row } = version;
  return refused('wrong-child', {
    detail: fits.words,
    errors: fits.differs.map((field) => ({
      pointer: `/form/${field}`,
      detail: 'This does not fit this child.',
    })),
    entries: [noteOf(look.ledger, version, { reason: 'wrong-child' })],
    nearMisses: [
      nearMiss({
        class: 'wrong-child',
        limitCode: 'check-child',
        childId: row.childId,
        versionId: row.id,
        kind: row.kind,
        detail: `Re-entered at a check: ${fits.differs.join(', ')} differ.`,
        once: [look.checker.id],
      }),
    ],
  });
}

/** Compares with the signed content, for its planned start and under the rulebook it was made with. */
export async function compareWith(tx: Tx, content: OrderContent, own: OwnFigures): Promise<Comparison> {
  const at = parseInstant(content.plannedStart);
  const rulebook = await rulebookByNumber(tx, content.rulebook.number);
  if (at === undefined || rulebook === undefined) throw new Error('the content names no rulebook or start');
  return compareCheck(content, own.entries, { ...contextOf(own.chart, at), rulebook });
}
