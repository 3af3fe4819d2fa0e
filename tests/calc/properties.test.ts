import { brokenBrims } from '@shared/calc/findings';
import type { MaintenanceOrder, Step, WorkOut, WorkOutRequest } from '@shared/calc/types';
import { workOut } from '@shared/calc/work-out';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { kilograms } from '@shared/units';
import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { anyBolus, anyMaintenance } from './arbitrary';
import { NOW } from './make-request';

const RUNS = { numRuns: 2000 };
vi.setConfig({ testTimeout: 60_000 });

const SLACK = 1 + 1e-9;

type Worked = Extract<WorkOut, { ok: true }>;

/** Runs a check on every order nothing forbids, and says how many there were. */
function everyAccepted(
  orders: fc.Arbitrary<WorkOutRequest>,
  check: (asked: WorkOutRequest, out: Worked) => void,
): number {
  let accepted = 0;
  fc.assert(
    fc.property(orders, (asked) => {
      const out = workOut(asked, DEFAULT_RULEBOOK);
      if (!out.ok || brokenBrims(out.limits).length > 0) return;
      accepted += 1;
      check(asked, out);
    }),
    { numRuns: 6000 },
  );
  return accepted;
}

const over2 = (bornOn: string) => bornOn <= '2024-06-10';

describe('no accepted order passes a brim', () => {
  it('of maintenance', () => {
    const accepted = everyAccepted(anyMaintenance, (asked, { figures }) => {
      const order = asked.order as MaintenanceOrder;
      if (figures.kind !== 'maintenance') throw new Error('wrong kind');
      const { kg } = asked.weight;
      const { rate } = figures;
      const day = rate * 24 + order.feeds + order.drugs;
      const isCentral = asked.line === 'central';
      expect(rate).toBeGreaterThan(0);
      expect(day).toBeLessThanOrEqual((asked.child.sex === 'male' ? 2500 : 2000) * SLACK);
      if (order.method === 'newborn') expect(day).toBeLessThanOrEqual(180 * kg * SLACK);
      const flow = (content: 'potassium' | 'glucoseGPerL') =>
        asked.intake.running.reduce(
          (sum, other) => sum + (other.rate * other.fluid[content]) / 1000,
          (rate * order.fluid[content]) / 1000,
        );
      if (order.fluid.potassium > 0) {
        const most = isCentral ? Math.min(0.5 * kg, 20) : Math.min(0.2 * kg, 10);
        expect(flow('potassium')).toBeLessThanOrEqual(most * SLACK);
        if (!isCentral) expect(order.fluid.potassium).toBeLessThanOrEqual(40);
      }
      if (order.fluid.addedPotassium > 0) expect(asked.results.potassium?.value).toBeLessThanOrEqual(6);
      if (order.fluid.glucoseGPerL > 0 && !over2(asked.child.bornOn)) {
        expect((flow('glucoseGPerL') * 1000) / 60 / kg).toBeLessThanOrEqual(13 * SLACK);
      }
      expect(order.fluid.sodium).toBeLessThanOrEqual(154);
      if (!isCentral) expect(order.fluid.osmolarity).toBeLessThanOrEqual(1000);
      expect(order.hours).toBeLessThanOrEqual(NOW - asked.lastMeasuredAt! > 7 * 86_400_000 ? 12 : 24);
    });
    expect(accepted).toBeGreaterThan(200);
  });

  it('of a bolus', () => {
    const accepted = everyAccepted(anyBolus, ({ order, weight }, { figures }) => {
      expect(figures.volume).toBeLessThanOrEqual(500);
      expect(figures.volume).toBeLessThanOrEqual(20 * weight.kg * SLACK);
      expect(order.fluid.glucoseGPerL).toBe(0);
      expect(order.fluid.potassium).toBeLessThanOrEqual(5);
      expect(order.fluid.sodium).toBeGreaterThanOrEqual(130);
      expect(order.fluid.sodium).toBeLessThanOrEqual(154);
    });
    expect(accepted).toBeGreaterThan(100);
  });

  it('and the program’s own rounding never makes one', () => {
    fc.assert(
      fc.property(anyMaintenance, (asked) => {
        const out = workOut(
          { ...asked, order: { ...(asked.order as MaintenanceOrder), typedRate: undefined } },
          DEFAULT_RULEBOOK,
        );
        if (!out.ok || out.figures.kind !== 'maintenance') return;
        const { perHourExact, rate } = out.figures;
        const made = brokenBrims(out.limits).filter(
          ({ code, value = 0, limit = 0 }) =>
            code === 'maintenance-ceiling' ||
            (code.endsWith('-rate') &&
              (value * perHourExact) / rate <= limit &&
              asked.intake.running.length === 0),
        );
        expect(made).toEqual([]);
      }),
      RUNS,
    );
  });
});

