import { ROUTES } from '@shared/routes';
import { beforeEach, describe, expect, it } from 'vitest';
import { sharedDatabase } from '../support/database';
import { makeWorld, type PersonKey, type World } from '../support/world';

const urls = sharedDatabase();
let world: World;
beforeEach(async () => {
  world = await makeWorld(urls);
});

describe('finding a child', () => {
  const find = async (text: string, who: PersonKey = 'nurse') => {
    const answer = await world.as(who).call(ROUTES.searchChildren, { body: { text } });
    expect(answer.status).toBe(200);
    return (answer.body.children as { surname: string; ward: { name: string } | null }[]).map(
      ({ surname, ward }) => `${surname}@${ward?.name ?? 'gone'}`,
    );
  };
  beforeEach(async () => {
    await world.addChild({ surname: 'Ekström', given: 'Liv', number: 'SM 407 552' });
    await world.addChild({ surname: 'Ekstrand', given: 'Otis', number: 'SM 500 000' });
    await world.addChild({ surname: 'Moyo', given: 'Tendai', number: 'ab 12', ward: 'curlew' });
    await world.addChild({ surname: 'O’Dell_%', given: 'Jude', number: 'X-1' });
  });

  it.each([
    ['ekst', ['Ekstrand@Heron', 'Ekström@Heron']],
    ['EKSTRÖ', ['Ekström@Heron']],
    ['SM 4', ['Ekström@Heron']],
    ['sm 407', ['Ekström@Heron']],
    ['liv', ['Ekström@Heron']],
    ['ekst, o', ['Ekstrand@Heron']],
    ['strand', []],
    ['%', []],
    ['_', []],
    ['', []],
    ["'; drop table children; --", []],
    ['moyo', ['Moyo@Curlew']],
  ])('by %j', async (text, found) => {
    expect(await find(text)).toEqual(found);
  });

  it('on one’s own wards only, a lead in the whole hospital, nobody in another', async () => {
    expect(await find('ekst', 'elsewhere')).toEqual([]);
    expect(await find('moyo', 'elsewhere')).toEqual(['Moyo@Curlew']);
    expect(await find('moyo', 'lead')).toEqual(['Moyo@Curlew']);
    const other = await makeWorld(urls);
    const answer = await other.as('lead').call(ROUTES.searchChildren, { body: { text: 'ekst' } });
    expect(answer.body.children).toEqual([]);
    const admin = await world.as('admin').call(ROUTES.searchChildren, { body: { text: 'ekst' } });
    expect(admin.status).toBe(403);
  });

  it('says when there are more', async () => {
    for (let i = 0; i < 21; i++) await world.addChild({ surname: 'Zander', kg: null });
    const answer = await world.as('nurse').call(ROUTES.searchChildren, { body: { text: 'zan' } });
    expect([answer.body.children.length, answer.body.more]).toEqual([20, true]);
  });

  it('refuses endless text', async () => {
    const answer = await world.as('nurse').call(ROUTES.searchChildren, { body: { text: 'x'.repeat(101) } });
    expect(answer.status).toBe(422);
  });
});
