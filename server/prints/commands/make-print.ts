import type { Actor } from '@shared/accounts/actor';
import { can } from '@shared/orders/can';
import { maySee } from '@shared/orders/coverage';
import type { Instant } from '@shared/time';
import { done, refused, type Outcome } from '../../db/in-hospital';
import { prints } from '../../db/schema/bedside';
import type { Tx } from '../../db/transaction';
import { loadFacts } from '../../orders/facts';
import { newPaperCode } from '../paper-code';
import { findHead } from '../queries';
import { WATERMARKS } from '../watermark';

/** A print of its own: who, when, under which random code, and what the ledger's newest row was. */
export async function makePrint(
  tx: Tx,
  actor: Actor,
  versionId: string,
  now: Instant,
): Promise<Outcome<{ code: string; href: string }>> {
  const loaded = await loadFacts(tx, actor, versionId, now);
  if (loaded === null || loaded.ward === null) return refused('not-found');
  const verdict = can(actor, 'print-order', loaded.ward.id);
  if (!verdict.allowed) return refused(verdict.code, { detail: verdict.words });
  // covered figures are not printed either; to the asker the paper does not exist yet
  if (!maySee(loaded.coverage))
    return refused('not-found', { detail: 'This order is covered until its check is signed.' });
  const head = await findHead(tx);
  const code = newPaperCode();
  await tx.insert(prints).values({
    code,
    versionId,
    by: actor.id,
    at: now,
    ledgerSeq: head?.seq ?? 0,
    watermark: WATERMARKS[loaded.row.state],
  });
  return done(
    { code, href: `/api/prints/${code}.pdf` },
    {
      entries: [
        {
          act: 'order-printed',
          subject: { kind: 'version', id: versionId },
          child: loaded.row.childId,
          code: loaded.code,
          version: loaded.row.version,
        },
      ],
    },
  );
}
