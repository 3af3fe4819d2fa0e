import type { Entitlement, Role } from '@shared/accounts/actor';
import { canonicalText } from '@shared/canonical';
import { FLAGS, type Flag, type Sex, type WeightMethod } from '@shared/calc/types';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { rulebookContent } from '@shared/rulebook/document';
import { instant, type Instant } from '@shared/time';
import { kilograms } from '@shared/units';
import type { Express } from 'express';
import { createHash, randomUUID } from 'node:crypto';
import { createServer, type Server } from 'node:http';
import { afterAll } from 'vitest';
import { makeApp } from '../../../server/app';
import { hashPassword } from '../../../server/auth/password';
import { fixedClock } from '../../../server/clock';
import { openDatabase, type Database } from '../../../server/db/client';
import { accounts, memberships } from '../../../server/db/schema/accounts';
import { logins } from '../../../server/db/schema/auth';
import { children, stays } from '../../../server/db/schema/children';
import { hospitals, wards } from '../../../server/db/schema/hospitals';
import { rulebooks } from '../../../server/db/schema/rulebook';
import { products } from '../../../server/db/schema/shelf';
import { weights } from '../../../server/db/schema/weights';
import { inTransaction, type Tx } from '../../../server/db/transaction';
import { parseEnv, type Env } from '../../../server/env';
import type { Deps } from '../../../server/http/deps';
import { makeLog } from '../../../server/http/make-log';
import { signedIn, type Client } from './client';
import { SHELF } from './shelf';

/** Wednesday 10 June 2026, 12:00 in London. */
export const NOON = instant(Date.UTC(2026, 5, 10, 11));
export const PASSWORD = 'larch-ferry-48-kestrel';
export const PUBLIC_URL = 'http://127.0.0.1:3100';

type Cast = {
  name: string;
  title: string;
  roles: Role[];
  wards: string[];
  entitlements: Entitlement[];
  reg?: null;
};

const both = ['Heron', 'Curlew'];

/** Invented people, one or two of every sort. */
const CAST = {
  doctor: { name: 'Imogen Vale', title: 'Registrar', roles: ['prescriber'], wards: both, entitlements: [] },
  otherDoctor: {
    name: 'Tobias Renn',
    title: 'Senior house officer',
    roles: ['prescriber'],
    wards: both,
    entitlements: [],
  },
  checker: {
    name: 'Piers Okonjo',
    title: 'Registrar',
    roles: ['prescriber'],
    wards: both,
    entitlements: ['checking'],
  },
  otherChecker: {
    name: 'Maud Ferrier',
    title: 'Registrar',
    roles: ['prescriber'],
    wards: both,
    entitlements: ['checking'],
  },
  senior: {
    name: 'Halina Brandt',
    title: 'Consultant',
    roles: ['prescriber'],
    wards: both,
    entitlements: ['senior', 'checking'],
  },
  nurse: {
    name: 'Orla Finch',
    title: 'Staff nurse',
    roles: ['nurse'],
    wards: both,
    entitlements: ['witness'],
  },
  otherNurse: {
    name: 'Samir Lund',
    title: 'Charge nurse',
    roles: ['nurse'],
    wards: both,
    entitlements: ['checking', 'witness'],
  },
  pharmacist: {
    name: 'Beatrix Amadi',
    title: 'Pharmacist',
    roles: ['pharmacist'],
    wards: both,
    entitlements: ['checking'],
  },
  lead: {
    name: 'Conrad Ilves',
    title: 'Ward lead',
    roles: ['lead', 'nurse'],
    wards: ['Heron'],
    entitlements: [],
  },
  admin: {
    name: 'Wilma Stroud',
    title: 'Administrator',
    roles: ['administrator'],
    wards: [],
    entitlements: [],
  },
  /** On Curlew alone. */
  elsewhere: {
    name: 'Jonas Peel',
    title: 'Registrar',
    roles: ['prescriber'],
    wards: ['Curlew'],
    entitlements: ['checking'],
  },
  /** Without a registration number. */
  unregistered: {
    name: 'Nia Quist',
    title: 'Foundation doctor',
    roles: ['prescriber'],
    wards: both,
    entitlements: [],
    reg: null,
  },
} satisfies Record<string, Cast>;

export type PersonKey = keyof typeof CAST;
export type Person = {
  id: string;
  loginId: string;
  email: string;
  name: string;
  title: string;
  roles: Role[];
  registrationNumber: string | null;
};

