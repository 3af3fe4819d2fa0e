import { ROUTES } from '@shared/routes';
import { chartSchema } from '@shared/routes/children';
import { and, eq, isNull } from 'drizzle-orm';
import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { children, fluidPlans, intakes, stays } from '../../../server/db/schema/children';
import { ledger } from '../../../server/db/schema/ledger';
import { sharedDatabase } from '../support/database';
import { plantVersion } from '../support/plant-version';
import { makeWorld, type PersonKey, type World } from '../support/world';

const urls = sharedDatabase();
let world: World;
let foreign: World;
beforeAll(async () => {
  [world, foreign] = [await makeWorld(urls), await makeWorld(urls)];
});

let numbers = 0;
const form = (change: Record<string, unknown> = {}) => ({
  number: `NEW-${++numbers}`,
  surname: 'Ekström',
  given: 'Liv',
  bornOn: '2017-01-31',
  bornAt: null,
  sex: 'female',
  gestationWeeks: null,
  gestationDays: null,
  allergies: 'None known',
  flags: [],
  bed: '3',
  wardId: world.wards.heron,
  ...change,
});
const register = (change: Record<string, unknown> = {}, who: PersonKey = 'nurse', key?: string) =>
  world.as(who).call(ROUTES.registerChild, { body: form(change), key });
const pointers = (answer: { body: { errors?: { pointer: string }[] } }) =>
  (answer.body.errors ?? []).map(({ pointer }) => pointer);
const chartOf = (id: string, who: PersonKey = 'nurse') =>
  world.as(who).call(ROUTES.chart, { params: { id } });
const entriesOf = async (childId: string) =>
  world.within((tx) =>
    tx
      .select({ act: ledger.act, outcome: ledger.outcome, entry: ledger.entry })
      .from(ledger)
      .where(eq(ledger.childId, childId)),
  );

describe('registering', () => {
  it('admits the child to its bed and writes the ledger', async () => {
    const answer = await register({ flags: ['cardiac', 'raised-adh'], surname: '  Ekström ' });
    expect(answer.status).toBe(200);
    const childId = answer.body.childId as string;
    const chart = chartSchema.parse((await chartOf(childId)).body);
    expect(chart.child).toMatchObject({
      surname: 'Ekström',
      ageText: '9 y',
      flags: ['raised-adh', 'cardiac'],
      ward: { id: world.wards.heron, name: 'Heron' },
      bed: '3',
      rev: 1,
    });
    expect(chart).toMatchObject({ weights: [], dosingWeightId: null, orders: [], plan: null });
    expect((await entriesOf(childId)).map(({ act }) => act)).toEqual(['child-registered']);
  });

  it('keeps the hour of birth of a newborn in the hospital’s zone', async () => {
    const body = { bornOn: '2026-06-08', bornAt: '2026-06-08T04:30', gestationWeeks: 39, gestationDays: 2 };
    const { childId } = (await register(body)).body as { childId: string };
    const { child } = chartSchema.parse((await chartOf(childId)).body);
    expect(child.bornAt).toBe('2026-06-08T03:30:00.000Z');
    expect(child.ageText).toBe('55 h');
  });

  it.each([
    ['an empty number', { number: ' ' }, '/number'],
    ['a number with signs', { number: 'A<1>' }, '/number'],
    ['a long number', { number: 'A'.repeat(41) }, '/number'],
    ['an empty surname', { surname: '' }, '/surname'],
    ['a surname that is a number', { surname: 7 }, '/surname'],
    ['a surname with a line break inside', { surname: 'Ek\nström' }, '/surname'],
    ['an endless first name', { given: 'x'.repeat(121) }, '/given'],
    ['a day that is none', { bornOn: '2017-02-30' }, '/bornOn'],
    ['a birth tomorrow', { bornOn: '2026-06-11' }, '/bornOn'],
    ['an adult', { bornOn: '2008-06-10' }, '/bornOn'],
    ['a date in words', { bornOn: '31 Jan 2017' }, '/bornOn'],
    ['an hour of birth on another day', { bornAt: '2017-01-30T10:00' }, '/bornAt'],
    ['an hour of birth that is none', { bornAt: '2017-01-31T25:00' }, '/bornAt'],
    ['a third sex code', { sex: 'f' }, '/sex'],
    ['21 weeks', { gestationWeeks: 21 }, '/gestationWeeks'],
    ['half a week', { gestationWeeks: 38.5 }, '/gestationWeeks'],
    ['7 days of gestation', { gestationWeeks: 38, gestationDays: 7 }, '/gestationDays'],
    ['days without weeks', { gestationDays: 3 }, '/gestationDays'],
    ['no word on allergies', { allergies: ' ' }, '/allergies'],
    ['an unknown flag', { flags: ['tall'] }, '/flags/0'],
    ['flags as text', { flags: 'cardiac' }, '/flags'],
    ['a long bed', { bed: 'x'.repeat(21) }, '/bed'],
    ['a ward that is no id', { wardId: 'heron' }, '/wardId'],
  ])('refuses %s beside its field', async (_name, change, pointer) => {
    const answer = await register(change);
    expect([answer.status, answer.body.type]).toEqual([422, '/problems/bad-input']);
    expect(pointers(answer)).toContain(pointer);
  });

  it('refuses a number that is there already, and a ward of nowhere', async () => {
    const { number } = form();
    expect((await register({ number })).status).toBe(200);
    expect(pointers(await register({ number }))).toEqual(['/number']);
    const lost = await world.as('lead').call(ROUTES.registerChild, { body: form({ wardId: randomUUID() }) });
    expect([lost.status, pointers(lost)]).toEqual([422, ['/wardId']]);
  });

  it('gives the first answer again for the same key, and refuses the key for another child', async () => {
    const key = randomUUID();
    const body = form();
    const first = await world.as('nurse').call(ROUTES.registerChild, { body, key });
    const again = await world.as('nurse').call(ROUTES.registerChild, { body, key });
    expect(again.body).toEqual(first.body);
    const other = await world.as('nurse').call(ROUTES.registerChild, { body: form(), key });
    expect(other.body.type).toBe('/problems/key-reused');
  });

  it.each([
    ['doctor', 200],
    ['nurse', 200],
    ['lead', 200],
    ['pharmacist', 403],
    ['admin', 403],
    ['elsewhere', 403],
  ] as const)('%s: %d', async (who, status) => {
    expect((await register({}, who)).status).toBe(status);
  });
});

