import type { Actor } from '@shared/accounts/actor';
import { readContent } from '@shared/orders/build-content';
import { orderFormSchema } from '@shared/orders/form';
import { isDraft } from '@shared/orders/states';
import type { OrderContent } from '@shared/orders/content';
import type { Instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import type { Refused } from '../db/outcome';
import { drafts, orderVersions } from '../db/schema/orders';
import type { Tx } from '../db/transaction';
import { refuseUnfinished } from '../orders/commands/judge-signing';
import { draftMoved } from '../orders/commands/save-draft';
import type { LoadedVersion } from '../orders/facts';
import { NO_SUCH_ORDER } from '../orders/lock-version';
import { workOutVersion, type VersionWork } from '../orders/work-out-version';

type Worked = { ok: true; worked: Extract<VersionWork, { ok: true }> } | { ok: false; refusal: Refused };

/** A draft worked out as its author would sign it now; with `rev`, only in the state its author has seen. */
export async function workOutAsked(
  tx: Tx,
  { row }: LoadedVersion,
  actor: Pick<Actor, 'hospitalId'>,
  now: Instant,
  rev?: number,
): Promise<Worked> {
  const [draft] = await tx.select().from(drafts).where(eq(drafts.versionId, row.id)).for('update');
  if (draft === undefined) return { ok: false, refusal: NO_SUCH_ORDER };
  if (rev !== undefined && draft.rev !== rev) return { ok: false, refusal: draftMoved(draft) };
  const form = orderFormSchema.parse(draft.form);
  const worked = await workOutVersion(tx, row, form, actor.hospitalId, now);
  return worked.ok ? { ok: true, worked } : { ok: false, refusal: refuseUnfinished(worked) };
}

type Matter = { ok: true; content: OrderContent; sha256: string } | { ok: false; refusal: Refused };

/** What a senior decides on: the would-be content of a draft, or the fixed content of what went on in an emergency. */
export async function loadMatter(
  tx: Tx,
  held: LoadedVersion,
  actor: Pick<Actor, 'hospitalId'>,
  now: Instant,
): Promise<Matter> {
  if (isDraft(held.row.state)) {
    const asked = await workOutAsked(tx, held, actor, now);
    return asked.ok ? { ok: true, ...asked.worked.wouldBe } : asked;
  }
  const [row] = await tx
    .select({ content: orderVersions.content, sha256: orderVersions.contentSha256 })
    .from(orderVersions)
    .where(eq(orderVersions.id, held.row.id));
  if (row?.content == null || row.sha256 === null) return { ok: false, refusal: NO_SUCH_ORDER };
  return { ok: true, content: readContent(row.content), sha256: row.sha256 };
}
