import { ROUTES } from '@shared/routes';
import { addCivilDays, civilDate, civilParts, type Instant } from '@shared/time';
import { inTransaction } from '../db/transaction';
import { results } from '../db/schema/children';
import type { DemoBirth } from '../../fixtures/demo/script';
import { agoAt, call, typedMoment, type Turn } from './scene';

const pad = (n: number): string => String(n).padStart(2, '0');

/** A date so many whole months and days before a day. */
function civilBefore(today: string, months: number, days: number): string {
  const { year, month, day } = civilParts(today);
  const count = year * 12 + (month - 1) - months;
  // the 28th is in every month
  const back = `${Math.floor(count / 12)}-${pad((count % 12) + 1)}-${pad(Math.min(day, 28))}`;
  return addCivilDays(back, -days);
}

function birthOf(born: DemoBirth, now: Instant, zone: string): { bornOn: string; bornAt: string | null } {
  if ('before' in born) {
    const bornAt = typedMoment(agoAt(now, born.before), zone);
    return { bornOn: bornAt.slice(0, 10), bornAt };
  }
  const months = 'years' in born ? born.years * 12 : born.months;
  return { bornOn: civilBefore(civilDate(now, zone), months, born.days ?? 0), bornAt: null };
}

export async function register(turn: Turn<'register'>): Promise<void> {
  const { scene, child } = turn;
  const { ward, bed, number, surname, given, born, sex, gestation, allergies, flags } = child.story.child;
  const body = {
    ...birthOf(born, scene.now, scene.hospital.zone),
    number,
    surname,
    given,
    sex,
    gestationWeeks: gestation?.[0] ?? null,
    gestationDays: gestation?.[1] ?? null,
    allergies: allergies ?? 'Not asked',
    flags: flags ?? [],
    bed,
    wardId: scene.hospital.wards[ward],
  };
  child.childId = (await call(turn, ROUTES.registerChild, { body })).childId;
}

export async function weigh(turn: Turn<'weigh'>): Promise<void> {
  const { scene, child, step, at } = turn;
  const measuredAt = step.measured === undefined ? at : agoAt(scene.now, step.measured);
  const body = {
    kg: step.kg,
    method: step.method,
    at: typedMoment(measuredAt, scene.hospital.zone, -3_600_000),
    secondReadingKg: step.secondKg ?? null,
  };
  await call(turn, ROUTES.recordWeight, { params: { id: child.childId }, body });
}

/** Results have no screen yet: they are put on the chart with the owner's address. */
export async function addResults({ scene, child, step, at }: Turn<'results'>): Promise<void> {
  const { owner, hospital, now } = scene;
  const measuredAt = step.measured === undefined ? at : agoAt(now, step.measured);
  const rows = Object.entries(step.values).map(([analyte, [value, unit]]) => ({
    childId: child.childId,
    analyte,
    value: Number(value),
    unit,
    at: measuredAt,
    by: hospital.people[step.by].id,
    recordedAt: at,
  }));
  await inTransaction(owner, hospital.id, 'read write', (tx) => tx.insert(results).values(rows));
}

export async function bolusElsewhere(turn: Turn<'bolus-elsewhere'>): Promise<void> {
  const { scene, child, step } = turn;
  const given = typedMoment(agoAt(scene.now, step.given), scene.hospital.zone, -3_600_000);
  const body = { what: 'bolus', ml: step.ml, at: given, where: step.where };
  await call(turn, ROUTES.recordIntake, { params: { id: child.childId }, body });
}

export async function plan(turn: Turn<'plan'>): Promise<void> {
  const { child, step } = turn;
  const body = {
    kind: step.fraction === undefined ? 'allowance' : 'fraction',
    fraction: step.fraction ?? null,
    mlPer24h: step.mlPer24h ?? null,
    reason: step.reason,
  };
  await call(turn, ROUTES.setFluidPlan, { params: { id: child.childId }, body });
}