describe('correcting', () => {
  const edit = (childId: string, change: Record<string, unknown>, who: PersonKey = 'nurse') => {
    const { bed: _bed, wardId: _ward, ...fields } = form();
    return world.as(who).call(ROUTES.editChild, { params: { id: childId }, body: { ...fields, ...change } });
  };

  it('counts up, and the ledger keeps what changed only', async () => {
    const childId = await world.addChild({ surname: 'Moyo', given: 'Tendai', number: 'ED-1' });
    const same = { number: 'ED-1', bornOn: '2022-03-14', sex: 'male', gestationWeeks: 40 };
    const answer = await edit(childId, { ...same, surname: 'Moyo-Price', given: 'Tendai', rev: 1 });
    expect(answer.body).toEqual({ rev: 2 });
    const [row] = (await entriesOf(childId)).filter(({ act }) => act === 'child-edited');
    expect(JSON.parse(row!.entry)).toMatchObject({
      from: { surname: 'Moyo' },
      to: { surname: 'Moyo-Price' },
      actor: { id: world.people.nurse.id },
    });
  });

  it('refuses what was read before someone else’s change, and a number of another child', async () => {
    const childId = await world.addChild({ number: 'ED-2' });
    await world.addChild({ number: 'ED-3' });
    expect((await edit(childId, { rev: 1, number: 'ED-2' })).status).toBe(200);
    const stale = await edit(childId, { rev: 1, number: 'ED-2' });
    expect([stale.status, stale.body.type]).toEqual([409, '/problems/stale']);
    expect(stale.body.data).toEqual({ rev: 2 });
    expect(pointers(await edit(childId, { rev: 2, number: 'ED-3' }))).toEqual(['/number']);
  });

  it.each([
    ['pharmacist', 403],
    ['elsewhere', 403],
    ['admin', 403],
    ['lead', 200],
  ] as const)('%s: %d', async (who, status) => {
    const childId = await world.addChild();
    expect((await edit(childId, { rev: 1 }, who)).status).toBe(status);
  });
});

