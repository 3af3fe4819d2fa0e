import type { Entitlement, Role } from '@shared/accounts/actor';
import { canonicalText } from '@shared/canonical';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { rulebookContent } from '@shared/rulebook/document';
import { DEFAULT_SHELF } from '@shared/shelf/default';
import type { Instant } from '@shared/time';
import { createHash } from 'node:crypto';
import type { Database } from '../db/client';
import { done, inHospital, theProgram } from '../db/in-hospital';
import { accounts, memberships } from '../db/schema/accounts';
import { logins } from '../db/schema/auth';
import { hospitals, wards } from '../db/schema/hospitals';
import { rulebooks } from '../db/schema/rulebook';
import { products } from '../db/schema/shelf';
import type { Tx } from '../db/transaction';
import type { LedgerNote } from '../ledger/entries';

/** One who works at a hospital that is about to be made; `at` are ward names. */
export type NewPerson = {
  email: string;
  name: string;
  title: string;
  roles: readonly Role[];
  entitlements: readonly Entitlement[];
  at: readonly string[];
  registrationNumber: string | null;
};

export type NewHospital<Key extends string> = {
  name: string;
  zone: string;
  wards: readonly { name: string; isHighDependency?: boolean }[];
  people: Readonly<Record<Key, NewPerson>>;
  /** Drafts and approves rulebook 1. */
  rulebookBy: readonly [draftedBy: NoInfer<Key>, approvedBy: NoInfer<Key>];
  /** argon2id of the one password everybody has. */
  passwordHash: string;
};

export type MadePerson = NewPerson & { id: string; loginId: string };

export type MadeHospital<Key extends string> = {
  id: string;
  zone: string;
  /** Ids by ward name. */
  wards: Record<string, string>;
  people: Record<Key, MadePerson>;
  /** Ids by product name. */
  products: Record<string, string>;
  rulebook: { id: string; number: number; sha256: string };
};

type People<Key extends string> = MadeHospital<Key>['people'];

const sha256 = (text: string): string => createHash('sha256').update(text, 'utf8').digest('hex');

/**
 * Makes what no screen makes yet: a hospital with wards, accounts, rulebook 1 and the default shelf, told to the
 * ledger. `owner` is a pool with the owner's address; its clock is the time of all of it.
 */
export async function makeHospital<Key extends string>(
  owner: Database,
  wanted: NewHospital<Key>,
): Promise<MadeHospital<Key>> {
  const { name, zone } = wanted;
  const [row] = await owner.db.insert(hospitals).values({ name, zone }).returning();
  const id = row!.id;
  const keys = Object.keys(wanted.people) as Key[];
  const loginRows = await owner.db
    .insert(logins)
    .values(
      keys.map((key) => ({
        hospitalId: id,
        email: wanted.people[key].email,
        passwordHash: wanted.passwordHash,
      })),
    )
    .returning();
  const loginIds = Object.fromEntries(keys.map((key, at) => [key, loginRows[at]!.id])) as Record<Key, string>;

  const made = await inHospital(owner, theProgram(id), {}, async (tx, now) => {
    const wardIds = await addWards(tx, wanted.wards);
    const people = await addPeople(tx, wanted.people, loginIds, wardIds);
    const [draftedBy, approvedBy] = wanted.rulebookBy;
    const rulebook = await addRulebook(tx, people[draftedBy].id, people[approvedBy].id, now);
    const shelf = await addShelf(tx, now);
    const hospital = { id, zone, wards: wardIds, people, rulebook, products: shelf };
    return done(hospital, { entries: notes(hospital, name) });
  });
  if (!made.ok) throw new Error(`the hospital was not made: ${made.code}`);
  return made.value;
}

async function addWards(tx: Tx, wanted: NewHospital<string>['wards']): Promise<Record<string, string>> {
  const rows = await tx
    .insert(wards)
    .values(wanted.map(({ name, isHighDependency }) => ({ name, isHighDependency })))
    .returning();
  return Object.fromEntries(rows.map(({ name, id }) => [name, id]));
}

