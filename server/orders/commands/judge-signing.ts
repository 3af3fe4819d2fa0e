import type { LimitFinding } from '@shared/calc/types';
import type { OrderContent } from '@shared/orders/content';
import { rulebookOf } from '@shared/orders/chart-facts';
import { limitSentences } from '@shared/orders/words';
import { isIncomplete } from '@shared/orders/work-out-draft';
import { agrees, deriveAgain } from '@shared/second/derive-again';
import { and, eq } from 'drizzle-orm';
import { refused, type Refused } from '../../db/outcome';
import { exceptions } from '../../db/schema/checks';
import type { Tx } from '../../db/transaction';
import type { LoadedVersion } from '../facts';
import { limitMiss } from '../near-miss';
import type { VersionWork } from '../work-out-version';

/** What the author's screen showed when the sign button was pressed. */
export type SeenFigures = { rateMlPerH: string | null; volumeMl: string; rulebook: number };
type WorkedOut = Extract<VersionWork, { ok: true }>;

/** Why a draft that does not work out cannot be signed, field by field. */
export function refuseUnfinished({ work }: Extract<VersionWork, { ok: false }>): Refused {
  if (!isIncomplete(work)) {
    const { code, detail, field, offer } = work;
    return refused('cannot-work-out', {
      detail,
      errors: field === undefined ? [] : [{ pointer: `/form/${field}`, detail }],
      data: { code, ...(field && { field }), ...(offer && { offer }) },
    });
  }
  const errors = Object.entries(work.fields).map(([field, detail]) => ({
    pointer: `/form/${field}`,
    detail,
  }));
  return refused('bad-input', { detail: 'Some entries need another look.', errors });
}

/** Brims first, then figures that moved, the second derivation, reasons owed. Undefined where all is well. */
export function judgeFigures(worked: WorkedOut, held: LoadedVersion, seen: SeenFigures): Refused | undefined {
  const { work, wouldBe } = worked;
  if (work.brims.length > 0) return overTheBrim(work.brims, held);
  if (hasMoved(wouldBe.content, seen)) return figuresMoved(wouldBe.content);
  const again = deriveAgain(work.request, rulebookOf(worked.context));
  if (!agrees(work.workOut, again)) return derivationsDiffer(held);
  return work.reasonsOwed.length > 0 ? reasonsOwed(work.reasonsOwed) : undefined;
}

const listed = (limits: readonly LimitFinding[]) =>
  limits.map(({ code, title, text, offer }) => ({ code, title, text, ...(offer && { offer }) }));

const overTheBrim = (brims: readonly LimitFinding[], { row }: LoadedVersion): Refused =>
  refused('over-the-brim', {
    detail: limitSentences(brims),
    data: { limits: listed(brims) },
    nearMisses: brims.map((limit) => limitMiss(row, limit)),
  });

/** Compared as numbers: "44" on the wire and "44.0" in content are one figure. */
function hasMoved({ figures, rulebook }: OrderContent, seen: SeenFigures): boolean {
  const rate = figures.rateMlPerH === null ? null : Number(figures.rateMlPerH);
  const seenRate = seen.rateMlPerH === null ? null : Number(seen.rateMlPerH);
  return (
    rate !== seenRate ||
    Number(figures.volumeMl) !== Number(seen.volumeMl) ||
    rulebook.number !== seen.rulebook
  );
}

const figuresMoved = ({ figures, rulebook, readBack }: OrderContent): Refused =>
  refused('figures-moved', {
    detail: 'The figures have moved since they were shown. Nothing was signed: read the new ones.',
    data: { figures, rulebook: rulebook.number, readBack },
  });

const derivationsDiffer = ({ row, code }: LoadedVersion): Refused =>
  refused('derivations-differ', {
    detail:
      'The program worked the figures out a second way and they differ. Prescribe on paper and tell us.',
    nearMisses: [
      {
        class: 'our-fault',
        limitCode: 'derivations-differ',
        childId: row.childId,
        versionId: row.id,
        kind: row.kind,
        detail: code,
        dedupe: `derivations:${row.id}`,
      },
    ],
  });

const reasonsOwed = (owed: readonly LimitFinding[]): Refused =>
  refused('reason-owed', {
    detail: limitSentences(owed),
    errors: owed.map(({ code, owes, title }) => ({
      pointer: owes === undefined ? `/form/limitReasons/${code}` : `/form/${owes}`,
      detail: `A reason is owed: ${title}.`,
    })),
  });

/** Senior matters that must be agreed before signing, those nobody may read about included. */
export const seniorMatters = ({ work, hidden }: WorkedOut): LimitFinding[] => [
  ...work.seniors,
  ...hidden.filter((limit) => work.extras.urgency !== 'emergency' || limit.deferred !== true),
];

/** Senior matters of an emergency, agreed afterwards. */
export const deferredMatters = ({ work, hidden }: WorkedOut): LimitFinding[] => [
  ...work.deferred,
  ...hidden.filter((limit) => work.extras.urgency === 'emergency' && limit.deferred === true),
];

/** The senior matters without an agreement to exactly this content. */
export async function unagreed(tx: Tx, versionId: string, worked: WorkedOut): Promise<LimitFinding[]> {
  const matters = seniorMatters(worked);
  if (matters.length === 0) return [];
  const granted = await tx
    .select({ code: exceptions.limitCode })
    .from(exceptions)
    .where(
      and(
        eq(exceptions.versionId, versionId),
        eq(exceptions.state, 'granted'),
        eq(exceptions.contentSha256, worked.wouldBe.sha256),
      ),
    );
  return matters.filter(({ code }) => !granted.some((grant) => grant.code === code));
}

export const exceptionNeeded = (limits: readonly LimitFinding[], { row }: LoadedVersion): Refused =>
  refused('exception-needed', {
    detail: limitSentences(limits),
    data: { limits: listed(limits) },
    nearMisses: limits.map((limit) => limitMiss(row, limit)),
  });

/** Why a draft cannot be put to a senior: brims, reasons owed, or nothing to ask. */
export function judgeAsking(worked: WorkedOut, held: LoadedVersion): Refused | undefined {
  const { work } = worked;
  if (work.brims.length > 0) return overTheBrim(work.brims, held);
  if (work.reasonsOwed.length > 0) return reasonsOwed(work.reasonsOwed);
  if (seniorMatters(worked).length > 0) return undefined;
  return refused('conflict', { detail: 'No limit of this order needs a senior.' });
}
