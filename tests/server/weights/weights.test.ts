import { ROUTES } from '@shared/routes';
import { chartSchema } from '@shared/routes/children';
import { instant } from '@shared/time';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { ledger } from '../../../server/db/schema/ledger';
import { nearMisses } from '../../../server/db/schema/near-misses';
import { weights } from '../../../server/db/schema/weights';
import { sharedDatabase } from '../support/database';
import { makeWorld, type PersonKey, type World } from '../support/world';

const urls = sharedDatabase();
let world: World;
beforeAll(async () => {
  world = await makeWorld(urls);
});

const DAY = 86_400_000;
const record = (childId: string, change: Record<string, unknown> = {}, who: PersonKey = 'nurse') =>
  world.as(who).call(ROUTES.recordWeight, {
    params: { id: childId },
    body: { kg: '16.4', method: 'scales', at: '2026-06-10T11:40', secondReadingKg: null, ...change },
  });
const confirm = (weightId: string, kg: string, who: PersonKey = 'nurse', method = 'scales') =>
  world.as(who).call(ROUTES.confirmWeight, {
    params: { id: weightId },
    body: { kg, method, at: '2026-06-10T11:50' },
  });
const chartOf = async (childId: string) =>
  chartSchema.parse((await world.as('nurse').call(ROUTES.chart, { params: { id: childId } })).body);
const missesOf = (childId: string) =>
  world.within((tx) => tx.select().from(nearMisses).where(eq(nearMisses.childId, childId)));
const pointers = (answer: { body: { errors?: { pointer: string }[] } }) =>
  (answer.body.errors ?? []).map(({ pointer }) => pointer);

/** A boy of 4 years nobody has weighed. */
const unweighed = () => world.addChild({ kg: null });
/** A boy of 17 months: 11.3 kg is about his median (WHO). */
const toddler = () => world.addChild({ kg: null, bornOn: '2025-01-10' });

describe('a plausible weight', () => {
  it('is usable at once, with method, time, who and z-score', async () => {
    const childId = await unweighed();
    const answer = await record(childId, { kg: ' 16.40 ' });
    expect(answer.body).toMatchObject({ usable: true, needs: 'nothing', words: '16.4 kg recorded.' });
    const chart = await chartOf(childId);
    expect(chart.dosingWeightId).toBe(answer.body.weightId);
    expect(chart.weights).toEqual([
      expect.objectContaining({
        kg: '16.400',
        method: 'scales',
        at: '2026-06-10T10:40:00.000Z',
        recordedBy: 'Orla Finch',
        confirmedBy: null,
        usable: true,
        stale: '',
      }),
    ]);
    expect(Math.abs(Number(chart.weights[0]!.z))).toBeLessThan(1);
    expect(await missesOf(childId)).toEqual([]);
    const [row] = await world.within((tx) => tx.select().from(ledger).where(eq(ledger.childId, childId)));
    expect([row!.act, row!.actorId]).toEqual(['weight-recorded', world.people.nurse.id]);
  });

  it('does not make a weight that is measured give way to one that is stated', async () => {
    const childId = await unweighed();
    const measured = await record(childId, { at: '2026-06-09T11:40' });
    await record(childId, { method: 'stated', kg: '17' });
    const chart = await chartOf(childId);
    expect(chart.weights.map(({ method, stale }) => [method, stale])).toEqual([
      ['stated', 'stated, not measured'],
      ['scales', '24 h old'],
    ]);
    expect(chart.dosingWeightId).toBe(measured.body.weightId);
  });
});

