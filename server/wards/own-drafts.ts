import type { Actor } from '@shared/accounts/actor';
import { orderFormSchema } from '@shared/orders/form';
import { isDraft } from '@shared/orders/states';
import type { Instant } from '@shared/time';
import { inArray } from 'drizzle-orm';
import { drafts } from '../db/schema/orders';
import type { Tx } from '../db/transaction';
import { presentContent } from '../orders/present-line';
import { workOutVersion } from '../orders/work-out-version';
import type { LoadedLine } from './load-lines';

/** More open drafts of one person on one page are listed without their figures. */
const MOST = 6;

/** Fills in the figures of the reader's own drafts, as each would be signed now; an unfinished one stays bare. */
export async function workOutOwnDrafts(
  tx: Tx,
  actor: Actor,
  lines: readonly LoadedLine[],
  now: Instant,
): Promise<void> {
  const own = lines.filter(({ row }) => row.viewerIsAuthor && isDraft(row.state)).slice(0, MOST);
  if (own.length === 0) return;
  const rows = await tx
    .select({ versionId: drafts.versionId, form: drafts.form })
    .from(drafts)
    .where(
      inArray(
        drafts.versionId,
        own.map(({ row }) => row.versionId),
      ),
    );
  const forms = new Map(rows.map(({ versionId, form }) => [versionId, form]));
  for (const { row, line } of own) {
    const form = orderFormSchema.safeParse(forms.get(row.versionId));
    if (!form.success) continue;
    const work = await workOutVersion(tx, row, form.data, actor.hospitalId, now);
    if (work.ok) line.open = presentContent(work.wouldBe.content, actor.name);
  }
}
