import type { Actor } from '@shared/accounts/actor';
import { comparisonSchema } from '@shared/checks/form';
import { readContent } from '@shared/orders/build-content';
import { decide } from '@shared/orders/decide';
import { orderFormSchema } from '@shared/orders/form';
import { isWorkedOut, workOutDraft } from '@shared/orders/work-out-draft';
import type { Draft } from '@shared/routes/orders';
import { formatRate, formatVolume } from '@shared/rounding';
import { formatRelativeDay, parseInstant, toRfc3339, type Instant } from '@shared/time';
import { millilitres, millilitresPerHour } from '@shared/units';
import { and, desc, eq, isNotNull } from 'drizzle-orm';
import { done, type Outcome } from '../db/outcome';
import { checks } from '../db/schema/checks';
import { drafts, orders, orderVersions } from '../db/schema/orders';
import { signatures } from '../db/schema/signatures';
import type { Tx } from '../db/transaction';
import { loadExceptions } from '../exceptions/present';
import { loadFacts, type VersionRow } from './facts';
import { NO_SUCH_ORDER, refusalOf } from './lock-version';
import { loadVersionContext } from './work-out-version';

/** A draft as its author left it, with the chart it is worked out against. Nobody else reads a draft. */
export async function readDraft(
  tx: Tx,
  actor: Actor,
  versionId: string,
  now: Instant,
): Promise<Outcome<Draft>> {
  const loaded = await loadFacts(tx, actor, versionId, now);
  if (loaded === null) return NO_SUCH_ORDER;
  const refusal = refusalOf(decide('discard', actor, loaded.facts, now));
  if (refusal) return refusal;
  const { row, code } = loaded;
  const [draft] = await tx.select().from(drafts).where(eq(drafts.versionId, versionId));
  const chart = await loadVersionContext(tx, row, actor.hospitalId, now);
  if (draft === undefined || chart === null) return NO_SUCH_ORDER;
  const form = orderFormSchema.parse(draft.form);
  const work = workOutDraft(form, chart.context);
  return done({
    orderId: row.orderId,
    versionId,
    code,
    version: row.version,
    rev: draft.rev,
    form,
    savedAt: toRfc3339(draft.savedAt),
    context: chart.context,
    exceptions: await loadExceptions(tx, versionId, isWorkedOut(work) ? work.workOut.limits : []),
    cameBack: await cameBack(tx, row),
    follows: chart.follows === null ? null : await followed(tx, chart.follows, now, chart.context.zone),
  });
}

const RETURN_WORDS: Readonly<Record<string, string>> = {
  weight: 'weight',
  fluid: 'fluid',
  additives: 'additives',
  fraction: 'fraction',
  'rate-or-time': 'rate or time',
  child: 'child',
  'something-else': 'something else',
};

/** Why the version before this one came back: the settlement, else the check that returned or differed. */
async function cameBack(tx: Tx, { orderId, version }: VersionRow): Promise<Draft['cameBack']> {
  if (version === 1) return null;
  const [before] = await tx
    .select({ id: orderVersions.id })
    .from(orderVersions)
    .where(and(eq(orderVersions.orderId, orderId), eq(orderVersions.version, version - 1)));
  if (before === undefined) return null;
  const [settled] = await tx
    .select({ note: signatures.note })
    .from(signatures)
    .where(and(eq(signatures.versionId, before.id), eq(signatures.meaning, 'settlement')));
  const [check] = await tx
    .select()
    .from(checks)
    .where(and(eq(checks.versionId, before.id), isNotNull(checks.decidedAt)))
    .orderBy(desc(checks.decidedAt))
    .limit(1);
  const comparison = check?.comparison ? comparisonSchema.parse(JSON.parse(check.comparison)) : null;
  const what = check?.returnedWhat ? RETURN_WORDS[check.returnedWhat] : undefined;
  const words = [settled?.note, what && `Could not be verified: ${what}`, check?.reason]
    .filter(Boolean)
    .join('. ');
  return words === '' && comparison === null ? null : { words, comparison };
}

/** The order this one takes over from, told only once its checker has signed it. */
async function followed(tx: Tx, orderId: string, now: Instant, zone: string): Promise<Draft['follows']> {
  const [order] = await tx.select({ code: orders.code }).from(orders).where(eq(orders.id, orderId));
  if (order === undefined) return null;
  const [version] = await tx
    .select({ content: orderVersions.content })
    .from(orderVersions)
    .where(and(eq(orderVersions.orderId, orderId), isNotNull(orderVersions.checkedAt)))
    .orderBy(desc(orderVersions.version))
    .limit(1);
  if (version?.content == null) return { code: order.code, text: '' };
  const { figures, lapsesAt } = readContent(version.content);
  const amount =
    figures.rateMlPerH === null
      ? `${formatVolume(millilitres(Number(figures.volumeMl)))} mL`
      : `${formatRate(millilitresPerHour(Number(figures.rateMlPerH)))} mL/h`;
  const until = parseInstant(lapsesAt);
  return {
    code: order.code,
    text: until === undefined ? amount : `${amount} to ${formatRelativeDay(until, now, zone)}`,
  };
}
