import type { OrderContent } from '@shared/orders/content';
import { readContent } from '@shared/orders/build-content';
import { isRevised } from '@shared/orders/states';
import type { SignatureMeaning } from '@shared/orders/transitions';
import type { OrderPaper, PaperSignature } from '../documents/order-paper';
import type { Tx } from '../db/transaction';
import { findByCode, findContent, findLedgerHash, findPlace, listSignatures } from './queries';
import { WATERMARKS } from './watermark';

const MEANING_WORDS: Readonly<Record<SignatureMeaning, string>> = {
  author: 'drew up the order',
  'independent-check': 'independent check, worked it out unseen',
  pharmacist: 'verified product, additives and volume',
  bedside: 'confirmed child, bag, pump and line',
  witness: 'witnessed the confirmation',
  exception: 'agreed to the senior matter',
  settlement: 'settled the dispute',
  countersignature: 'countersigned',
  'rulebook-approval': 'approved the rulebook',
};

type SignatureRow = Awaited<ReturnType<typeof listSignatures>>[number];

/** A signature holds for the hash it signed; on a revised version it is void whatever it signed. */
export const isVoid = (
  row: Pick<SignatureRow, 'contentSha256'>,
  sha256: string | null,
  isRevisedVersion: boolean,
): boolean => isRevisedVersion || row.contentSha256 !== sha256;

const toPaper = (row: SignatureRow, sha256: string | null, revised: boolean): PaperSignature => ({
  who: row.printedName,
  role: row.printedTitle,
  registrationNumber: row.printedRegistrationNumber ?? 'none',
  at: row.at,
  what: [MEANING_WORDS[row.meaning], row.note].filter(Boolean).join(': '),
  isVoid: isVoid(row, sha256, revised),
});

const correctedName = (content: OrderContent, place: { surname: string; given: string }): string | null =>
  content.child.surname === place.surname && content.child.given === place.given
    ? null
    : `${place.surname}, ${place.given}`;

/**
 * Everything on the paper of a print code, or null where there is none (a draft has no paper until it can be worked
 * out). `wouldBe` gives a draft's content as it would be signed.
 */
export async function loadPaper(
  tx: Tx,
  code: string,
  publicUrl: string,
  wouldBe: () => Promise<OrderContent | null>,
): Promise<OrderPaper | null> {
  const print = await findByCode(tx, code);
  const version = print && (await findContent(tx, print.versionId));
  const place = version && (await findPlace(tx, version.childId));
  if (!print || !version || !place) return null;
  const content = version.content === null ? await wouldBe() : readContent(version.content);
  if (content === null) return null;
  const revised = isRevised(version.state);
  const signed = await listSignatures(tx, print.versionId);
  return {
    content,
    hospitalName: place.hospital,
    zone: place.zone,
    wardName: place.ward,
    bed: place.bed,
    watermark: WATERMARKS[version.state],
    signatures: signed.map((row) => toPaper(row, version.sha256, revised)),
    nameCorrectedSince: correctedName(content, place),
    print: {
      code,
      url: `${publicUrl}/p/${code}`,
      at: print.at,
      by: print.by,
      ledgerSeq: print.ledgerSeq,
      ledgerHash: await findLedgerHash(tx, print.ledgerSeq),
    },
  };
}
