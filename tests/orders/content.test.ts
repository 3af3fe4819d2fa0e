import { buildContent, contentText, readContent } from '@shared/orders/build-content';
import { rulebookOf } from '@shared/orders/chart-facts';
import { columnsOf } from '@shared/orders/content-columns';
import type { OrderForm } from '@shared/orders/form';
import { formFromContent } from '@shared/orders/form-from-content';
import { proposeForm } from '@shared/orders/propose-form';
import { titleOf, waitingWords } from '@shared/orders/words';
import { isWorkedOut, workOutDraft } from '@shared/orders/work-out-draft';
import type { DraftContext } from '@shared/routes/orders';
import { describe, expect, it } from 'vitest';
import { chart, weight } from './chart';

function contentOf(kind: 'maintenance' | 'bolus', change: Partial<OrderForm> = {}, context = chart()) {
  const stated = kind === 'maintenance' ? { feedsMl: '0', drugsMl: '70' } : {};
  const form = { ...proposeForm(kind, context), reason: 'Unwell', ...stated, ...change };
  const work = workOutDraft(form, context);
  if (!isWorkedOut(work)) throw new Error(JSON.stringify(work));
  const { request, extras, workOut } = work;
  const rulebook = rulebookOf(context);
  return buildContent({
    code: 'BL-260610-014',
    version: 1,
    form,
    request,
    extras,
    workOut,
    context,
    rulebook,
  });
}

describe('content', () => {
  it('holds every figure as a decimal at its scale', () => {
    const content = contentOf('maintenance');
    expect(content.weight).toEqual({
      id: 'weight-1',
      kg: '16.400',
      method: 'scales',
      at: '2026-06-10T06:50:00.000Z',
    });
    // 1320 − 70 = 1250 mL in 24 h, 52.08 mL/h; Holliday & Segar 1957, pump step 0.1
    expect(content.figures).toEqual({
      rateMlPerH: '52.1',
      volumeMl: '1250.0',
      hours: '24',
      overMinutes: null,
      mlPerKg: null,
      perHourExact: '52.0833',
      fullMl: '1320.0',
    });
    expect(content.gauge).toMatchObject({ orderMl: '1250.0', brimMl: '2000.0', brimNote: 'in 24 h' });
    expect(content.otherBrims.length).toBeGreaterThan(0);
  });

  it.each(['maintenance', 'bolus'] as const)('of %s is one text, read back whole', (kind) => {
    const content = contentOf(kind);
    const text = contentText(content);
    expect(readContent(text)).toEqual(content);
    expect(contentText(readContent(text))).toBe(text);
  });

  it('does not change with the clock, only with the draft or the chart', () => {
    const later = chart({ now: '2026-06-10T11:50:00.000Z' });
    const form = { ...proposeForm('maintenance', chart()) };
    const at = (context: DraftContext, change = {}) =>
      contentText(
        contentOf(
          'maintenance',
          { ...form, reason: 'Unwell', feedsMl: '0', drugsMl: '70', ...change },
          context,
        ),
      );
    const text = at(chart());
    expect(at(later)).toBe(text);
    expect(at(later, { drugsMl: '71' })).not.toBe(text);
    expect(at(chart({}, { allergies: 'None known' }))).not.toBe(text);
  });

  it('keeps two clocks: started within 6 h, over after 24 h; a bolus within 2 h (ours)', () => {
    expect(contentOf('maintenance')).toMatchObject({
      plannedStart: '2026-06-10T11:00:00.000Z',
      startBy: '2026-06-10T17:00:00.000Z',
      lapsesAt: '2026-06-11T11:00:00.000Z',
    });
    expect(contentOf('bolus')).toMatchObject({
      startBy: '2026-06-10T13:00:00.000Z',
      lapsesAt: '2026-06-10T13:10:00.000Z',
    });
  });

  it('lends every query column', () => {
    expect(columnsOf(contentOf('bolus'))).toMatchObject({
      weightKg: 16.4,
      // 16.4 kg × 10; Resuscitation Council UK 2023
      volumeMl: 164,
      overMin: 10,
      rateMlH: null,
      lineClass: 'peripheral',
      urgency: 'urgent',
      rulebookNumber: 1,
    });
    expect(columnsOf(contentOf('maintenance'))).toMatchObject({ rateMlH: 52.1, overMin: null });
  });

  it.each<[string, boolean, DraftContext]>([
    ['a child on scales', false, chart()],
    [
      'a weight far off the reference',
      true,
      chart({ weights: [weight('weight-1', '16.400', { z: '3.01' })] }),
    ],
    ['a weight on its line', false, chart({ weights: [weight('weight-1', '16.400', { z: '-3.00' })] })],
    ['an old weight, a senior’s matter', true, chart({ lastMeasuredAt: '2026-06-01T06:00:00.000Z' })],
  ])('of %s: high risk %s', (_what, isHighRisk, context) => {
    expect(contentOf('maintenance', {}, context).isHighRisk).toBe(isHighRisk);
  });
});

describe('a form made from content', () => {
  it.each(['maintenance', 'bolus'] as const)('of %s leads to the same content again', (kind) => {
    const content = contentOf(kind);
    const form = formFromContent(content, chart());
    expect(contentOf(kind, form)).toEqual(content);
  });

  it('proposes new times when the old ones have passed', () => {
    const later = chart({ now: '2026-06-10T15:02:00.000Z' });
    const form = formFromContent(contentOf('maintenance'), later);
    expect(form).toMatchObject({
      plannedStart: '2026-06-10T16:15',
      reviewBy: '2026-06-11T04:15',
      bloodsBy: '2026-06-11T16:15',
    });
  });
});

describe('words', () => {
  it.each([
    [contentOf('maintenance'), 'Maintenance, in full'],
    [contentOf('maintenance', { fraction: 'two-thirds' }), 'Maintenance, two thirds'],
    [contentOf('maintenance', { typedRate: '52.1' }), 'Maintenance, rate typed'],
    [contentOf('bolus'), 'Bolus, 10\u00a0mL/kg'],
  ])('%# titles an order', (content, title) => {
    expect(titleOf(content)).toBe(title);
  });

  it.each([
    [0, 60, 38, 'waits 38 min'],
    [0, 60, 60, 'waits 1 h'],
    [0, 60, 65, 'late by 5 min'],
    [10, null, 5, 'waits 0 min'],
  ])('signed at %i, due at %j, now %i: %s', (signed, due, now, text) => {
    const minute = 60_000;
    expect(waitingWords(signed * minute, due === null ? null : due * minute, now * minute)).toBe(text);
  });
});
