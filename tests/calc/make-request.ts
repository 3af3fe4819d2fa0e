import type {
  BolusOrder,
  ChildFacts,
  FluidComposition,
  LimitFinding,
  MaintenanceOrder,
  WorkOut,
  WorkOutRequest,
} from '@shared/calc/types';
import { workOut } from '@shared/calc/work-out';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { DEFAULT_SHELF } from '@shared/shelf/default';
import { HOUR, instant } from '@shared/time';
import type { Instant } from '@shared/time';
import { hours, kilograms, millilitres, millilitresPerKg, minutes } from '@shared/units';

/** 10 June 2026, 10:42 in London. */
export const NOW = instant(Date.UTC(2026, 5, 10, 9, 42));
export const ago = (h: number): Instant => instant(Math.round(NOW - h * HOUR));

/** A fluid of the default shelf by its name. */
export function fluid(name: string): FluidComposition {
  const found = DEFAULT_SHELF.find((product) => product.name === name);
  if (!found) throw new Error(`not on the shelf: ${name}`);
  return { id: name, ...found };
}

export const SALINE = 'Sodium chloride 0.9%';
export const USUAL = 'Sodium chloride 0.9% + glucose 5%';
export const USUAL_20 = 'Sodium chloride 0.9% + glucose 5% + potassium chloride 20 mmol/L';
export const USUAL_40 = 'Sodium chloride 0.9% + glucose 5% + potassium chloride 40 mmol/L';

export const maintenance = (change: Partial<MaintenanceOrder> = {}): MaintenanceOrder => ({
  kind: 'maintenance',
  method: 'bands-daily',
  fraction: 'full',
  feeds: millilitres(0),
  drugs: millilitres(0),
  hours: hours(24),
  fluid: fluid(USUAL),
  ...change,
});

export const bolus = (change: Partial<BolusOrder> = {}): BolusOrder => ({
  kind: 'bolus',
  dose: { by: 'weight', mlPerKg: millilitresPerKg(10) },
  over: minutes(10),
  route: 'syringe',
  fluid: fluid(SALINE),
  ...change,
});

const CHILD: ChildFacts = { bornOn: '2022-03-14', sex: 'female', gestationWeeks: 40, flags: [] };

type Change = Partial<Omit<WorkOutRequest, 'child'>> & {
  child?: Partial<ChildFacts>;
  kg?: number;
};

/** A four-year-old girl of 16.4 kg weighed this morning, with a normal sodium and potassium; change what the case needs. */
export function request({ child, kg = 16.4, ...change }: Change = {}): WorkOutRequest {
  return {
    at: NOW,
    zone: 'Europe/London',
    child: { ...CHILD, ...child },
    weight: { kg: kilograms(kg), method: 'scales', at: ago(3) },
    lastMeasuredAt: ago(3),
    line: 'peripheral',
    results: { sodium: { value: 140, at: ago(4) }, potassium: { value: 3.9, at: ago(4) } },
    intake: { bolusesLast24h: [], running: [] },
    order: maintenance(),
    ...change,
  };
}

/** A term newborn so many hours old. */
export const newborn = (h: number): Partial<ChildFacts> => ({
  bornOn: new Date(ago(h)).toISOString().slice(0, 10),
  bornAt: ago(h),
});

type Worked = Extract<WorkOut, { ok: true }>;

/** The work-out under the default rulebook, which must not refuse. */
export function worked(asked: WorkOutRequest): Worked {
  const outcome = workOut(asked, DEFAULT_RULEBOOK);
  if (!outcome.ok) throw new Error(`refused: ${outcome.code}`);
  return outcome;
}

/** The code of a refusal, or 'worked out'. */
export function refusal(asked: WorkOutRequest): string {
  const outcome = workOut(asked, DEFAULT_RULEBOOK);
  return outcome.ok ? 'worked out' : outcome.code;
}

/** The findings of one code. */
export const finding = (asked: WorkOutRequest, code: string): LimitFinding | undefined =>
  worked(asked).limits.find((limit) => limit.code === code);

/** 'brim', 'senior', 'caution' where the limit is broken, 'met' where it holds, 'none' where it was not looked at. */
export function strengthOf(asked: WorkOutRequest, code: string): string {
  const found = finding(asked, code);
  return found === undefined ? 'none' : found.met ? 'met' : found.strength;
}