export type World = {
  hospitalId: string;
  zone: string;
  wards: { heron: string; curlew: string };
  people: Record<PersonKey, Person>;
  rulebook: { id: string; number: number; sha256: string };
  /** Product ids by name. */
  products: Record<string, string>;
  clock: ReturnType<typeof fixedClock>;
  deps: Deps;
  app: Express;
  server: Server;
  /** Lines the server logged, oldest first. */
  log: Record<string, unknown>[];
  /** A client signed in as that person, with Origin and a new Idempotency-Key for every act. */
  as(person: PersonKey): Client;
  /** Runs as the owner inside this hospital: to plant and to look. */
  within<T>(work: (tx: Tx) => Promise<T>): Promise<T>;
  addChild(change?: ChildChange): Promise<string>;
  addWeight(childId: string, change?: WeightChange): Promise<string>;
};

export type ChildChange = {
  ward?: 'heron' | 'curlew' | null;
  bed?: string;
  number?: string;
  surname?: string;
  given?: string;
  bornOn?: string;
  bornAt?: Instant;
  sex?: Sex | null;
  gestationWeeks?: number | null;
  gestationDays?: number | null;
  flags?: Flag[];
  allergies?: string;
  /** Weighed an hour ago on standing scales; null for a child nobody has weighed. */
  kg?: number | null;
};

export type WeightChange = {
  kg?: number;
  method?: WeightMethod;
  at?: Instant;
  by?: PersonKey;
  needs?: 'nothing' | 'second-measurement' | 'second-person';
};

const HOUR = 3_600_000;
const pools = new Map<string, Database>();
const servers: Server[] = [];
let passwordHash: Promise<string> | undefined;

afterAll(async () => {
  await Promise.all(servers.map((server) => new Promise((closed) => server.close(closed))));
  await Promise.all([...pools.values()].map((pool) => pool.close()));
});

/** One pool for each address in a test file; every world looks at it with its own clock. */
function poolOf(url: string): Database {
  const known = pools.get(url);
  if (known) return known;
  const made = openDatabase(url, { max: 10, applicationName: 'test-world' });
  pools.set(url, made);
  return made;
}

const sha256 = (text: string): string => createHash('sha256').update(text, 'utf8').digest('hex');

/** A hospital of its own: two wards, people of every sort, rulebook 1 in force, the shelf, an application. */
export async function makeWorld(
  urls: { ownerUrl: string; appUrl: string },
  options: { now?: number; env?: Record<string, string>; rates?: { all: number; signIn: number } } = {},
): Promise<World> {
  const clock = fixedClock(options.now ?? NOON);
  const owner: Database = { ...poolOf(urls.ownerUrl), clock };
  const [hospital] = await owner.db
    .insert(hospitals)
    .values({ name: `Invented Hospital ${randomUUID()}`, zone: 'Europe/London' })
    .returning();
  const hospitalId = hospital!.id;
  const within: World['within'] = (work) => inTransaction(owner, hospitalId, 'read write', work);
  const wardIds = await within(async (tx) => {
    const rows = await tx
      .insert(wards)
      .values([{ name: 'Heron' }, { name: 'Curlew' }])
      .returning();
    return { heron: rows[0]!.id, curlew: rows[1]!.id };
  });
  const people = await addPeople(owner, hospitalId, wardIds, within);
  const rulebook = await within((tx) => addRulebook(tx, people, clock.now()));
  const shelf = await within((tx) =>
    tx
      .insert(products)
      .values(SHELF.map((row) => ({ ...row, addedAt: clock.now() })))
      .returning(),
  );

  const { deps, log } = makeDeps({ ...poolOf(urls.appUrl), clock }, urls, options.env);
  const app = makeApp(deps, { rates: options.rates ?? { all: 1e6, signIn: 1e6 } });
  const server = createServer(app).listen(0, '127.0.0.1');
  servers.push(server);
  let numbers = 0;
  const addWeight: World['addWeight'] = (childId, change = {}) =>
    within((tx) =>
      insertWeight(tx, { childId, now: clock.now(), by: people[change.by ?? 'nurse'].id }, change),
    );
  return {
    hospitalId,
    zone: 'Europe/London',
    wards: wardIds,
    people,
    rulebook,
    products: Object.fromEntries(shelf.map(({ name, id }) => [name, id])),
    clock,
    deps,
    app,
    server,
    log,
    within,
    as: (key) => signedIn({ deps, server, loginId: people[key].loginId }),
    async addChild(change = {}) {
      const childId = await within((tx) =>
        insertChild(tx, { by: people.nurse.id, wardIds, now: clock.now(), number: ++numbers }, change),
      );
      if (change.kg !== null) await addWeight(childId, { kg: change.kg ?? 16.4 });
      return childId;
    },
    addWeight,
  };
}