describe('what is no weight', () => {
  it.each([
    ['nothing', { kg: '' }, '/kg'],
    ['zero', { kg: '0' }, '/kg'],
    ['less than nothing', { kg: '-16.4' }, '/kg'],
    ['1000 kg', { kg: '1000' }, '/kg'],
    ['a comma', { kg: '16,4' }, '/kg'],
    ['two points', { kg: '16.4.0' }, '/kg'],
    ['a unit', { kg: '16.4 kg' }, '/kg'],
    ['grams', { kg: '16400' }, '/kg'],
    ['an exponent', { kg: '1.64e1' }, '/kg'],
    ['a plus sign', { kg: '+16.4' }, '/kg'],
    ['full-width digits', { kg: '１６.４' }, '/kg'],
    ['tenths of a gram', { kg: '16.4001' }, '/kg'],
    ['a JSON number', { kg: 16.4 }, '/kg'],
    ['a kitchen method', { method: 'by eye' }, '/method'],
    ['a time ahead', { at: '2026-06-10T12:01' }, '/at'],
    ['a time before birth', { at: '2022-03-13T23:59' }, '/at'],
    ['half a time', { at: '2026-06-10' }, '/at'],
    ['a birth weight at four years', { method: 'birth-weight', kg: '3.4' }, '/at'],
    ['a broken second reading', { kg: '36', secondReadingKg: 'same' }, '/secondReadingKg'],
  ])('%s is refused beside its field', async (_name, change, pointer) => {
    const childId = await world.addChild({ kg: null, bornAt: instant(Date.UTC(2022, 2, 14, 8)) });
    const answer = await record(childId, change);
    expect([answer.status, answer.body.type]).toEqual([422, '/problems/bad-input']);
    expect(pointers(answer)).toEqual([pointer]);
    expect((await chartOf(childId)).weights).toEqual([]);
  });

  it('an hour that comes twice is asked about', async () => {
    const own = await makeWorld(urls, { now: Date.UTC(2026, 9, 25, 9) });
    const childId = await own.addChild({ kg: null });
    const answer = await own.as('nurse').call(ROUTES.recordWeight, {
      params: { id: childId },
      body: { kg: '16.4', method: 'scales', at: '2026-10-25T01:30', secondReadingKg: null },
    });
    expect(answer.body.errors[0].detail).toContain('comes twice');
  });
});

describe('a weight that looks wrong', () => {
  it('25 for 11.3 kg at 17 months is caught as pounds (AHRQ 293), kept, and used by no order', async () => {
    const childId = await toddler();
    const answer = await record(childId, { kg: '25' });
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({ usable: false, needs: 'second-person' });
    expect(answer.body.words).toContain('11.3 kg');
    const chart = await chartOf(childId);
    expect(chart.weights[0]).toMatchObject({ kg: '25.000', usable: false });
    expect(chart.dosingWeightId).toBeNull();
    const misses = await missesOf(childId);
    expect(misses.map(({ class: kind }) => kind)).toEqual(misses.map(() => 'weight'));
    expect(misses.map(({ limitCode }) => limitCode)).toContain('looks-like-pounds');
  });

  it('is one near miss for each finding, however often it is typed', async () => {
    const childId = await toddler();
    await record(childId, { kg: '25' });
    const first = await missesOf(childId);
    await record(childId, { kg: '25' });
    expect(await missesOf(childId)).toHaveLength(first.length);
  });

  it('92.2 for 41.8 kg at 12 years is asked about', async () => {
    const childId = await world.addChild({ kg: null, bornOn: '2014-03-14' });
    const answer = await record(childId, { kg: '92.2' });
    expect(answer.body.usable).toBe(false);
    expect(answer.body.words).toContain('41.8 kg');
  });

  it('a tenfold slip is caught', async () => {
    const answer = await record(await unweighed(), { kg: '164' });
    expect(answer.body).toMatchObject({ usable: false, needs: 'second-person' });
    expect(answer.body.words).toContain('16.4 kg');
  });

  it('more than a tenth off the last weight within a week owes a second measurement', async () => {
    const childId = await world.addChild({ kg: 16.4 });
    const answer = await record(childId, { kg: '18.1' });
    expect(answer.body).toMatchObject({ usable: false, needs: 'second-measurement' });
  });
});