async function addPeople<Key extends string>(
  tx: Tx,
  wanted: NewHospital<Key>['people'],
  loginIds: Record<Key, string>,
  wardIds: Record<string, string>,
): Promise<People<Key>> {
  const keys = Object.keys(wanted) as Key[];
  const rows = await tx
    .insert(accounts)
    .values(
      keys.map((key) => {
        const { name, title, roles, registrationNumber } = wanted[key];
        return { loginId: loginIds[key], name, title, roles: [...roles], registrationNumber };
      }),
    )
    .returning();
  const ids = new Map(rows.map((row) => [row.loginId, row.id]));
  const people = Object.fromEntries(
    keys.map((key) => [
      key,
      { ...wanted[key], id: ids.get(loginIds[key]) ?? '', loginId: loginIds[key] } satisfies MadePerson,
    ]),
  ) as People<Key>;
  const places = keys.flatMap((key) =>
    wanted[key].at.map((ward) => ({
      accountId: people[key].id,
      wardId: wardIds[ward] ?? '',
      entitlements: [...wanted[key].entitlements],
    })),
  );
  await tx.insert(memberships).values(places);
  return people;
}

async function addRulebook(
  tx: Tx,
  draftedBy: string,
  approvedBy: string,
  now: Instant,
): Promise<MadeHospital<string>['rulebook']> {
  const content = canonicalText(rulebookContent(DEFAULT_RULEBOOK));
  const contentSha256 = sha256(content);
  const { number } = DEFAULT_RULEBOOK;
  const [row] = await tx
    .insert(rulebooks)
    .values({
      number,
      state: 'in-force',
      content,
      contentSha256,
      draftedBy,
      draftedAt: now,
      approvedBy,
      approvedAt: now,
      inForceFrom: now,
    })
    .returning();
  return { id: row!.id, number, sha256: contentSha256 };
}

async function addShelf(tx: Tx, now: Instant): Promise<Record<string, string>> {
  const rows = await tx
    .insert(products)
    .values(
      DEFAULT_SHELF.map((fluid, position) => ({
        name: fluid.name,
        base: fluid.base,
        addedPotassium: fluid.addedPotassium,
        sodium: fluid.sodium,
        potassium: fluid.potassium,
        chloride: fluid.chloride,
        calcium: fluid.calcium,
        magnesium: fluid.magnesium,
        lactate: fluid.lactate,
        acetate: fluid.acetate,
        gluconate: fluid.gluconate,
        glucose: fluid.glucoseGPerL,
        osmolarity: fluid.osmolarity,
        bagSizes: [...fluid.bagSizes],
        isReadyMixed: fluid.readyMixed,
        isHighRisk: fluid.highRisk,
        kinds: [...fluid.permittedKinds],
        isNewbornOnly: fluid.newbornOnly,
        position,
        addedAt: now,
      })),
    )
    .returning({ id: products.id, name: products.name });
  return Object.fromEntries(rows.map(({ name, id }) => [name, id]));
}

function notes(hospital: MadeHospital<string>, name: string): LedgerNote[] {
  const { id, wards: wardIds, people, products: shelf, rulebook } = hospital;
  const note = (act: LedgerNote['act'], kind: string, subject: string, to: LedgerNote['to']): LedgerNote => ({
    act,
    subject: { kind, id: subject },
    to,
  });
  return [
    note('hospital-added', 'hospital', id, name),
    ...Object.entries(wardIds).map(([ward, wardId]) => note('ward-added', 'ward', wardId, ward)),
    ...Object.values(people).map((person) =>
      note('account-added', 'account', person.id, { name: person.name, roles: [...person.roles] }),
    ),
    ...Object.entries(shelf).map(([product, productId]) =>
      note('product-added', 'product', productId, product),
    ),
    note('rulebook-in-force', 'rulebook', rulebook.id, {
      number: rulebook.number,
      sha256: rulebook.sha256,
    }),
  ];
}
