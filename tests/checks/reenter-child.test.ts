import { reenterChild, type ChartChild } from '@shared/checks/reenter-child';
import type { ReenteredChild } from '@shared/checks/read-form';
import { describe, expect, it } from 'vitest';
import { at } from './support/edie';

const ZONE = 'Europe/London';
const edie: ChartChild = { given: 'Edie', surname: 'Hartnoll', sex: 'female', bornOn: '2022-03-14' };
const right: ReenteredChild = { initials: 'EH', sex: 'female', age: 4, ageUnit: 'years' };
const NOON = at('2026-06-10T11:00:00.000Z');

const ask = (entered: Partial<ReenteredChild>, child: Partial<ChartChild> = {}, now = NOON) => {
  const outcome = reenterChild({ ...right, ...entered }, { ...edie, ...child }, now, ZONE);
  return outcome.ok ? [] : outcome.differs;
};

describe('re-entering the child', () => {
  it.each([
    ['EH', {}, true],
    ['e h', {}, true],
    ['E.H.', {}, true],
    ['HE', {}, false],
    ['E', {}, false],
    ['', {}, false],
    ['MS', { given: 'Mary-Jane', surname: 'Sandoval' }, true],
    ['MJS', { given: 'Mary-Jane', surname: 'Sandoval' }, true],
    ['JS', { given: 'Mary-Jane', surname: 'Sandoval' }, false],
    ['AV', { given: 'Åke', surname: 'van den Berg' }, true],
    ['AVDB', { given: 'Åke', surname: 'van den Berg' }, true],
    ['NO', { given: 'Nuala', surname: 'O’Neill' }, true],
    ['ЮЛ', { given: 'Юлия', surname: 'Лобова' }, true],
  ])('initials %j', (initials, child, fits) => {
    expect(ask({ initials }, child)).toEqual(fits ? [] : ['initials']);
  });

  it.each([
    ['female', 'female', true],
    ['male', 'female', false],
    ['not-recorded', null, true],
    ['female', null, false],
    ['not-recorded', 'male', false],
  ] as const)('sex %s for a record of %s', (entered, sex, fits) => {
    expect(ask({ sex: entered }, { sex })).toEqual(fits ? [] : ['sex']);
  });

  it.each([
    // completed years; a birthday is reached on its day
    [4, 'years', '2022-03-14', true],
    [5, 'years', '2022-03-14', false],
    [4, 'years', '2022-06-10', true],
    [3, 'years', '2022-06-11', true],
    [4, 'years', '2022-06-11', false],
    [50, 'months', '2022-03-14', true],
    [51, 'months', '2022-03-14', false],
    [17, 'months', '2025-01-10', true],
    // nought years fits every infant and is therefore no answer
    [0, 'years', '2026-01-10', false],
    [0, 'months', '2026-06-01', false],
    [9, 'days', '2026-06-01', true],
    [8, 'days', '2026-06-01', false],
    [0, 'days', '2026-06-10', true],
    [3, 'hours', '2026-06-10', false],
  ] as const)('%i %s for a birth on %s', (age, ageUnit, bornOn, fits) => {
    expect(ask({ age, ageUnit }, { bornOn })).toEqual(fits ? [] : ['age']);
  });

  it('takes days by the clock or by the calendar, and hours just past', () => {
    const child = { bornOn: '2026-06-08', bornAt: at('2026-06-08T20:00:00.000Z') };
    // 39 h: one completed day by the clock, two by the calendar
    expect(ask({ age: 1, ageUnit: 'days' }, child)).toEqual([]);
    expect(ask({ age: 2, ageUnit: 'days' }, child)).toEqual([]);
    expect(ask({ age: 3, ageUnit: 'days' }, child)).toEqual(['age']);
    expect(ask({ age: 39, ageUnit: 'hours' }, child)).toEqual([]);
    expect(ask({ age: 38, ageUnit: 'hours' }, child)).toEqual([]);
    expect(ask({ age: 40, ageUnit: 'hours' }, child)).toEqual(['age']);
  });

  it('says which entries differ and never what the chart has', () => {
    const outcome = reenterChild({ ...right, initials: 'AB', age: 9 }, edie, NOON, ZONE);
    expect(outcome).toMatchObject({ ok: false, differs: ['initials', 'age'] });
    if (outcome.ok) throw new Error('accepted');
    expect(outcome.words).toContain('The initials and age you entered do not fit this child.');
    for (const told of ['EH', 'Edie', 'Hartnoll', '4', 'female']) expect(outcome.words).not.toContain(told);
  });
});