describe('moving', () => {
  const transfer = (childId: string, wardId: string, who: PersonKey = 'nurse') =>
    world.as(who).call(ROUTES.transferChild, { params: { id: childId }, body: { wardId, bed: '7' } });
  const discharge = (childId: string, who: PersonKey = 'nurse') =>
    world.as(who).call(ROUTES.dischargeChild, { params: { id: childId } });

  it('ends one stay and begins the next', async () => {
    const childId = await world.addChild();
    expect((await transfer(childId, world.wards.curlew)).body).toEqual({ ok: true });
    const rows = await world.within((tx) => tx.select().from(stays).where(eq(stays.childId, childId)));
    expect(rows.filter(({ to }) => to === null).map(({ wardId, bed }) => [wardId, bed])).toEqual([
      [world.wards.curlew, '7'],
    ]);
    expect(rows).toHaveLength(2);
    // whoever works on the old ward alone no longer reads the chart
    expect((await chartOf(childId, 'elsewhere')).status).toBe(200);
  });

  it('refuses a ward of another hospital', async () => {
    const childId = await world.addChild();
    const answer = await transfer(childId, foreign.wards.heron);
    expect([answer.status, pointers(answer)]).toEqual([422, ['/wardId']]);
  });

  it('discharges; the last ward still reads, nothing more is done', async () => {
    const childId = await world.addChild();
    expect((await discharge(childId)).status).toBe(200);
    const chart = await chartOf(childId);
    expect(chart.status).toBe(200);
    expect(chart.body.child.ward).toBeNull();
    const again = await discharge(childId);
    expect([again.status, again.body.type]).toEqual([409, '/problems/conflict']);
  });

  it.each(['running', 'held', 'away'] as const)(
    'refuses to discharge while an order is %s',
    async (state) => {
      const childId = await world.addChild();
      await plantVersion(world, childId, { state });
      const answer = await discharge(childId);
      expect([answer.status, answer.body.type]).toEqual([409, '/problems/something-runs']);
      const open = await world.within((tx) =>
        tx
          .select()
          .from(stays)
          .where(and(eq(stays.childId, childId), isNull(stays.to))),
      );
      expect(open).toHaveLength(1);
      const refusals = (await entriesOf(childId)).filter(({ outcome }) => outcome === 'refused');
      expect(refusals.map(({ act }) => act)).toEqual(['child-discharged']);
    },
  );

  it.each(['signed', 'stopped', 'draft'] as const)('discharges with an order %s', async (state) => {
    const childId = await world.addChild();
    await plantVersion(world, childId, { state });
    expect((await discharge(childId)).status).toBe(200);
  });

  it.each([
    ['pharmacist', 403],
    ['elsewhere', 403],
    ['doctor', 200],
  ] as const)('%s discharges: %d', async (who, status) => {
    expect((await discharge(await world.addChild(), who)).status).toBe(status);
  });
});

describe('children of another hospital', () => {
  it('are not there, for reading or for any act', async () => {
    const id = await foreign.addChild();
    const params = { id };
    const { bed: _bed, wardId: _ward, ...fields } = form();
    const nurse = world.as('nurse');
    const answers = [
      await nurse.call(ROUTES.chart, { params }),
      await world.as('lead').call(ROUTES.chart, { params }),
      await nurse.call(ROUTES.editChild, { params, body: { ...fields, rev: 1 } }),
      await nurse.call(ROUTES.transferChild, { params, body: { wardId: world.wards.heron, bed: '' } }),
      await nurse.call(ROUTES.dischargeChild, { params }),
      await nurse.call(ROUTES.recordIntake, {
        params,
        body: { what: 'bolus', ml: '20', at: '2026-06-10T11:00', where: 'Ambulance' },
      }),
      await nurse.call(ROUTES.recordWeight, {
        params,
        body: { kg: '16.4', method: 'scales', at: '2026-06-10T11:00', secondReadingKg: null },
      }),
    ];
    expect(answers.map(({ status }) => status)).toEqual(answers.map(() => 404));
    const rows = await foreign.within((tx) => tx.select().from(children).where(eq(children.id, id)));
    expect(rows[0]!.rev).toBe(1);
  });
});

