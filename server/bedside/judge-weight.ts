import { decimalText } from '@shared/canonical';
import { formatNumber } from '@shared/rounding';
import { ruleValues } from '@shared/rulebook/read';
import type { Instant } from '@shared/time';
import { and, desc, eq, gt, inArray, isNull } from 'drizzle-orm';
import { MEASURED_METHODS } from '@shared/calc/types';
import { refused, type Refused } from '../db/outcome';
import { weights } from '../db/schema/weights';
import type { Tx } from '../db/transaction';
import { nearMiss } from '../near-misses/near-miss';
import type { LoadedVersion } from '../orders/facts';
import { noteOf } from '../orders/lock-version';
import { isUsable } from '../orders/chart-parts';
import type { Bedside } from './load-bedside';

/**
 * Whether the weight the order was made for still stands: not corrected since, and not contradicted by one measured
 * since. A bolus for shock is not delayed by a weight.
 */
export async function judgeWeight(
  tx: Tx,
  version: LoadedVersion,
  { content, context }: Bedside,
  _now: Instant,
): Promise<Refused | undefined> {
  if (content.kind === 'bolus') return undefined;
  const [used] = await tx.select().from(weights).where(eq(weights.id, content.weight.id));
  if (used === undefined || used.supersededBy !== null || !isUsable(used)) {
    return stale(version, 'weight-corrected', 'The weight of this order was corrected since.');
  }
  const [newer] = await tx
    .select()
    .from(weights)
    .where(
      and(
        eq(weights.childId, version.row.childId),
        isNull(weights.supersededBy),
        gt(weights.at, used.at),
        inArray(weights.method, [...MEASURED_METHODS]),
      ),
    )
    .orderBy(desc(weights.at))
    .limit(1);
  if (newer === undefined || !isUsable(newer)) return undefined;
  const { changePercent } = ruleValues(context.rulebook, 'weight');
  const apart = (Math.abs(newer.kg - used.kg) / used.kg) * 100;
  if (apart <= changePercent) return undefined;
  const kg = (value: number) => `${formatNumber(value, 3)} kg`;
  return stale(
    version,
    'weight-moved',
    `The child was weighed again since: ${kg(newer.kg)}, and the order was made for ${kg(used.kg)}.`,
    { value: decimalText(newer.kg, 3), limit: content.weight.kg },
  );
}

function stale(
  version: LoadedVersion,
  limitCode: string,
  words: string,
  values: { value?: string; limit?: string } = {},
): Refused {
  const { row } = version;
  return refused('stale', {
    detail: `${words} The prescriber has to look at it before anything starts.`,
    entries: [noteOf('infusion-started', version, { reason: limitCode })],
    nearMisses: [
      nearMiss({
        class: 'weight',
        limitCode,
        childId: row.childId,
        versionId: row.id,
        kind: row.kind,
        detail: words,
        ...values,
      }),
    ],
  });
}
