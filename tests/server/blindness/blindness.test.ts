import { emptyCheckForm } from '@shared/checks/form';
import { PRINT_PDF_PATH, ROUTES, type RouteName } from '@shared/routes';
import type { RouteDefinition } from '@shared/routes/define';
import { instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import type { Response } from 'supertest';
import { beforeAll, describe, expect, it } from 'vitest';
import { orderVersions } from '../../../server/db/schema/orders';
import { outbox } from '../../../server/db/schema/outbox';
import { products } from '../../../server/db/schema/shelf';
import { letterText } from './letter-text';
import { sharedDatabase } from '../support/database';
import { anonymous } from '../support/client';
import {
  bedsideEntries,
  checkForm,
  fillDraft,
  lockIn,
  makeDraft,
  signDraft,
  type MadeOrder,
} from '../support/make-order';
import { makeWorld, PASSWORD, type PersonKey, type World } from '../support/world';
import { leaksIn, leaksInText, type Planted } from './search-bytes';

/**
 * The author takes the older of two chart weights: 1000 + 0.976 × 50 = 1048.8 mL, 43.7 mL/h, 1005 mL in 23 h. No
 * running order, result or limit is alike, so that a planted string in an answer came from the order.
 */
const OLDER_KG = 10.976;
const FLUID = 'Planted crystalloid 141 + glucose 5%';
const NOTES = {
  fractionReason: 'planted-fraction-words',
  feedsNote: 'planted-feeds-words',
  drugsNote: 'planted-drugs-words',
};
const AUTHOR: PersonKey = 'otherDoctor';
/** Everyone who may become the checker, and everyone who may not. */
const READERS: readonly PersonKey[] = [
  'otherChecker',
  'otherNurse',
  'pharmacist',
  'lead',
  'nurse',
  'doctor',
  'senior',
  'elsewhere',
  'unregistered',
  'admin',
];
/** One of each sort that is refused in its own way. */
const ACTORS: readonly PersonKey[] = ['otherChecker', 'pharmacist', 'lead', 'nurse', 'senior', 'elsewhere'];
const STATES = ['draft', 'awaiting-check', 'disputed', 'returned', 'withdrawn', 'revised', 'lapsed'] as const;
type Covered = (typeof STATES)[number];

let world: World;
let planted: Planted;
const prints: string[] = [];
const made = {} as Record<Covered, MadeOrder>;

async function plantProduct(): Promise<void> {
  const [row] = await world.within((tx) =>
    tx
      .insert(products)
      .values({
        name: FLUID,
        base: FLUID,
        sodium: 141,
        chloride: 141,
        glucose: 50,
        osmolarity: 570,
        bagSizes: [500, 1000],
        kinds: ['maintenance'],
        addedAt: world.clock.now(),
      })
      .returning(),
  );
  world.products[FLUID] = row!.id;
}

type Weighed = { childId: string; weightId: string };

/** A child whose newest weight is another one than the author takes. */
async function plantChild(): Promise<Weighed> {
  const childId = await world.addChild({ bornOn: '2025-03-14', kg: null });
  const now = world.clock.now();
  const weightId = await world.addWeight(childId, { kg: OLDER_KG, at: instant(now - 20 * 3_600_000) });
  await world.addWeight(childId, { kg: 11.5, at: instant(now - 3_600_000) });
  return { childId, weightId };
}

async function plantOrder(state: Covered, weights: string[], shas: string[]): Promise<MadeOrder> {
  const { childId, weightId } = await plantChild();
  weights.push(weightId);
  const form = { weightId, fraction: 'full', hours: '23', ...NOTES };
  const change = { author: AUTHOR, product: FLUID, form };
  const draft = await makeDraft(world, childId, change);
  if (state === 'draft') return draft;
  const seen = { rateMlPerH: '43.7', volumeMl: '1005.0' };
  await signDraft(world, draft, { author: AUTHOR, seen });
  const params = { id: draft.versionId };
  const [row] = await world.within((tx) =>
    tx.select().from(orderVersions).where(eq(orderVersions.id, draft.versionId)),
  );
  shas.push(row!.contentSha256!);
  await moveTo(state, params, { ...draft, weightId }, change);
  return draft;
}

type Moved = MadeOrder & { weightId: string };

async function moveTo(
  state: Covered,
  params: { id: string },
  order: Moved,
  change: Parameters<typeof fillDraft>[3],
) {
  const author = world.as(AUTHOR);
  const reason = 'planted for a test';
  const cannotVerify = () =>
    world.as('checker').call(ROUTES.cannotVerify, {
      params,
      body: { what: 'weight', reason: 'order has 43.7, 10.976 kg is old' },
    });
  if (state === 'disputed') {
    const form = checkForm({
      age: '1',
      weightKg: '11.5',
      fraction: 'full',
      hours: '23',
      base: FLUID,
      rate: '44.8',
      volumeMl: '1030',
    });
    const locked = await lockIn(world, 'checker', order.versionId, form);
    expect(locked.body, locked.text).toMatchObject({ state: 'disputed' });
  }
  if (state === 'returned' || state === 'revised') expect((await cannotVerify()).status).toBe(200);
  if (state === 'withdrawn')
    expect((await author.call(ROUTES.withdraw, { params, body: { reason } })).status).toBe(200);
  if (state === 'lapsed') {
    const now = world.clock.now();
    await world.within((tx) =>
      tx
        .update(orderVersions)
        .set({ state: 'lapsed', stateSince: now, endedAt: now })
        .where(eq(orderVersions.id, params.id)),
    );
  }
  if (state === 'revised') {
    const revised = await author.call(ROUTES.revise, { params });
    const next = (revised.body as { versionId: string }).versionId;
    await fillDraft(world, order.childId, next, change);
  }
}

beforeAll(async () => {
  world = await makeWorld(sharedDatabase());
  await plantProduct();
  const weights: string[] = [];
  const shas: string[] = [];
  for (const state of STATES) made[state] = await plantOrder(state, weights, shas);
  const author = world.people[AUTHOR];
  planted = {
    anywhere: ['43.7', '1005.0', '1005 mL', '1048.8', ...Object.values(NOTES), ...shas],
    asChoice: [author.name, author.id, FLUID, world.products[FLUID]!, '10.976', ...weights],
  };
  for (const state of STATES) {
    const print = await world.as(AUTHOR).call(ROUTES.makePrint, { params: { id: made[state].versionId } });
    if (print.status === 200) prints.push((print.body as { code: string }).code);
  }
}, 60_000);

const isRead = ([, route]: [string, RouteDefinition]): boolean => route.method === 'GET';
const READS = (Object.entries(ROUTES) as [RouteName, RouteDefinition][]).filter(isRead);

/** Every id a reader could put into a path. */
const ids = (): string[] => [
  ...STATES.flatMap((state) => [made[state].versionId, made[state].orderId, made[state].childId]),
  world.wards.heron,
  world.wards.curlew,
];

async function readAll(person: PersonKey): Promise<[path: string, answer: Response][]> {
  const client = world.as(person);
  const answers: [string, Response][] = [];
  for (const [name, route] of READS) {
    const keys = route.path.includes(':id') ? ids() : route.path.includes(':code') ? prints : [''];
    for (const key of keys) {
      const params = { id: key, code: key };
      answers.push([`${name} ${key}`, await client.call(route, { params })]);
    }
  }
  for (const code of prints)
    answers.push([`pdf ${code}`, await client.get(PRINT_PDF_PATH.replace(':code', code))]);
  const search = await client.call(ROUTES.searchChildren, { body: { text: 'Thorne' } });
  return [...answers, ['search', search]];
}

/** Acts that are refused to a reader: what their problem documents say. */
async function refusedActs(person: PersonKey, versionId: string): Promise<[string, Response][]> {
  const client = world.as(person);
  const params = { id: versionId };
  const reason = 'trying it out';
  const entries = bedsideEntries(world, 'SM-0001');
  const wrong = checkForm({ initials: 'ZZ' });
  const acts: [string, RouteDefinition, unknown][] = [
    ['lock in the wrong child', ROUTES.lockIn, { form: wrong }],
    ['lock in nothing', ROUTES.lockIn, { form: emptyCheckForm() }],
    [
      'sign the check',
      ROUTES.signCheck,
      { contentSha256: 'a'.repeat(64), acceptReason: null, password: PASSWORD },
    ],
    ['slip', ROUTES.slip, { reason }],
    [
      'sign',
      ROUTES.sign,
      { rev: 1, seen: { rateMlPerH: '1.0', volumeMl: '1.0', rulebook: 1 }, password: PASSWORD },
    ],
    ['save', ROUTES.saveDraft, { rev: 1, form: {} }],
    ['discard', ROUTES.discardDraft, {}],
    ['print', ROUTES.makePrint, {}],
    ['start', ROUTES.recordStart, { entries, witness: null, replacesVersionId: null }],
    ['compare', ROUTES.compareStep, { step: 'pump', entries }],
    ['stop', ROUTES.stop, { reason, volumeInfusedMl: null }],
    ['hold', ROUTES.hold, { reason }],
    ['countersign', ROUTES.countersignGiven, { agree: true, form: wrong, reason: '', password: PASSWORD }],
    ['beside', ROUTES.openBeside, { email: world.people.nurse.email, password: PASSWORD }],
    [
      'decide',
      ROUTES.decideException,
      { agree: true, contentSha256: 'a'.repeat(64), reason, password: PASSWORD },
    ],
  ];
  const answers: [string, Response][] = [];
  for (const [name, route, body] of acts) answers.push([name, await client.call(route, { params, body })]);
  return answers;
}

const leaksOf = (answers: [string, Response][]): string[] =>
  answers.flatMap(([path, answer]) => leaksIn(answer, planted).map((leak) => `${path}: ${leak}`));

describe('blind by construction', () => {
  it('the searcher finds what is planted', () => {
    const answer = (body: unknown) => ({ text: JSON.stringify(body), headers: {} });
    expect(leaksIn(answer({ detail: 'the order says 43.7 mL/h' }), planted)).toEqual(['43.7']);
    expect(leaksIn(answer({ rows: [{ author: world.people[AUTHOR].name }] }), planted)).toEqual([
      world.people[AUTHOR].name,
    ]);
    expect(leaksIn(answer({ order: { fluid: FLUID } }), planted)).toEqual([FLUID]);
    expect(leaksIn({ text: '', headers: { location: '/43.7' } }, planted)).toEqual(['43.7']);
    // the chart and the shelf are what a checker reads
    expect(leaksIn(answer({ weights: [{ kg: '10.976' }], products: [{ name: FLUID }] }), planted)).toEqual(
      [],
    );
    expect(leaksIn(answer({ products: [{ name: '43.7' }] }), planted)).toEqual(['43.7']);
  });

  it('the author sees it all: the walk does pass where the figures are', async () => {
    const found = leaksOf(await readAll(AUTHOR)).join('\n');
    for (const secret of ['43.7', '1005.0', '1048.8', FLUID, ...Object.values(NOTES)])
      expect(found).toContain(secret);
    expect(prints.length).toBeGreaterThan(0);
  });

  it('every order is in the state it was planted for', async () => {
    const rows = await world.within((tx) => tx.select().from(orderVersions));
    for (const state of STATES) {
      expect(rows.find(({ id }) => id === made[state].versionId)?.state, state).toBe(state);
    }
  });

  it.each(READERS)(
    'nothing that %s can read holds a planted figure, fluid, weight, word or the author',
    async (person) => {
      const answers = await readAll(person);
      expect(answers.length).toBeGreaterThan(100);
      expect(leaksOf(answers)).toEqual([]);
      expect(answers.filter(([, { type }]) => type === 'application/pdf')).toEqual([]);
    },
    60_000,
  );

  it.each(ACTORS)(
    'no refused act of %s says one',
    async (person) => {
      for (const state of STATES) {
        const answers = await refusedActs(person, made[state].versionId);
        expect(
          answers.filter(([, { status }]) => status < 400).map(([name]) => name),
          state,
        ).toEqual([]);
        expect(leaksOf(answers), state).toEqual([]);
      }
    },
    60_000,
  );

  it('nor does anyone who is not signed in', async () => {
    const client = anonymous(world.deps, world.server);
    for (const [, route] of READS) {
      for (const key of route.path.includes(':code') ? prints : ids()) {
        expect(leaksIn(await client.call(route, { params: { id: key, code: key } }), planted)).toEqual([]);
      }
    }
  });

  it('no mail and no line of the log holds one', async () => {
    const rows = await world.within((tx) => tx.select().from(outbox));
    expect(rows.length).toBeGreaterThan(0);
    const notTheAuthor = rows.filter(({ toAccount }) => toAccount !== world.people[AUTHOR].id);
    expect(notTheAuthor.flatMap((row) => leaksInText(JSON.stringify(row.ref), planted))).toEqual([]);
    expect(rows.flatMap((row) => leaksInText(letterText(row), planted))).toEqual([]);
    // the machine’s own time of a line may read …:43.7
    const log = JSON.stringify(world.log, (key, value: unknown) => (key === 'time' ? undefined : value));
    expect(leaksInText(log, { ...planted, asChoice: [FLUID, world.people[AUTHOR].name] })).toEqual([]);
  });

  it('one who looked at everything can still check, and sees it only then', async () => {
    const { versionId } = made['awaiting-check'];
    const page = await world.as('otherChecker').call(ROUTES.checkPage, { params: { id: versionId } });
    expect(page.body).toMatchObject({ hasSeenFigures: false, uncovered: null });
    const form = checkForm({
      age: '1',
      weightKg: '10.976',
      fraction: 'full',
      hours: '23',
      base: FLUID,
      rate: '43.7',
      volumeMl: '1005',
    });
    const locked = await lockIn(world, 'otherChecker', versionId, form);
    expect(locked.body).toMatchObject({ uncovered: { comparison: { outcome: 'agreed' } } });
    expect(leaksIn(locked, planted)).toEqual(
      expect.arrayContaining(['43.7', FLUID, world.people[AUTHOR].name]),
    );
    // and still nobody else does
    const other = await world.as('otherNurse').call(ROUTES.checkPage, { params: { id: versionId } });
    expect(leaksIn(other, planted)).toEqual([]);
  });
});
