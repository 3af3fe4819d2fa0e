import { describe, expect, it } from 'vitest';
import { childFormSchema, emptyChild } from '@/features/children/forms/child-form';

const typed = {
  ...emptyChild('0b0e7c3c-0000-4000-8000-000000000001'),
  number: 'SM 418 207',
  surname: 'Hartnoll',
  given: 'Edie',
  bornOn: '2022-03-14',
  sex: 'female',
  allergies: 'None known',
};
const faults = (change: Partial<typeof typed>) =>
  childFormSchema.safeParse({ ...typed, ...change }).error?.issues.map(({ path }) => path.join('.')) ?? [];

describe('the form of a child', () => {
  it('reads what is typed; empty fields are not recorded, never zero', () => {
    expect(childFormSchema.parse(typed)).toMatchObject({
      bornAt: null,
      sex: 'female',
      gestationWeeks: null,
      gestationDays: null,
    });
    expect(
      childFormSchema.parse({ ...typed, bornTime: '07:50', gestationWeeks: '39', gestationDays: '4' }),
    ).toMatchObject({ bornAt: '2022-03-14T07:50', gestationWeeks: 39, gestationDays: 4 });
    expect(childFormSchema.parse({ ...typed, sex: 'not-recorded' })).toMatchObject({ sex: null });
  });

  it.each([
    ['no choice of sex is assumed', { sex: '' }, ['sex']],
    ['weeks with letters', { gestationWeeks: '39w' }, ['gestationWeeks']],
    ['a broken week', { gestationWeeks: '39.5' }, ['gestationWeeks']],
    [
      'nothing at all',
      { number: '', surname: ' ', given: '', bornOn: '', allergies: '' },
      ['number', 'surname', 'given', 'bornOn', 'allergies'],
    ],
  ])('refuses %s', (_name, change, paths) => {
    expect(faults(change)).toEqual(expect.arrayContaining(paths));
  });
});