describe('more weight never gives less fluid', () => {
  it('within a method', () => {
    fc.assert(
      fc.property(anyMaintenance, fc.integer({ min: 1, max: 5000 }), (asked, grams) => {
        // neither a fluid's own brims nor a typed rate belong to the method
        const plain = { ...asked.order.fluid, potassium: 0, glucoseGPerL: 0 } as MaintenanceOrder['fluid'];
        const order = { ...(asked.order as MaintenanceOrder), typedRate: undefined, fluid: plain };
        const heavier = Math.round(asked.weight.kg * 1000 + grams) / 1000;
        const lighter = workOut({ ...asked, order }, DEFAULT_RULEBOOK);
        const more = workOut(
          { ...asked, order, weight: { ...asked.weight, kg: kilograms(heavier) } },
          DEFAULT_RULEBOOK,
        );
        if (!lighter.ok || !more.ok) return;
        if (lighter.figures.kind !== 'maintenance' || more.figures.kind !== 'maintenance') return;
        expect(more.figures.fullMl).toBeGreaterThanOrEqual(lighter.figures.fullMl);
        expect(more.figures.rate).toBeGreaterThanOrEqual(lighter.figures.rate);
      }),
      RUNS,
    );
  });
});

/** What a printed sum comes to; undefined where the line is in words. */
function evaluate(working: string): number | undefined {
  const [sum = '', floor] = working.split(', not below 0');
  const printed = sum
    .replaceAll('×', '*')
    .replaceAll('÷', '/')
    .replaceAll('−', '-')
    .replace(/([\d.]+)%/, '($1/100)');
  if (!/^[\d. ()+*/-]+$/.test(printed)) return undefined;
  const value = printed.split(' + ').reduce((total, term) => total + product(term), 0);
  return floor === undefined ? value : Math.max(0, value);
}

/** One term: numbers joined by ×, ÷ or a single −. */
function product(term: string): number {
  const [first = '', ...rest] = term
    .replace(/\(([\d.]+)\/100\)/, (_, n: string) => String(Number(n) / 100))
    .split(' ');
  let value = Number(first);
  for (let i = 0; i < rest.length; i += 2) {
    const by = Number(rest[i + 1]);
    value = rest[i] === '*' ? value * by : rest[i] === '/' ? value / by : value - by;
  }
  return value;
}

describe('the workings', () => {
  const adds = ({ working, result }: Step): boolean => {
    const value = evaluate(working);
    if (value === undefined) return false;
    expect(Math.abs(value - Number(result)), `${working} = ${result}`).toBeLessThan(
      0.006 + Math.abs(value) * 1e-3,
    );
    return true;
  };

  it('add up as printed, line by line', () => {
    let sums = 0;
    fc.assert(
      fc.property(fc.oneof(anyMaintenance, anyBolus), (asked) => {
        const out = workOut(asked, DEFAULT_RULEBOOK);
        if (out.ok) sums += out.steps.filter(adds).length;
      }),
      RUNS,
    );
    expect(sums).toBeGreaterThan(RUNS.numRuns);
  });

  it('end in one answer, which is what is ordered', () => {
    everyAccepted(fc.oneof(anyMaintenance, anyBolus), (_, { steps, figures }) => {
      const answers = steps.filter((step) => step.mark === 'answer');
      expect(answers).toHaveLength(1);
      expect(answers[0]).toBe(steps.at(-1));
      expect(answers[0]?.value).toBe(figures.kind === 'maintenance' ? figures.rate : figures.volume);
    });
  });

  it('name a source wherever a line is no plain sum', () => {
    everyAccepted(fc.oneof(anyMaintenance, anyBolus), (_, { steps }) => {
      expect(steps.filter((step) => step.source === '' && evaluate(step.working) === undefined)).toEqual([]);
    });
  });
});
