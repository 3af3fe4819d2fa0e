import { ROUTES } from '@shared/routes';
import type { OrderLine } from '@shared/routes/children';
import { VERSION_STATES, type VersionState } from '@shared/orders/states';
import { HOUR, instant, MINUTE } from '@shared/time';
import { createHash } from 'node:crypto';
import { beforeEach, describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { checks, exceptions } from '../../../server/db/schema/checks';
import { sharedDatabase } from '../support/database';
import { plantVersion } from '../support/plant-version';
import { makeWorld, type PersonKey, type World } from '../support/world';

const urls = sharedDatabase();
let world: World;
beforeEach(async () => {
  world = await makeWorld(urls);
});

type Ward = z.infer<typeof ROUTES.ward.response>;
const wardOf = async (who: PersonKey = 'nurse', ward: 'heron' | 'curlew' = 'heron'): Promise<Ward> => {
  const answer = await world.as(who).call(ROUTES.ward, { params: { id: world.wards[ward] } });
  expect(answer.status).toBe(200);
  return ROUTES.ward.response.parse(answer.body);
};
const lineOf = async (who: PersonKey): Promise<OrderLine | undefined> =>
  (await wardOf(who)).rows[0]?.orders[0];
const workOf = async (who: PersonKey, code: string) =>
  (await wardOf(who)).forYou.find((item) => item.code === code);

/** Planted figures, fluid and author: found nowhere else. */
const PLANTED = ['43.7', '1049', 'Planted fluid', 'two thirds', 'Imogen Vale'];

describe('the ward', () => {
  it('lists its children by bed with age, flags and the weight an order would take', async () => {
    await world.addChild({ bed: '10', surname: 'Nokes', flags: ['cardiac'] });
    const second = await world.addChild({ bed: '2', surname: 'Hartnoll', kg: 16.4 });
    await world.addWeight(second, { kg: 20, at: world.clock.now(), needs: 'second-measurement' });
    await world.addChild({ bed: '1', ward: 'curlew' });
    await world.addChild({ bed: '3', ward: null });
    await world.addChild({ bed: '4', surname: 'Ivanko', kg: null });
    const page = await wardOf();
    expect(page.ward.name).toBe('Heron');
    expect(page.rows.map(({ child }) => [child.bed, child.surname])).toEqual([
      ['2', 'Hartnoll'],
      ['4', 'Ivanko'],
      ['10', 'Nokes'],
    ]);
    expect(page.rows[0]!.weight).toEqual({
      kg: '16.400',
      method: 'scales',
      at: '2026-06-10T10:00:00.000Z',
      usable: true,
      stale: '',
    });
    expect(page.rows[1]!.weight).toBeNull();
    expect(page.rows[2]!.child.flags).toEqual(['cardiac']);
    expect(page.forYou).toEqual([]);
  });

  it('shows a weight that may not be used as such when there is no other', async () => {
    const childId = await world.addChild({ kg: null });
    await world.addWeight(childId, { kg: 25, needs: 'second-person' });
    expect((await wardOf()).rows[0]!.weight).toMatchObject({ kg: '25.000', usable: false });
  });

  it.each([
    ['nurse', 'heron', 200],
    ['elsewhere', 'heron', 403],
    ['elsewhere', 'curlew', 200],
    ['lead', 'curlew', 200],
    ['admin', 'heron', 403],
  ] as const)('%s reads %s: %d', async (who, ward, status) => {
    const answer = await world.as(who).call(ROUTES.ward, { params: { id: world.wards[ward] } });
    expect(answer.status).toBe(status);
  });

  it('is not another hospital’s', async () => {
    const other = await makeWorld(urls);
    for (const [who, status] of [
      ['nurse', 403],
      ['lead', 404],
    ] as const) {
      const answer = await world.as(who).call(ROUTES.ward, { params: { id: other.wards.heron } });
      expect(answer.status).toBe(status);
    }
  });

  it('reads any number of children and orders with the same number of statements', async () => {
    const count = async () => {
      let statements = 0;
      const { db } = world.deps;
      const sql = new Proxy(db.sql, {
        get: (target, name, receiver) =>
          name === 'begin'
            ? (mode: string, work: (inner: object) => unknown) =>
                target.begin(mode, (inner) =>
                  work(
                    new Proxy(inner, {
                      get: (inside, key) => {
                        if (key === 'unsafe') statements += 1;
                        return Reflect.get(inside, key) as unknown;
                      },
                    }),
                  ),
                )
            : (Reflect.get(target, name, receiver) as unknown),
      });
      world.app.locals.deps = { ...world.deps, db: { ...db, sql } };
      await wardOf();
      world.app.locals.deps = world.deps;
      return statements;
    };
    const childId = await world.addChild();
    await plantVersion(world, childId, { state: 'running' });
    const few = await count();
    for (let i = 0; i < 6; i++) {
      const id = await world.addChild();
      await plantVersion(world, id, { state: 'running' });
      await plantVersion(world, id, { state: 'awaiting-check' });
    }
    expect(few).toBeGreaterThan(3);
    expect(await count()).toBe(few);
  });
});

describe('coverage of an order line', () => {
  const COVERED: readonly VersionState[] = [
    'draft',
    'awaiting-check',
    'disputed',
    'returned',
    'awaiting-pharmacist',
  ];
  const OPEN: readonly VersionState[] = [
    'signed',
    'running',
    'held',
    'away',
    'given',
    'stopped',
    'finished',
    'lapsed',
  ];

  it.each(COVERED)('%s: no figure, fluid or author reaches a colleague, in list or chart', async (state) => {
    const childId = await world.addChild();
    await plantVersion(world, childId, { state, checked: false });
    for (const who of ['nurse', 'checker', 'senior', 'lead', 'pharmacist', 'otherDoctor'] as const) {
      const client = world.as(who);
      const answers = [
        await client.call(ROUTES.ward, { params: { id: world.wards.heron } }),
        await client.call(ROUTES.chart, { params: { id: childId } }),
      ];
      for (const { status, text } of answers) {
        expect(status).toBe(200);
        expect(PLANTED.filter((planted) => text.includes(planted))).toEqual([]);
      }
    }
    expect(await lineOf('checker')).toMatchObject({ state, kind: 'maintenance', open: null });
  });

  it.each(COVERED.filter((state) => state !== 'draft'))('%s: is open to its author', async (state) => {
    const childId = await world.addChild();
    await plantVersion(world, childId, { state, checked: false });
    expect((await lineOf('doctor'))?.open).toMatchObject({
      title: 'Maintenance, two thirds',
      fluid: 'Planted fluid 0.77 %',
      rateMlPerH: '43.7',
      volumeMl: '1049.0',
      gauge: { orderMl: '1049.0', brimMl: '2000.0', notches: ['1000.0', '1320.0'] },
      author: 'Imogen Vale',
    });
  });

  it.each(OPEN)('%s: is open to everyone on the ward', async (state) => {
    const childId = await world.addChild();
    await plantVersion(world, childId, { state });
    expect((await lineOf('nurse'))?.open).toMatchObject({ rateMlPerH: '43.7', author: 'Imogen Vale' });
  });

  it('opens to the checker who locked in, and to the senior who decided, and to nobody else', async () => {
    const childId = await world.addChild();
    const { versionId } = await plantVersion(world, childId, { state: 'disputed', checked: false });
    const { doctor, checker, senior } = world.people;
    const figures = '{"weightKg":"16.4"}';
    await world.within(async (tx) => {
      const now = world.clock.now();
      await tx.insert(checks).values({
        versionId,
        authorId: doctor.id,
        checkerId: checker.id,
        state: 'differed',
        openedAt: now,
        figures,
        figuresSha256: createHash('sha256').update(figures).digest('hex'),
        lockedInAt: now,
      });
      await tx.insert(exceptions).values({
        versionId,
        authorId: doctor.id,
        limitCode: 'x',
        contentSha256: '0'.repeat(64),
        state: 'granted',
        askedAt: now,
        by: senior.id,
        decidedAt: now,
        reason: 'agreed',
        how: 'here',
      });
    });
    expect((await lineOf('checker'))?.open).not.toBeNull();
    expect((await lineOf('senior'))?.open).not.toBeNull();
    expect((await lineOf('otherChecker'))?.open).toBeNull();
    expect((await lineOf('nurse'))?.open).toBeNull();
  });

  it('says bolus by weight in the title', async () => {
    const childId = await world.addChild();
    await plantVersion(world, childId, { kind: 'bolus' });
    expect((await lineOf('nurse'))?.open).toMatchObject({
      title: 'Bolus, 10\u00a0mL/kg',
      rateMlPerH: null,
      volumeMl: '163.7',
    });
  });
});

describe('what is due next', () => {
  const dueOf = async (plant: Parameters<typeof plantVersion>[2], who: PersonKey = 'nurse') => {
    await plantVersion(world, await world.addChild(), plant);
    const { text, note, isLate } = (await lineOf(who))!.nextDue;
    return [text, note, isLate];
  };
  const at = (minutes: number) => instant(world.clock.now() + minutes * MINUTE);

  it('draft', async () => {
    expect(await dueOf({ state: 'draft', stateSince: at(-78) })).toEqual([
      'Draft open',
      'since 10:42',
      false,
    ]);
  });
  it('own draft', async () => {
    expect(await dueOf({ state: 'draft', stateSince: at(-78) }, 'doctor')).toEqual([
      'Draft open',
      'yours, since 10:42',
      false,
    ]);
  });
  it('awaiting check', async () => {
    const plant = { state: 'awaiting-check', signedAt: at(-38), checkDueAt: at(22) } as const;
    expect(await dueOf(plant)).toEqual(['Waited 38 min', 'signed 11:22', false]);
  });
  it('check overdue', async () => {
    const plant = { state: 'awaiting-check', signedAt: at(-72), checkDueAt: at(-12) } as const;
    expect(await dueOf(plant)).toEqual(['Waited 1 h 12 min', 'signed 10:48', true]);
  });
  it('signed', async () => {
    const plant = { state: 'signed', startBy: at(18), stateSince: at(-5) } as const;
    expect(await dueOf(plant)).toEqual(['Start by 12:18', 'signed 11:55', false]);
  });
  it('signed, too late', async () => {
    expect(await dueOf({ state: 'signed', startBy: at(-10) })).toEqual([
      'Start by 11:50',
      'late by 10 min',
      true,
    ]);
  });
  it('running', async () => {
    const plant = { state: 'running', lapsesAt: at(60), stateSince: at(-23 * 60) } as const;
    expect(await dueOf(plant)).toEqual(['Lapses 13:00', 'since 9 Jun, 13:00', false]);
  });
  it('running past its time', async () => {
    expect(await dueOf({ state: 'running', lapsesAt: at(-30) })).toEqual([
      'Overdue',
      'lapsed 11:30, still connected',
      true,
    ]);
    expect((await lineOf('nurse'))!.isOverdue).toBe(true);
  });
  it('held', async () => {
    expect(await dueOf({ state: 'held', stateSince: at(-20) })).toEqual(['Hold ends 12:40', '', false]);
  });
  it('held too long', async () => {
    expect(await dueOf({ state: 'held', stateSince: at(-70) })).toEqual([
      'Hold ends 11:50',
      'late by 10 min',
      true,
    ]);
  });
  it('returned', async () => {
    const plant = { state: 'returned', stateSince: at(-115) } as const;
    expect(await dueOf(plant)).toEqual(['With prescriber', 'returned 10:05', false]);
  });
  it('stopped', async () => {
    const plant = { state: 'stopped', stateSince: at(-185) } as const;
    expect(await dueOf(plant)).toEqual(['New order or none', 'stopped 08:55', false]);
  });

  it('ended long ago is off the ward’s list and on the chart', async () => {
    const childId = await world.addChild();
    await plantVersion(world, childId, { state: 'stopped', stateSince: at(-13 * 60) });
    expect((await wardOf()).rows[0]!.orders).toEqual([]);
    const chart = await world.as('nurse').call(ROUTES.chart, { params: { id: childId } });
    expect(chart.body.orders).toHaveLength(1);
  });

  it.each(VERSION_STATES.filter((state) => state !== 'discarded'))('%s has words', async (state) => {
    const childId = await world.addChild();
    await plantVersion(world, childId, { state });
    const chart = await world.as('nurse').call(ROUTES.chart, { params: { id: childId } });
    expect(chart.body.orders[0].nextDue.text).toMatch(/^[A-Z]/);
  });
});

describe('what waits for one', () => {
  it('checks, for those who may check', async () => {
    for (const surname of ['Ekström', 'Fairweather']) {
      const childId = await world.addChild({ surname, given: 'Liv' });
      await plantVersion(world, childId, {
        state: 'awaiting-check',
        checkDueAt: instant(world.clock.now() + HOUR),
      });
    }
    expect(await workOf('checker', 'checks')).toMatchObject({
      count: 2,
      words: 'orders wait for your check',
      detail: 'Ekström, Liv; Fairweather, Liv',
      href: '/checks',
    });
    expect(await workOf('doctor', 'checks')).toBeUndefined();
    expect(await workOf('nurse', 'checks')).toBeUndefined();
    expect(await workOf('otherNurse', 'checks')).toMatchObject({ count: 2 });
  });

  it('own orders that came back, and one leads straight to it', async () => {
    const childId = await world.addChild({ surname: 'Jolliffe', given: 'Sam' });
    const { versionId } = await plantVersion(world, childId, { state: 'returned' });
    expect(await workOf('doctor', 'returned')).toMatchObject({
      count: 1,
      detail: 'Jolliffe, Sam',
      href: `/orders/${versionId}`,
    });
    expect(await workOf('otherDoctor', 'returned')).toBeUndefined();
  });

  it('orders that lapse soon or are overdue, with how late', async () => {
    const now = world.clock.now();
    const [soon, late] = [await world.addChild({ given: 'Edie' }), await world.addChild({ given: 'Anik' })];
    await plantVersion(world, soon, { state: 'running', lapsesAt: instant(now + HOUR) });
    await plantVersion(world, late, { state: 'running', lapsesAt: instant(now - 72 * MINUTE) });
    await plantVersion(world, late, { state: 'running', lapsesAt: instant(now + 5 * HOUR) });
    expect(await workOf('nurse', 'lapsing')).toMatchObject({ count: 1, detail: 'Thorne, Edie, at 13:00' });
    expect(await workOf('nurse', 'overdue')).toMatchObject({
      count: 1,
      detail: 'Thorne, Anik, by 1 h 12 min',
    });
  });

  it('countersignatures, not from the giver', async () => {
    const childId = await world.addChild();
    await plantVersion(world, childId, {
      state: 'given',
      kind: 'bolus',
      checkDueAt: instant(world.clock.now()),
    });
    expect(await workOf('checker', 'countersign')).toMatchObject({ count: 1 });
    expect(await workOf('doctor', 'countersign')).toBeUndefined();
  });

  it('senior matters, for seniors', async () => {
    const childId = await world.addChild();
    const { versionId } = await plantVersion(world, childId, { state: 'draft' });
    await world.within((tx) =>
      tx.insert(exceptions).values({
        versionId,
        authorId: world.people.doctor.id,
        limitCode: 'x',
        contentSha256: '0'.repeat(64),
        state: 'asked',
        askedAt: world.clock.now(),
      }),
    );
    expect(await workOf('senior', 'exceptions')).toMatchObject({
      count: 1,
      href: `/exceptions/${versionId}`,
    });
    expect(await workOf('checker', 'exceptions')).toBeUndefined();
    expect(await workOf('doctor', 'exceptions')).toBeUndefined();
  });
});
