import { compareCheck } from '@shared/checks/compare';
import type { CheckForm, Comparison } from '@shared/checks/form';
import type { CheckContext } from '@shared/checks/own';
import { readCheckForm } from '@shared/checks/read-form';
import type { OrderContent } from '@shared/orders/content';
import { millilitres } from '@shared/units';
import { describe, expect, it } from 'vitest';
import { bolus, bolusForm, context, fluidText, maintenance, maintenanceForm } from './support/edie';

const compare = (content: OrderContent, form: CheckForm, ctx: CheckContext = context()): Comparison => {
  const reading = readCheckForm(form, { kind: content.kind, shortForm: content.kind === 'bolus' });
  if (!reading.ok) throw new Error(JSON.stringify(reading.errors));
  return compareCheck(content, reading.entries, ctx);
};
const differing = ({ rows }: Comparison) =>
  rows.filter(({ agrees }) => !agrees).map(({ field, nature }) => `${field}:${nature}`);

/** Every figure below is worked by hand from 100/50/20 mL/kg (Holliday & Segar 1957); tolerances are ours. */
describe('maintenance, fact by fact and choice by choice', () => {
  const cases: {
    what: string;
    form?: Partial<CheckForm>;
    content?: OrderContent;
    outcome: Comparison['outcome'];
    rows?: string[];
    mayAccept?: boolean;
  }[] = [
    { what: 'all alike', outcome: 'agreed' },
    // 1 % of 16.4 is 0.164, inclusive; 1320 → 1000 + 6.564 × 50 = 1328.2, × 0.8 ÷ 24 = 44.27
    {
      what: 'weight 1 % off, inclusive',
      form: { weightKg: '16.564', rate: '44.3', volumeMl: '1063' },
      outcome: 'agreed',
    },
    {
      what: 'weight just over 1 % off',
      form: { weightKg: '16.565', rate: '44.3', volumeMl: '1063' },
      outcome: 'facts-differ',
      rows: ['weightKg:fact'],
    },
    {
      what: 'another weight on the chart, 14 kg: 1200 × 0.8 ÷ 24 = 40',
      form: { weightKg: '14', rate: '40', volumeMl: '960' },
      outcome: 'facts-differ',
      rows: ['weightKg:fact', 'author-arithmetic:fact', 'rate:fact', 'volumeMl:fact'],
    },
    // the design's picture turned round: 55 − 44 = 11 mL/h, 264 mL
    {
      what: 'fraction: 100 % against 80 %',
      form: { fraction: 'full', rate: '55', volumeMl: '1320' },
      outcome: 'choices-differ',
      rows: ['fraction:choice', 'rate:follows', 'volumeMl:follows'],
      mayAccept: true,
    },
    {
      what: 'hours: 12 against 24',
      form: { hours: '12', volumeMl: '528' },
      outcome: 'choices-differ',
      rows: ['hours:choice', 'volumeMl:follows'],
      mayAccept: true,
    },
    {
      what: 'method: per hour, 40 + 12.8 = 52.8, × 0.8 = 42.24',
      form: { method: 'bands-hourly', rate: '42.2', volumeMl: '1013' },
      outcome: 'choices-differ',
      rows: ['method:choice', 'rate:follows', 'volumeMl:follows'],
      mayAccept: true,
    },
    {
      what: 'no potassium against 20',
      form: { addedPotassium: '0' },
      outcome: 'choices-differ',
      rows: ['addedPotassium:choice'],
      mayAccept: true,
    },
    {
      what: 'another isotonic fluid with glucose 5 %',
      form: { base: 'Balanced crystalloid 140 + glucose 5%', addedPotassium: '0' },
      outcome: 'choices-differ',
      rows: ['base:choice', 'addedPotassium:choice'],
      mayAccept: true,
    },
    {
      what: 'half-strength saline: another class',
      form: { base: 'Sodium chloride 0.45% + glucose 5%', addedPotassium: '0' },
      outcome: 'facts-differ',
      rows: ['base:fact', 'addedPotassium:choice'],
    },
    {
      what: 'no glucose: another class',
      form: { base: 'Sodium chloride 0.9%', addedPotassium: '0' },
      outcome: 'facts-differ',
      rows: ['base:fact', 'addedPotassium:choice'],
    },
    {
      what: 'intake 100 mL missed by the author: 1056 − 100 = 956, 39.83',
      form: { feedsMl: '60', drugsMl: '40', rate: '39.8', volumeMl: '955' },
      outcome: 'facts-differ',
      rows: ['intake:fact', 'author-arithmetic:fact', 'rate:fact', 'volumeMl:fact'],
    },
    { what: 'intake 1 mL off, inclusive', form: { drugsMl: '1' }, outcome: 'agreed' },
    { what: 'intake 1.1 mL off', form: { drugsMl: '1.1' }, outcome: 'facts-differ', rows: ['intake:fact'] },
    // max(1 % of 44, one step 0.1) = 0.44
    { what: 'rate 0.4 mL/h off', form: { rate: '44.4', volumeMl: '1066' }, outcome: 'agreed' },
    {
      what: 'rate 0.5 mL/h off',
      form: { rate: '44.5', volumeMl: '1068' },
      outcome: 'facts-differ',
      rows: ['own-arithmetic:fact', 'rate:fact', 'volumeMl:fact'],
    },
    {
      what: 'rate ten times: does not follow from the checker’s own entries',
      form: { rate: '440', volumeMl: '1056' },
      outcome: 'facts-differ',
      rows: ['own-arithmetic:fact', 'rate:fact', 'own-volume:fact'],
    },
    {
      what: 'volume that is not rate × hours',
      form: { volumeMl: '1320' },
      outcome: 'facts-differ',
      rows: ['volumeMl:fact', 'own-volume:fact'],
    },
    {
      what: 'a choice beyond the brim: potassium 60 is not stocked',
      form: { addedPotassium: '60' },
      outcome: 'facts-differ',
    },
    {
      what: 'author’s rate set by hand to 30 where the method gives 44',
      content: maintenance({ typedRate: '30.0' }, { rateMlPerH: '30.0', volumeMl: '720.0' }),
      outcome: 'choices-differ',
      rows: ['typedRate:choice', 'rate:follows', 'volumeMl:follows'],
      mayAccept: true,
    },
    {
      what: 'author’s stored arithmetic wrong: 54 for 44',
      content: maintenance({}, { rateMlPerH: '54.0', volumeMl: '1296.0', perHourExact: '54.0000' }),
      outcome: 'facts-differ',
      rows: ['author-arithmetic:fact', 'rate:fact', 'volumeMl:fact'],
    },
  ];

  it.each(cases)(
    '$what → $outcome',
    ({ form, content = maintenance(), outcome, rows, mayAccept = false }) => {
      const comparison = compare(content, maintenanceForm(form));
      expect(comparison.outcome).toBe(outcome);
      expect(comparison.mayAccept).toBe(mayAccept);
      if (rows) expect(differing(comparison)).toEqual(rows);
      expect(comparison.effect === '').toBe(outcome === 'agreed');
    },
  );

  it('names both values, how far apart, and what it would have done', () => {
    const order = maintenance(
      { fraction: 'full' },
      { rateMlPerH: '55.0', volumeMl: '1320.0', perHourExact: '55.0000' },
    );
    const comparison = compare(order, maintenanceForm());
    const rate = comparison.rows.find(({ field }) => field === 'rate');
    expect(rate).toMatchObject({ author: '55 mL/h', checker: '44 mL/h', apart: '11 mL/h apart' });
    // 11 × 24 = 264 mL; × 20 mmol/L = 5.28; × 154 = 40.7; × 50 g/L = 13.2
    expect(comparison.effect).toBe(
      'At the checker’s figures the child would get, in 24 h, 264 mL less, 5.3 mmol of potassium less, 41 mmol of sodium less and 13 g of glucose less.',
    );
  });

  it('lets no choice be accepted that the rulebook would stop', () => {
    // potassium 40 at a blood potassium of 6.4: added potassium is a brim (Royal Children's Hospital Melbourne)
    const results = { potassium: { value: 6.4, at: context().at } };
    const comparison = compare(
      maintenance(),
      maintenanceForm({ fraction: 'full', rate: '55', volumeMl: '1320' }),
      context({ results }),
    );
    expect(comparison).toMatchObject({ outcome: 'choices-differ', mayAccept: false });
  });

  it.each([
    { kg: '4.020', checker: '4.04', agrees: true },
    { kg: '4.020', checker: '4.041', agrees: false },
    { kg: '5.000', checker: '5.05', agrees: true },
    { kg: '4.999', checker: '5.02', agrees: false },
  ])('under 5 kg a weight may differ by 0.02 kg: $kg and $checker', ({ kg, checker, agrees }) => {
    const order = maintenance({}, {}, { weight: { ...maintenance().weight, kg } });
    const { rows } = compare(order, maintenanceForm({ weightKg: checker }));
    expect(rows.find(({ field }) => field === 'weightKg')?.agrees).toBe(agrees);
  });
});

