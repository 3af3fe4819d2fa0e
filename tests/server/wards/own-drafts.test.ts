import { ROUTES } from '@shared/routes';
import { beforeEach, describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { sharedDatabase } from '../support/database';
import { makeDraft } from '../support/make-order';
import { makeWorld, type PersonKey, type World } from '../support/world';

const urls = sharedDatabase();
let world: World;
beforeEach(async () => {
  world = await makeWorld(urls);
});

const wardOf = async (who: PersonKey): Promise<z.infer<typeof ROUTES.ward.response>> =>
  ROUTES.ward.response.parse(
    (await world.as(who).call(ROUTES.ward, { params: { id: world.wards.heron } })).body,
  );

describe('an own draft on the ward page', () => {
  it('is worked out as it would be signed, for its author alone', async () => {
    const childId = await world.addChild();
    await makeDraft(world, childId);
    const [row] = (await wardOf('doctor')).rows;
    // Holliday & Segar 1957: 16.4 kg 1320 mL, four fifths 1056 mL, 44 mL/h
    expect(row!.orders[0]!.open).toMatchObject({
      title: 'Maintenance, four fifths',
      rateMlPerH: '44.0',
      volumeMl: '1056.0',
      gauge: { brimMl: '2500.0', notches: ['1000.0', '1320.0'] },
      author: 'Imogen Vale',
      overBrimText: null,
    });
    for (const who of ['checker', 'senior', 'lead', 'nurse'] as const) {
      expect((await wardOf(who)).rows[0]!.orders[0]!.open).toBeNull();
    }
  });

  it('over the brim says so, and the head of the page leads to it', async () => {
    const childId = await world.addChild({
      surname: 'Brackenbury',
      given: 'Otis',
      bornOn: '2012-03-14',
      kg: 62,
    });
    const { versionId } = await makeDraft(world, childId, { kind: 'bolus' });
    const page = await wardOf('doctor');
    const { open } = page.rows[0]!.orders[0]!;
    expect(open).toMatchObject({ title: 'Bolus, 10\u00a0mL/kg', volumeMl: '620.0' });
    expect(open!.overBrimText).toMatch(/\w/);
    expect(page.forYou.find(({ code }) => code === 'over-brim')).toMatchObject({
      count: 1,
      detail: `Brackenbury, Otis, ${open!.overBrimText}`,
      href: `/drafts/${versionId}`,
    });
    expect((await wardOf('otherDoctor')).forYou).toEqual([]);
  });

  it('half typed has no figures and breaks nothing', async () => {
    const childId = await world.addChild();
    await makeDraft(world, childId, { form: { typedRate: '4,4e', hours: '' } });
    const [line] = (await wardOf('doctor')).rows[0]!.orders;
    expect(line).toMatchObject({ open: null, nextDue: { text: 'Draft open', note: 'yours, since 12:00' } });
  });
});
