import type { Actor } from '@shared/accounts/actor';
import type { Instant } from '@shared/time';
import { done, refused, type Outcome } from '../../db/outcome';
import type { Tx } from '../../db/transaction';
import { holdFor, noteOf } from '../../orders/lock-version';

type Visit = { checker: Actor; versionId: string; besideHospital: string };

/** Whether this person may check here, asked before their visit beside the author opens. */
export async function openBeside(
  tx: Tx,
  { checker, versionId, besideHospital }: Visit,
  now: Instant,
): Promise<Outcome<null>> {
  if (checker.hospitalId !== besideHospital) {
    return refused('checker-unfit', { detail: 'That person cannot check this order.' });
  }
  const opened = await holdFor(
    tx,
    { act: 'lock-in', actor: checker, versionId, entry: 'beside-opened' },
    now,
  );
  if (!opened.ok) return opened.refusal;
  return done(null, { entries: [noteOf('beside-opened', opened.held, { to: checker.id })] });
}