function makeDeps(
  db: Database,
  urls: { ownerUrl: string; appUrl: string },
  change: Record<string, string> = {},
) {
  const env: Env = parseEnv({
    NODE_ENV: 'test',
    DATABASE_URL: urls.appUrl,
    DATABASE_OWNER_URL: urls.ownerUrl,
    PUBLIC_URL,
    SMTP_URL: 'smtp://127.0.0.1:1',
    LOG_LEVEL: 'info',
    ...change,
  });
  const log: Record<string, unknown>[] = [];
  const to = { write: (line: string) => void log.push(JSON.parse(line) as Record<string, unknown>) };
  const deps: Deps = { db, clock: db.clock, env, log: makeLog(env.LOG_LEVEL, to) };
  return { deps, log };
}

async function addPeople(
  owner: Database,
  hospitalId: string,
  wardIds: World['wards'],
  within: World['within'],
): Promise<Record<PersonKey, Person>> {
  passwordHash ??= hashPassword(PASSWORD);
  const stored = await passwordHash;
  const cast = Object.entries(CAST) as [PersonKey, Cast][];
  const run = randomUUID().slice(0, 8);
  const loginRows = await owner.db
    .insert(logins)
    .values(
      cast.map(([key]) => ({ hospitalId, email: `${key}-${run}@brimline.example`, passwordHash: stored })),
    )
    .returning();
  return within(async (tx) => {
    const rows = await tx
      .insert(accounts)
      .values(
        cast.map(([key, { name, title, roles, reg }], i) => ({
          loginId: loginRows[i]!.id,
          name,
          title,
          roles,
          registrationNumber: reg === null || key === 'admin' ? null : `REG-${1000 + i}`,
        })),
      )
      .returning();
    await tx.insert(memberships).values(
      cast.flatMap(([, { wards: names, entitlements }], i) =>
        names.map((name) => ({
          accountId: rows[i]!.id,
          wardId: name === 'Heron' ? wardIds.heron : wardIds.curlew,
          entitlements,
        })),
      ),
    );
    const people = cast.map(([key], i) => {
      const { id, loginId, name, title, roles, registrationNumber } = rows[i]!;
      return [key, { id, loginId, email: loginRows[i]!.email, name, title, roles, registrationNumber }];
    });
    return Object.fromEntries(people) as Record<PersonKey, Person>;
  });
}

async function addRulebook(
  tx: Tx,
  people: Record<PersonKey, Person>,
  now: Instant,
): Promise<World['rulebook']> {
  const content = canonicalText(rulebookContent(DEFAULT_RULEBOOK));
  const [row] = await tx
    .insert(rulebooks)
    .values({
      number: 1,
      state: 'in-force',
      content,
      contentSha256: sha256(content),
      draftedBy: people.lead.id,
      draftedAt: now,
      approvedBy: people.pharmacist.id,
      approvedAt: now,
      inForceFrom: now,
    })
    .returning();
  return { id: row!.id, number: 1, sha256: sha256(content) };
}

type ChildPlace = { by: string; wardIds: World['wards']; now: Instant; number: number };

async function insertChild(tx: Tx, place: ChildPlace, change: ChildChange): Promise<string> {
  const [child] = await tx
    .insert(children)
    .values({
      number: change.number ?? `SM-${String(place.number).padStart(4, '0')}`,
      surname: change.surname ?? 'Thorne',
      given: change.given ?? 'Marlow',
      bornOn: change.bornOn ?? '2022-03-14',
      bornAt: change.bornAt,
      sex: change.sex === undefined ? 'male' : change.sex,
      gestationWeeks: change.gestationWeeks === undefined ? 40 : change.gestationWeeks,
      gestationDays: change.gestationDays ?? null,
      flags: FLAGS.filter((flag) => change.flags?.includes(flag)),
      allergies: change.allergies ?? 'None known',
      registeredBy: place.by,
      registeredAt: instant(place.now - 2 * HOUR),
    })
    .returning();
  if (change.ward !== null) {
    await tx.insert(stays).values({
      childId: child!.id,
      wardId: place.wardIds[change.ward ?? 'heron'],
      bed: change.bed ?? String(place.number),
      from: instant(place.now - 2 * HOUR),
    });
  }
  return child!.id;
}

async function insertWeight(
  tx: Tx,
  place: { childId: string; now: Instant; by: string },
  change: WeightChange,
): Promise<string> {
  const [row] = await tx
    .insert(weights)
    .values({
      childId: place.childId,
      kg: kilograms(change.kg ?? 16.4),
      method: change.method ?? 'scales',
      at: change.at ?? instant(place.now - HOUR),
      by: place.by,
      recordedAt: place.now,
      needs: change.needs ?? 'nothing',
    })
    .returning();
  return row!.id;
}
