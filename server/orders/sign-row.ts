import type { Actor } from '@shared/accounts/actor';
import type { SignatureMeaning } from '@shared/orders/transitions';
import type { Instant } from '@shared/time';
import { signatures } from '../db/schema/signatures';
import type { Tx } from '../db/transaction';

export type Signing = {
  versionId: string;
  meaning: SignatureMeaning;
  contentSha256: string;
  how?: 'password' | 'session';
  exceptionId?: string;
  note?: string;
};

/** The signer as printed. */
export type Signer = Pick<Actor, 'id' | 'name' | 'title' | 'registrationNumber'>;

/** Writes a signature: the person as printed at this time, and the hash of exactly what was signed. */
export async function sign(tx: Tx, actor: Signer, now: Instant, signing: Signing): Promise<void> {
  await tx.insert(signatures).values({
    versionId: signing.versionId,
    meaning: signing.meaning,
    by: actor.id,
    printedName: actor.name,
    printedTitle: actor.title,
    printedRegistrationNumber: actor.registrationNumber,
    at: now,
    how: signing.how ?? 'password',
    contentSha256: signing.contentSha256,
    exceptionId: signing.exceptionId ?? null,
    note: signing.note ?? null,
  });
}