describe('a bolus given elsewhere', () => {
  const intake = (childId: string, change: Record<string, unknown> = {}, who: PersonKey = 'nurse') =>
    world.as(who).call(ROUTES.recordIntake, {
      params: { id: childId },
      body: { what: 'bolus', ml: '160', at: '2026-06-10T09:15', where: 'Ambulance', ...change },
    });

  it('stands on the chart with time, place and who wrote it', async () => {
    const childId = await world.addChild();
    expect((await intake(childId, { ml: ' 160.5 ' })).status).toBe(200);
    const { intakes: rows } = chartSchema.parse((await chartOf(childId)).body);
    expect(rows).toEqual([
      expect.objectContaining({
        what: 'bolus',
        ml: '160.5',
        at: '2026-06-10T08:15:00.000Z',
        where: 'Ambulance',
        recordedBy: 'Orla Finch',
      }),
    ]);
  });

  it.each([
    ['nothing', { ml: '' }, '/ml'],
    ['zero', { ml: '0' }, '/ml'],
    ['less than nothing', { ml: '-20' }, '/ml'],
    ['6000 mL', { ml: '6000' }, '/ml'],
    ['a comma', { ml: '16,5' }, '/ml'],
    ['a unit behind it', { ml: '160 mL' }, '/ml'],
    ['an exponent', { ml: '1e2' }, '/ml'],
    ['other digits', { ml: '１６０' }, '/ml'],
    ['a JSON number', { ml: 160 }, '/ml'],
    ['too many decimals', { ml: '160.25' }, '/ml'],
    ['a time ahead', { at: '2026-06-10T12:30' }, '/at'],
    ['a time before birth', { at: '2022-03-13T12:00' }, '/at'],
    ['a week ago', { at: '2026-06-03T12:00' }, '/at'],
    ['no time', { at: '' }, '/at'],
    ['a day that is none', { at: '2026-06-31T12:00' }, '/at'],
    ['no place', { where: '  ' }, '/where'],
    ['another sort of intake', { what: 'soup' }, '/what'],
  ])('refuses %s', async (_name, change, pointer) => {
    const childId = await world.addChild();
    const answer = await intake(childId, change);
    expect(answer.status).toBe(422);
    expect(pointers(answer)).toContain(pointer);
    const rows = await world.within((tx) => tx.select().from(intakes).where(eq(intakes.childId, childId)));
    expect(rows).toEqual([]);
  });

  it('names every wrong field at once', async () => {
    const answer = await intake(await world.addChild(), { ml: 'x', at: '2026-06-10T23:59', where: '' });
    expect(pointers(answer).sort()).toEqual(['/at', '/ml', '/where']);
  });
});

describe('a fluid plan', () => {
  const plan = (childId: string, body: Record<string, unknown>, who: PersonKey = 'senior') =>
    world.as(who).call(ROUTES.setFluidPlan, {
      params: { id: childId },
      body: { fraction: null, mlPer24h: null, reason: 'Raised ADH risk', ...body },
    });

  it('is set, replaced and ended by a senior; the newest holds', async () => {
    const childId = await world.addChild();
    expect((await plan(childId, { kind: 'fraction', fraction: 'two-thirds' })).status).toBe(200);
    expect((await plan(childId, { kind: 'allowance', mlPer24h: '900' })).status).toBe(200);
    const chart = chartSchema.parse((await chartOf(childId)).body);
    expect(chart.plan).toMatchObject({
      kind: 'allowance',
      fraction: null,
      mlPer24h: '900.0',
      by: 'Halina Brandt',
      reason: 'Raised ADH risk',
    });
    expect((await plan(childId, { kind: 'none' })).status).toBe(200);
    expect((await chartOf(childId)).body.plan).toBeNull();
    const rows = await world.within((tx) =>
      tx.select().from(fluidPlans).where(eq(fluidPlans.childId, childId)),
    );
    expect(rows).toHaveLength(2);
  });

  it.each([
    ['no fraction', { kind: 'fraction' }, '/fraction'],
    ['an unknown fraction', { kind: 'fraction', fraction: 'third' }, '/fraction'],
    ['no volume', { kind: 'allowance' }, '/mlPer24h'],
    ['volume in words', { kind: 'allowance', mlPer24h: 'much' }, '/mlPer24h'],
    ['zero', { kind: 'allowance', mlPer24h: '0' }, '/mlPer24h'],
    ['too much', { kind: 'allowance', mlPer24h: '5001' }, '/mlPer24h'],
    ['no reason', { kind: 'fraction', fraction: 'half', reason: ' ' }, '/reason'],
    ['an unknown kind', { kind: 'perhaps' }, '/kind'],
  ])('refuses %s', async (_name, body, pointer) => {
    const answer = await plan(await world.addChild(), body);
    expect([answer.status, pointers(answer)]).toEqual([422, [pointer]]);
  });

  it.each([
    ['doctor', 'entitlement-missing'],
    ['nurse', 'role-missing'],
    ['elsewhere', 'on-ward'],
  ] as const)('%s may not: %s', async (who, code) => {
    const childId = await world.addChild();
    const answer = await plan(childId, { kind: 'none' }, who);
    expect([answer.status, answer.body.type]).toEqual([403, `/problems/${code}`]);
    const [row] = await world.within((tx) => tx.select().from(ledger).where(eq(ledger.subjectId, childId)));
    expect([row!.act, row!.outcome]).toEqual(['fluid-plan-set', 'refused']);
  });
});