describe('the fluid plan binds both', () => {
  const plan = { kind: 'fraction', fraction: 'two-thirds' } as const;
  // 1320 × 2 ÷ 3 = 880, ÷ 24 = 36.67
  const planned = maintenance(
    { fraction: 'two-thirds' },
    { rateMlPerH: '36.7', volumeMl: '881.0', perHourExact: '36.6667' },
  );
  const followed = maintenanceForm({ fraction: 'two-thirds', rate: '36.7', volumeMl: '881' });

  it('agrees when both keep it', () => {
    expect(compare(planned, followed, context({ plan })).outcome).toBe('agreed');
  });
  it('is a fact when the order departs', () => {
    expect(compare(maintenance(), followed, context({ plan })).outcome).toBe('facts-differ');
  });
  it('is a fact when both depart', () => {
    expect(differing(compare(maintenance(), maintenanceForm(), context({ plan })))).toEqual(['plan:fact']);
  });
  it('lets a departure stand that a senior agreed to', () => {
    const limit = {
      code: 'plan-fraction',
      strength: 'senior',
      title: '',
      text: '',
      met: false,
      source: '',
      reason: null,
    } as const;
    const order = maintenance({}, {}, { limits: [limit] });
    expect(compare(order, maintenanceForm(), context({ plan })).outcome).toBe('agreed');
  });
  it.each([
    { most: 1056, outcome: 'agreed' },
    { most: 1000, outcome: 'facts-differ' },
  ])('an allowance of $most mL counts all intake: $outcome', ({ most, outcome }) => {
    const allowance = { kind: 'allowance', mlPer24h: millilitres(most) } as const;
    expect(compare(maintenance(), maintenanceForm(), context({ plan: allowance })).outcome).toBe(outcome);
  });
});

