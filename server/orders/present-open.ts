import { readContent } from '@shared/orders/build-content';
import type { OrderContent } from '@shared/orders/content';
import { isRevised } from '@shared/orders/states';
import { comparisonSchema } from '@shared/checks/form';
import { decimalText } from '@shared/canonical';
import type { OrderView, Signature } from '@shared/routes/orders';
import type { ChildHead } from '@shared/routes/children';
import { toRfc3339, type Instant } from '@shared/time';
import { asc, desc, eq, sql } from 'drizzle-orm';
import { accounts } from '../db/schema/accounts';
import { infusions } from '../db/schema/bedside';
import { products } from '../db/schema/shelf';
import { orderVersions } from '../db/schema/orders';
import { signatures } from '../db/schema/signatures';
import { statement } from '../db/statement';
import type { Tx } from '../db/transaction';
import { loadExceptions } from '../exceptions/present';
import type { CheckRow, LoadedVersion } from './facts';

export type OpenOrder = NonNullable<OrderView['open']>;

const contentOf = statement((tx) =>
  tx
    .select({ content: orderVersions.content })
    .from(orderVersions)
    .where(eq(orderVersions.id, sql.placeholder('versionId'))),
);

/** Everything of a version for someone who may see it; null while there is no content. */
export async function presentOpen(
  tx: Tx,
  { row, checks }: Pick<LoadedVersion, 'row' | 'checks'>,
  child: ChildHead,
): Promise<OpenOrder | null> {
  const [stored] = await contentOf(tx, { versionId: row.id });
  if (stored?.content == null || row.contentSha256 === null) return null;
  const content = readContent(stored.content);
  const decisive = latestLocked(checks);
  const names = await namesOf(tx, [row.authorId, ...(decisive ? [decisive.checkerId] : [])]);
  const { name = '', title = '' } = names.get(row.authorId) ?? {};
  return {
    content,
    contentSha256: row.contentSha256,
    author: { name, title },
    signatures: await loadSignatures(tx, row),
    exceptions: await loadExceptions(tx, row.id, content.limits),
    comparison: readComparison(decisive),
    checkerName: decisive ? (names.get(decisive.checkerId)?.name ?? null) : null,
    nameCorrectedSince: correctedName(content, child),
    infusions: await loadInfusions(tx, row.id),
  };
}

const readComparison = (check: CheckRow | undefined): OpenOrder['comparison'] =>
  check?.comparison ? comparisonSchema.parse(JSON.parse(check.comparison)) : null;

/** The check that says how the version stands: the newest whose figures were locked in. */
function latestLocked(checks: readonly CheckRow[]): CheckRow | undefined {
  return [...checks]
    .filter((check) => check.lockedInAt !== null)
    .sort((a, b) => (b.lockedInAt ?? 0) - (a.lockedInAt ?? 0))[0];
}

const peopleById = statement((tx) =>
  tx
    .select({ id: accounts.id, name: accounts.name, title: accounts.title })
    .from(accounts)
    .where(sql`${accounts.id} = any(${sql.placeholder('ids')}::uuid[])`),
);

async function namesOf(tx: Tx, ids: readonly string[]) {
  const rows = await peopleById(tx, { ids: `{${[...new Set(ids)].join(',')}}` });
  return new Map(rows.map((row) => [row.id, row]));
}

const signaturesOf = statement((tx) =>
  tx
    .select()
    .from(signatures)
    .where(eq(signatures.versionId, sql.placeholder('versionId')))
    .orderBy(asc(signatures.at)),
);

/** A signature is void when the version was revised or its bytes are no longer those that were signed. */
export async function loadSignatures(
  tx: Tx,
  row: Pick<LoadedVersion['row'], 'id' | 'state' | 'contentSha256'>,
): Promise<Signature[]> {
  const rows = await signaturesOf(tx, { versionId: row.id });
  return rows.map((signature) => ({
    meaning: signature.meaning,
    name: signature.printedName,
    role: signature.printedTitle,
    registrationNumber: signature.printedRegistrationNumber ?? '',
    at: toRfc3339(signature.at),
    how: signature.how === 'password' ? 'password typed again' : 'signed in',
    note: signature.note ?? '',
    isVoid: isRevised(row.state) || signature.contentSha256 !== row.contentSha256,
  }));
}

/** The child's name of today where it is another one than was signed. */
function correctedName({ child: signed }: OrderContent, child: ChildHead): string | null {
  const isSame = signed.surname === child.surname && signed.given === child.given;
  return isSame ? null : `${child.surname}, ${child.given}`;
}

const orNull = (at: Instant | null): string | null => (at === null ? null : toRfc3339(at));

const infusionsOf = statement((tx) =>
  tx
    .select({ infusion: infusions, product: products.name })
    .from(infusions)
    .innerJoin(products, eq(products.id, infusions.bagProductId))
    .where(eq(infusions.versionId, sql.placeholder('versionId')))
    .orderBy(desc(infusions.startedAt)),
);

async function loadInfusions(tx: Tx, versionId: string): Promise<OpenOrder['infusions']> {
  const rows = await infusionsOf(tx, { versionId });
  const people = rows.flatMap(({ infusion }) => [infusion.startedBy, infusion.endedBy ?? infusion.startedBy]);
  const names = people.length === 0 ? new Map<string, { name: string }>() : await namesOf(tx, people);
  return rows.map(({ infusion, product }) => ({
    id: infusion.id,
    startedAt: toRfc3339(infusion.startedAt),
    startedBy: names.get(infusion.startedBy)?.name ?? '',
    endedAt: orNull(infusion.endedAt),
    endedBy: infusion.endedBy === null ? null : (names.get(infusion.endedBy)?.name ?? null),
    endReason: infusion.endReason ?? '',
    bag: bagWords(infusion, product),
    line: infusion.line,
    pump: [infusion.pump, infusion.channel].filter(Boolean).join(', '),
    volumeInfusedMl: infusion.infusedMl === null ? null : decimalText(infusion.infusedMl, 1),
  }));
}

const bagWords = (infusion: typeof infusions.$inferSelect, product: string): string =>
  [
    product,
    infusion.bagVolumeMl === null ? '' : `${infusion.bagVolumeMl} mL`,
    infusion.bagBatch ? `batch ${infusion.bagBatch}` : '',
  ]
    .filter(Boolean)
    .join(', ');