describe('a second measurement', () => {
  it('by the same person at once settles it when it agrees within 1 %', async () => {
    const childId = await world.addChild({ kg: 16.4 });
    const answer = await record(childId, { kg: '18.1', secondReadingKg: '18.2' });
    expect(answer.body).toMatchObject({ usable: true, needs: 'nothing' });
    const chart = await chartOf(childId);
    expect(chart.dosingWeightId).toBe(answer.body.weightId);
    expect((await missesOf(childId)).map(({ limitCode }) => limitCode)).toEqual(['changed-much']);
  });

  it('that differs keeps nothing and is a near miss', async () => {
    const childId = await world.addChild({ kg: 16.4 });
    const answer = await record(childId, { kg: '18.1', secondReadingKg: '16.5' });
    expect([answer.status, answer.body.type]).toEqual([422, '/problems/weight-refused']);
    expect((await chartOf(childId)).weights).toHaveLength(1);
    expect(await missesOf(childId)).toHaveLength(1);
    const rows = await world.within((tx) => tx.select().from(ledger).where(eq(ledger.childId, childId)));
    expect(rows.map(({ act, outcome }) => [act, outcome])).toEqual([['weight-refused', 'refused']]);
  });

  it('by the same person at once does not settle what needs another person', async () => {
    const answer = await record(await toddler(), { kg: '25', secondReadingKg: '25' });
    expect(answer.body).toMatchObject({ usable: false, needs: 'second-person' });
  });

  it('given with a plausible weight must agree with it too', async () => {
    const childId = await unweighed();
    expect((await record(childId, { secondReadingKg: '15.4' })).status).toBe(422);
    expect((await record(childId, { secondReadingKg: '16.5' })).body.usable).toBe(true);
  });

  it('can follow later, by the same person where one measurement is owed', async () => {
    const childId = await world.addChild({ kg: 16.4 });
    const { weightId } = (await record(childId, { kg: '18.1' })).body as { weightId: string };
    const answer = await confirm(weightId, '18.1');
    expect(answer.body.usable).toBe(true);
    expect((await chartOf(childId)).dosingWeightId).toBe(weightId);
    const again = await confirm(weightId, '18.1');
    expect([again.status, again.body.type]).toEqual([409, '/problems/conflict']);
  });

  it('is refused to the one who took the first where another person is owed, and counts from another', async () => {
    const childId = await toddler();
    const { weightId } = (await record(childId, { kg: '25' })).body as { weightId: string };
    const own = await confirm(weightId, '25');
    expect([own.status, own.body.type]).toEqual([403, '/problems/second-person-required']);
    expect((await chartOf(childId)).dosingWeightId).toBeNull();
    const other = await confirm(weightId, '25.2', 'otherNurse', 'bed-scales');
    expect(other.body.usable).toBe(true);
    const chart = await chartOf(childId);
    expect(chart.dosingWeightId).toBe(weightId);
    expect(chart.weights[0]!.confirmedBy).toBe('Samir Lund');
  });

  it('that differs sets the first aside and is judged as a weight of its own', async () => {
    const childId = await toddler();
    const { weightId } = (await record(childId, { kg: '25' })).body as { weightId: string };
    const answer = await confirm(weightId, '11.3', 'otherNurse', 'baby-scales');
    expect(answer.body.usable).toBe(true);
    expect(answer.body.words).toContain('set aside');
    const chart = await chartOf(childId);
    expect(chart.weights.map(({ kg, usable }) => [kg, usable])).toEqual([['11.300', true]]);
    const [first] = await world.within((tx) => tx.select().from(weights).where(eq(weights.id, weightId)));
    expect(first!.supersededBy).toBe(chart.weights[0]!.id);
    expect((await confirm(weightId, '25')).status).toBe(409);
  });

  it('is taken on scales, of a weight that is there', async () => {
    const childId = await world.addChild({ kg: 16.4 });
    const { weightId } = (await record(childId, { kg: '18.1' })).body as { weightId: string };
    expect(pointers(await confirm(weightId, '18.1', 'nurse', 'stated'))).toEqual(['/method']);
    expect(pointers(await confirm(weightId, '18,1'))).toEqual(['/kg']);
    expect((await confirm(childId, '18.1')).status).toBe(404);
  });
});

describe('an old weight', () => {
  it('says its age and that it was only stated', async () => {
    const childId = await world.addChild({ kg: null });
    await world.addWeight(childId, { kg: 16, method: 'stated', at: instant(world.clock.now() - 9 * DAY) });
    expect((await chartOf(childId)).weights[0]!.stale).toBe('stated, not measured, 9 days old');
  });
});

describe('who may weigh', () => {
  it.each([
    ['doctor', 200],
    ['nurse', 200],
    ['pharmacist', 200],
    ['lead', 200],
    ['admin', 403],
    ['elsewhere', 403],
  ] as const)('%s: %d', async (who, status) => {
    expect((await record(await unweighed(), {}, who)).status).toBe(status);
  });
});