describe('bolus', () => {
  it.each([
    { what: 'alike', form: {}, outcome: 'agreed', rows: [] },
    { what: 'volume 1 % off', form: { volumeMl: '165.6' }, outcome: 'agreed', rows: [] },
    { what: 'volume 2 mL off', form: { volumeMl: '166' }, outcome: 'facts-differ', rows: ['volumeMl:fact'] },
    { what: '20 mL/kg', form: { volumeMl: '328' }, outcome: 'facts-differ', rows: ['volumeMl:fact'] },
    {
      what: 'another weight: 12 kg',
      form: { weightKg: '12', volumeMl: '120' },
      outcome: 'facts-differ',
      rows: ['weightKg:fact', 'author-arithmetic:fact', 'volumeMl:fact'],
    },
    {
      what: 'glucose',
      form: { base: 'Sodium chloride 0.9% + glucose 5%' },
      outcome: 'facts-differ',
      rows: ['base:fact'],
    },
    {
      what: 'over 15 min',
      form: { overMinutes: '15' },
      outcome: 'choices-differ',
      rows: ['overMinutes:choice'],
    },
  ])('$what → $outcome', ({ form, outcome, rows }) => {
    const comparison = compare(bolus(), bolusForm(form));
    expect(comparison.outcome).toBe(outcome);
    expect(differing(comparison)).toEqual(rows);
  });

  it('a fluid of the same class is a choice', () => {
    const order = bolus(
      {},
      {},
      { fluid: { ...fluidText('s0'), base: 'Balanced crystalloid 140', sodium: '140' } },
    );
    expect(differing(compare(order, bolusForm()))).toContain('base:choice');
  });
});
