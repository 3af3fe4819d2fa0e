import type { Actor } from '@shared/accounts/actor';
import type { OrderContent } from '@shared/orders/content';
import type { ChildHead } from '@shared/routes/children';
import type { Instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { done, refused, type Outcome } from '../db/outcome';
import { accounts } from '../db/schema/accounts';
import type { Tx } from '../db/transaction';
import { loadChildHead } from '../orders/chart-parts';
import { loadZone } from '../orders/load-context';
import { openException } from './decide-exception';
import { loadExceptions, type PresentedException } from './present';

export type PresentedMatter = {
  child: ChildHead;
  content: OrderContent;
  contentSha256: string;
  author: string;
  reason: string;
  limits: PresentedException[];
};

/** What a senior decides on, opened and written down in one act. */
export async function presentMatter(
  tx: Tx,
  now: Instant,
  actor: Actor,
  versionId: string,
): Promise<Outcome<PresentedMatter>> {
  const opened = await openException(tx, now, actor, versionId);
  if (!opened.ok) return opened;
  const { held, matter, reason } = opened.value;
  const zone = await loadZone(tx, actor.hospitalId);
  const child = await loadChildHead(tx, held.row.childId, now, zone);
  const [author] = await tx
    .select({ name: accounts.name, title: accounts.title })
    .from(accounts)
    .where(eq(accounts.id, held.row.authorId));
  if (child === null || author === undefined) return refused('not-found');
  const limits = await loadExceptions(tx, versionId, matter.content.limits);
  return done(
    {
      child,
      content: matter.content,
      contentSha256: matter.sha256,
      author: `${author.name}, ${author.title}`,
      reason,
      limits,
    },
    { entries: opened.entries },
  );
}
