import { emptyCheckForm } from '@shared/checks/form';
import { emptyOrderForm } from '@shared/orders/form';
import { ROUTES, type RouteName } from '@shared/routes';
import type { RouteDefinition } from '@shared/routes/define';
import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { sharedDatabase } from '../support/database';
import { anonymous } from '../support/client';
import { makeWorld, PASSWORD, type World } from '../support/world';

/** A body each route's schema takes, so that permission and not parsing decides. */
const UUID = randomUUID();
const entries = {
  child: { number: '1', bornOn: '2022-03-14', saidBy: 'Mother' },
  bag: { productId: UUID, sizeMl: '500', batch: '', expiry: '2030-01-01', bagNumber: '' },
  pump: { device: '', channel: '', rate: '1', volume: '1', minutes: '' },
  line: { lineClass: 'peripheral', site: 'hand', traced: true, clampOpen: true, siteLooksWell: true },
};
const child = {
  number: 'X 1',
  surname: 'A',
  given: 'B',
  bornOn: '2022-03-14',
  bornAt: null,
  sex: 'female',
  gestationWeeks: null,
  gestationDays: null,
  allergies: 'None known',
  flags: [],
};
const form = emptyOrderForm('maintenance');
const check = emptyCheckForm();
const reason = 'because of a test';

const BODIES: Readonly<Partial<Record<RouteName, (world: World) => unknown>>> = {
  searchChildren: () => ({ text: 'Planted' }),
  registerChild: (world) => ({ ...child, bed: '1', wardId: world.wards.heron }),
  editChild: () => ({ ...child, rev: 1 }),
  transferChild: (world) => ({ wardId: world.wards.heron, bed: '1' }),
  recordWeight: () => ({ kg: '16.4', method: 'scales', at: '2026-06-10T11:00', secondReadingKg: null }),
  confirmWeight: () => ({ kg: '16.4', method: 'scales', at: '2026-06-10T11:00' }),
  recordIntake: () => ({ what: 'bolus', ml: '100', at: '2026-06-10T11:00', where: 'ambulance' }),
  setFluidPlan: () => ({ kind: 'fraction', fraction: 'half', mlPer24h: null, reason }),
  startDraft: () => ({ kind: 'maintenance', followsOrderId: null }),
  saveDraft: () => ({ rev: 1, form }),
  sign: () => ({ rev: 1, seen: { rateMlPerH: '1', volumeMl: '1', rulebook: 1 }, password: PASSWORD }),
  askException: () => ({ rev: 1, seniorId: null, reason }),
  telephoneException: (world) => ({
    rev: 1,
    seniorId: world.people.senior.id,
    heardById: world.people.nurse.id,
    readBack: true,
    reason,
    password: PASSWORD,
  }),
  decideException: () => ({ agree: true, contentSha256: 'a'.repeat(64), reason, password: PASSWORD }),
  countersignException: () => ({ password: PASSWORD }),
  withdraw: () => ({ reason }),
  settle: () => ({ reason, password: PASSWORD }),
  recordGiven: (world) => ({
    kind: 'bolus',
    weightId: null,
    productId: UUID,
    volumeMl: '100',
    overMinutes: '10',
    route: 'syringe',
    givenAt: '2026-06-10T11:00',
    onWordOfId: world.people.senior.id,
    readBack: true,
    reason,
    password: PASSWORD,
  }),
  saveCheck: () => ({ rev: 1, form: check }),
  lockIn: () => ({ form: check }),
  signCheck: () => ({ contentSha256: 'a'.repeat(64), acceptReason: null, password: PASSWORD }),
  cannotVerify: () => ({ what: 'weight', reason }),
  passOn: () => ({ toId: null, seenFigures: false, reason }),
  slip: () => ({ reason }),
  openBeside: (world) => ({ email: world.people.checker.email, password: PASSWORD }),
  countersignGiven: () => ({ agree: true, form: check, reason, password: PASSWORD }),
  compareStep: () => ({ step: 'child', entries }),
  recordStart: () => ({ entries, witness: null, replacesVersionId: null }),
  stop: () => ({ reason: 'test', volumeInfusedMl: null }),
  stopReason: () => ({ reason, volumeInfusedMl: null }),
  hold: () => ({ reason }),
  resume: () => ({ pump: entries.pump }),
  sendAway: () => ({ where: 'theatre' }),
  finish: () => ({ volumeInfusedMl: '100' }),
  unlock: () => ({ password: PASSWORD }),
};

const all = Object.entries(ROUTES) as [RouteName, RouteDefinition][];
const bodyOf = (name: RouteName, world: World): unknown => BODIES[name]?.(world) ?? {};

/** What the `:id` of a path names. */
const idOf = (path: string, ids: { ward: string; child: string; version: string; weight: string }): string =>
  path.startsWith('/api/wards')
    ? ids.ward
    : path.startsWith('/api/children')
      ? ids.child
      : path.startsWith('/api/weights')
        ? ids.weight
        : ids.version;

type Plant = { world: World; ids: { ward: string; child: string; version: string; weight: string } };

async function plant(): Promise<Plant> {
  const world = await makeWorld(sharedDatabase());
  const childId = await world.addChild({ surname: 'Plantedname', given: 'Zephyrine', number: 'PL 777 001' });
  const weight = await world.addWeight(childId, { kg: 16.4, needs: 'second-measurement' });
  const started = await world
    .as('doctor')
    .call(ROUTES.startDraft, {
      params: { id: childId },
      body: { kind: 'maintenance', followsOrderId: null },
    });
  expect(started.status, started.text).toBe(200);
  const { versionId } = started.body as { versionId: string };
  return { world, ids: { ward: world.wards.heron, child: childId, version: versionId, weight } };
}

