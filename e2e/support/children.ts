import type { Flag, Sex, WeightMethod } from '../../shared/calc/types';
import { addCivilDays, civilDate, instant } from '../../shared/time';
import { kilograms } from '../../shared/units';
import { children, results, stays } from '../../server/db/schema/children';
import { weights } from '../../server/db/schema/weights';
import type { Tx } from '../../server/db/transaction';
import type { MadeHospital } from '../../server/demo/make-hospital';
import type { CastKey } from './cast';

const HOUR = 3_600_000;
const ZONE = 'Europe/London';

export type ChildChange = {
  surname?: string;
  given?: string;
  number?: string;
  ward?: 'Heron' | 'Curlew';
  bed?: string;
  ageDays?: number;
  sex?: Sex | null;
  flags?: Flag[];
  /** Weighed an hour ago on standing scales; null for a child nobody has weighed. */
  kg?: number | null;
};
export type MadeChild = {
  id: string;
  number: string;
  surname: string;
  given: string;
  bornOn: string;
  weightId: string;
};
export type WeightChange = { kg: number; method?: WeightMethod; hoursAgo?: number; by?: CastKey };

type Scene = { within: <T>(work: (tx: Tx) => Promise<T>) => Promise<T>; hospital: MadeHospital<CastKey> };

let numbers = 0;

/** Edie Hartnoll, invented: 4 years, 16.4 kg, so 1320 mL a day in full and 44 mL/h at 80%. */
export async function insertChild(scene: Scene, change: ChildChange = {}): Promise<MadeChild> {
  const { within, hospital } = scene;
  const now = Date.now();
  const bornOn = addCivilDays(civilDate(instant(now), ZONE), -(change.ageDays ?? 4 * 366));
  const number = change.number ?? `SM ${String(100_000 + ++numbers).slice(1)}`;
  const row = { number, surname: change.surname ?? 'Hartnoll', given: change.given ?? 'Edie', bornOn };
  const id = await within(async (tx) => {
    const [child] = await tx
      .insert(children)
      .values({
        ...row,
        sex: change.sex === undefined ? 'female' : change.sex,
        gestationWeeks: 40,
        flags: change.flags ?? [],
        allergies: 'None known',
        registeredBy: hospital.people.nurse.id,
        registeredAt: instant(now - 2 * HOUR),
      })
      .returning({ id: children.id });
    await tx.insert(stays).values({
      childId: child!.id,
      wardId: hospital.wards[change.ward ?? 'Heron']!,
      bed: change.bed ?? '2',
      from: instant(now - 2 * HOUR),
    });
    return child!.id;
  });
  const weightId = change.kg === null ? '' : await insertWeight(scene, id, { kg: change.kg ?? 16.4 });
  return { id, weightId, ...row };
}

export function insertWeight(
  { within, hospital }: Scene,
  childId: string,
  { kg, method = 'scales', hoursAgo = 1, by = 'nurse' }: WeightChange,
): Promise<string> {
  const at = instant(Date.now() - hoursAgo * HOUR);
  const row = { childId, kg: kilograms(kg), method, at, by: hospital.people[by].id, recordedAt: at };
  return within(async (tx) => (await tx.insert(weights).values(row).returning({ id: weights.id }))[0]!.id);
}

/** Blood results of half an hour ago, in mmol/L. */
export async function insertResults(
  { within, hospital }: Scene,
  childId: string,
  values: Record<string, number>,
): Promise<void> {
  const at = instant(Date.now() - HOUR / 2);
  const rows = Object.entries(values).map(([analyte, value]) => ({
    childId,
    analyte,
    value,
    unit: 'mmol/L',
    at,
    by: hospital.people.doctor.id,
    recordedAt: at,
  }));
  await within((tx) => tx.insert(results).values(rows));
}
