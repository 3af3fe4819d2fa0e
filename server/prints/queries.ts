import { and, desc, eq, isNull } from 'drizzle-orm';
import { accounts } from '../db/schema/accounts';
import { prints } from '../db/schema/bedside';
import { children, stays } from '../db/schema/children';
import { hospitals, wards } from '../db/schema/hospitals';
import { ledger, ledgerHeads } from '../db/schema/ledger';
import { orderVersions } from '../db/schema/orders';
import { signatures } from '../db/schema/signatures';
import type { Tx } from '../db/transaction';

export const findByCode = async (tx: Tx, code: string) => {
  const [row] = await tx
    .select({ versionId: prints.versionId, at: prints.at, ledgerSeq: prints.ledgerSeq, by: accounts.name })
    .from(prints)
    .innerJoin(accounts, eq(accounts.id, prints.by))
    .where(eq(prints.code, code));
  return row ?? null;
};

/** State and number of a version: all that a paper's page may say to a stranger. */
export const findStanding = async (tx: Tx, versionId: string) => {
  const [row] = await tx
    .select({
      state: orderVersions.state,
      version: orderVersions.version,
      lapsesAt: orderVersions.lapsesAt,
      startBy: orderVersions.startBy,
    })
    .from(orderVersions)
    .where(eq(orderVersions.id, versionId));
  return row ?? null;
};

export const findContent = async (tx: Tx, versionId: string) => {
  const [row] = await tx
    .select({
      content: orderVersions.content,
      sha256: orderVersions.contentSha256,
      state: orderVersions.state,
      childId: orderVersions.childId,
    })
    .from(orderVersions)
    .where(eq(orderVersions.id, versionId));
  return row ?? null;
};

export const findPlace = async (tx: Tx, childId: string) => {
  const [row] = await tx
    .select({
      surname: children.surname,
      given: children.given,
      hospital: hospitals.name,
      zone: hospitals.zone,
      ward: wards.name,
      bed: stays.bed,
    })
    .from(children)
    .innerJoin(hospitals, eq(hospitals.id, children.hospitalId))
    .leftJoin(stays, and(eq(stays.childId, children.id), isNull(stays.to)))
    .leftJoin(wards, eq(wards.id, stays.wardId))
    .where(eq(children.id, childId));
  return row ?? null;
};

export const listSignatures = (tx: Tx, versionId: string) =>
  tx.select().from(signatures).where(eq(signatures.versionId, versionId)).orderBy(signatures.at);

export const latestPrint = async (tx: Tx, versionId: string) => {
  const [row] = await tx
    .select({ code: prints.code })
    .from(prints)
    .where(eq(prints.versionId, versionId))
    .orderBy(desc(prints.at))
    .limit(1);
  return row ?? null;
};

/** The chain's newest row, as it stands on a paper. */
export const findHead = async (tx: Tx) => {
  const [row] = await tx.select({ seq: ledgerHeads.seq, hash: ledgerHeads.hash }).from(ledgerHeads);
  return row ?? null;
};

export const findLedgerHash = async (tx: Tx, seq: number) => {
  const [row] = await tx.select({ hash: ledger.hash }).from(ledger).where(eq(ledger.seq, seq));
  return row?.hash ?? '';
};