describe('every route of the registry', () => {
  let here: Plant;
  let there: World;
  beforeAll(async () => {
    here = await plant();
    there = await makeWorld(sharedDatabase());
  });

  const guarded = all.filter(([, route]) => route.access !== 'public');
  const clinical = all.filter(([, route]) => route.access === 'clinical');
  const withId = clinical.filter(([, route]) => route.path.includes(':id'));

  it.each(guarded)('%s asks a stranger to sign in', async (name, route) => {
    const answer = await anonymous(here.world.deps, here.world.server).call(route, {
      params: { id: idOf(route.path, here.ids) },
      body: bodyOf(name, here.world),
    });
    expect(answer.status).toBe(401);
    expect(answer.body).toMatchObject({ type: '/problems/signed-out' });
  });

  it.each(clinical)('%s is shut to an administrator', async (name, route) => {
    const answer = await here.world
      .as('admin')
      .call(route, { params: { id: idOf(route.path, here.ids) }, body: bodyOf(name, here.world) });
    expect(answer.status).toBe(403);
    expect(answer.body).toMatchObject({ type: '/problems/role-missing' });
  });

  it.each(withId)('%s gives nothing of another hospital, not even that it exists', async (name, route) => {
    for (const person of ['doctor', 'senior', 'pharmacist', 'nurse', 'lead'] as const) {
      const answer = await there
        .as(person)
        .call(route, { params: { id: idOf(route.path, here.ids) }, body: bodyOf(name, there) });
      expect([403, 404], `${person}: ${answer.text}`).toContain(answer.status);
      expect(answer.text).not.toMatch(/Plantedname|Zephyrine|PL 777/);
    }
  });

  // stopping is never refused to a clinician of the hospital; here nothing runs, so it says so instead
  it.each(withId.filter(([name]) => name !== 'stop' && name !== 'stopReason'))(
    '%s is shut to a person of another ward',
    async (name, route) => {
      const answer = await here.world
        .as('elsewhere')
        .call(route, { params: { id: idOf(route.path, here.ids) }, body: bodyOf(name, here.world) });
      expect([403, 404], answer.text).toContain(answer.status);
      expect(answer.text).not.toMatch(/Plantedname|Zephyrine|PL 777/);
    },
  );

  it('search finds nobody of another ward or hospital', async () => {
    for (const client of [here.world.as('elsewhere'), there.as('lead')]) {
      const answer = await client.call(ROUTES.searchChildren, { body: { text: 'Planted' } });
      expect(answer.body).toEqual({ children: [], more: false });
    }
  });
});

/**
 * Roles by act, typed by hand from the agreed table: doctor without entitlements, nurse with witness,
 * pharmacist with checking, lead (also a nurse), a senior prescriber. "yes" means permission does not refuse.
 */
const GRID = `
  route            doctor nurse pharmacist lead senior
  ward             yes    yes   yes        yes  yes
  chart            yes    yes   yes        yes  yes
  registerChild    yes    yes   no         yes  yes
  editChild        yes    yes   no         yes  yes
  transferChild    yes    yes   no         yes  yes
  recordWeight     yes    yes   yes        yes  yes
  recordIntake     yes    yes   yes        yes  yes
  setFluidPlan     no     no    no         no   yes
  startDraft       yes    no    no         no   yes
  recordGiven      yes    yes   no         yes  yes
  draft            yes    no    no         no   no
  discardDraft     yes    no    no         no   no
  sign             yes    no    no         no   no
  shelf            yes    yes   yes        yes  yes
  rulebook         yes    yes   yes        yes  yes`;

const PERMISSION = new Set([
  'role-missing',
  'on-ward',
  'entitlement-missing',
  'registered',
  'own-check',
  'second-person-required',
  'not-found',
  'author-or-lead',
  'author-or-taking-over',
  'checking',
]);

describe('roles by act', () => {
  const [head, ...rows] = GRID.trim()
    .split('\n')
    .map((line) => line.trim().split(/\s+/));
  const people = head!.slice(1) as ('doctor' | 'nurse' | 'pharmacist' | 'lead' | 'senior')[];
  const cells = rows.flatMap(([route, ...answers]) =>
    answers.map((answer, index) => [route as RouteName, people[index]!, answer === 'yes'] as const),
  );
  let here: Plant;
  beforeAll(async () => {
    here = await plant();
  });

  // acts of the doctor on the own draft last: discarding ends it
  it.each(
    cells
      .filter(([route]) => route !== 'discardDraft')
      .concat(
        cells.filter(([route, person]) => route === 'discardDraft' && person !== 'doctor'),
        [['discardDraft', 'doctor', true]],
      ),
  )('%s by the %s: %s', async (name, person, allowed) => {
    const route: RouteDefinition = ROUTES[name];
    const answer = await here.world
      .as(person)
      .call(route, { params: { id: idOf(route.path, here.ids) }, body: bodyOf(name, here.world) });
    const code =
      answer.status === 200
        ? 'done'
        : String((answer.body as { type?: string }).type).replace('/problems/', '');
    expect(PERMISSION.has(code), `${answer.status} ${answer.text}`).toBe(!allowed);
  });
});
