import { parseRulebook, type Rulebook } from '@shared/rulebook/document';
import type { Instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { rulebooks } from '../db/schema/rulebook';
import type { Tx } from '../db/transaction';

export type RulebookInForce = {
  number: number;
  sha256: string;
  inForceFrom: Instant;
  /** The stored document; one object for each edition, so that what is parsed from it is parsed once. */
  content: object;
  rulebook: Rulebook;
};

const editions = new Map<string, Pick<RulebookInForce, 'content' | 'rulebook'>>();
const MOST_KEPT = 200;

/** The rulebook a hospital works under now. Throws where there is none: no hospital is made without one. */
export async function rulebookInForce(tx: Tx): Promise<RulebookInForce> {
  const [head] = await tx
    .select({ number: rulebooks.number, sha256: rulebooks.contentSha256, inForceFrom: rulebooks.inForceFrom })
    .from(rulebooks)
    // the partial unique index allows one
    .where(eq(rulebooks.state, 'in-force'));
  if (head === undefined || head.inForceFrom === null) throw new Error('no rulebook is in force');
  const edition = await readEdition(tx, head.number, head.sha256);
  return { ...head, inForceFrom: head.inForceFrom, ...edition };
}

/** One numbered edition, whether in force or not; undefined where there is none. */
export async function rulebookByNumber(tx: Tx, number: number): Promise<Rulebook | undefined> {
  const [row] = await tx
    .select({ sha256: rulebooks.contentSha256 })
    .from(rulebooks)
    .where(eq(rulebooks.number, number));
  return row && (await readEdition(tx, number, row.sha256)).rulebook;
}

/** Kept by the hash of the text, which is the same document in whichever hospital it is in force. */
async function readEdition(tx: Tx, number: number, sha256: string) {
  const known = editions.get(sha256);
  if (known !== undefined) return known;
  const [row] = await tx
    .select({ content: rulebooks.content })
    .from(rulebooks)
    .where(eq(rulebooks.number, number));
  if (row === undefined) throw new Error(`rulebook ${number} has no content`);
  const content = JSON.parse(row.content) as object;
  const edition = { content, rulebook: { ...parseRulebook(content), hash: sha256 } };
  if (editions.size >= MOST_KEPT) editions.clear();
  editions.set(sha256, edition);
  return edition;
}
