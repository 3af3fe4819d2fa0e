import { FLAGS, LINE_CLASSES } from '@shared/calc/types';
import type {
  BolusOrder,
  ChildFacts,
  FluidComposition,
  MaintenanceOrder,
  WorkOutRequest,
} from '@shared/calc/types';
import { DEFAULT_SHELF } from '@shared/shelf/default';
import { hours, kilograms, millilitres, millilitresPerHour, millilitresPerKg, minutes } from '@shared/units';
import fc from 'fast-check';
import { ago, newborn, NOW } from './make-request';

/** A decimal as a field takes it: so many places, from and to in whole units. */
const decimal = (from: number, to: number, places: number): fc.Arbitrary<number> =>
  fc.integer({ min: from * 10 ** places, max: to * 10 ** places }).map((n) => n / 10 ** places);

const fluids: FluidComposition[] = DEFAULT_SHELF.map((product) => ({ id: product.name, ...product }));
const anyFluid = fc.constantFrom(...fluids);
const maybe = <T>(arbitrary: fc.Arbitrary<T>) => fc.option(arbitrary, { nil: undefined });

const older = fc.record({
  bornOn: fc.constantFrom(
    '2010-07-01',
    '2013-02-28',
    '2016-02-29',
    '2020-06-10',
    '2024-06-10',
    '2025-06-11',
    '2026-04-30',
  ),
  sex: maybe(fc.constantFrom('female' as const, 'male' as const)),
  gestationWeeks: fc.constantFrom(37, 40),
  flags: fc.subarray([...FLAGS], { maxLength: 3 }),
});

const youngest: fc.Arbitrary<ChildFacts> = fc
  .tuple(older, decimal(0, 671, 1))
  .map(([child, h]) => ({ ...child, ...newborn(h) }));

const weight = (most: number) => fc.oneof(decimal(1, most, 1), decimal(1, most, 3));

const intake = fc.record({
  bolusesLast24h: fc.array(
    fc.record({
      ml: decimal(1, 900, 0).map(millilitres),
      at: decimal(0, 30, 1).map(ago),
      here: fc.boolean(),
    }),
    { maxLength: 2 },
  ),
  running: fc.array(
    fc.record({
      code: fc.constant('BL-1'),
      rate: decimal(0, 60, 1).map(millilitresPerHour),
      fluid: anyFluid,
    }),
    { maxLength: 1 },
  ),
});

const frame = {
  at: fc.constant(NOW),
  zone: fc.constant('Europe/London'),
  lastMeasuredAt: fc.constantFrom(ago(3), ago(200)),
  line: fc.constantFrom(...LINE_CLASSES),
  results: fc.record({ potassium: fc.record({ value: decimal(2, 8, 1), at: fc.constant(ago(5)) }) }),
  intake,
};

const maintenanceOrder = (isNewborn: boolean): fc.Arbitrary<MaintenanceOrder> =>
  fc.record({
    kind: fc.constant('maintenance' as const),
    method: isNewborn
      ? fc.constant('newborn' as const)
      : fc.constantFrom('bands-daily' as const, 'bands-hourly' as const, 'who' as const),
    fraction: fc.constantFrom(
      'full' as const,
      'four-fifths' as const,
      'two-thirds' as const,
      'half' as const,
    ),
    temperatureC: maybe(decimal(35, 42, 1)),
    newbornMlPerKgPerDay: maybe(decimal(40, 190, 0)),
    feeds: fc.oneof(fc.constant(0), decimal(0, 400, 1)).map(millilitres),
    drugs: fc.oneof(fc.constant(0), decimal(0, 200, 1)).map(millilitres),
    typedRate: fc.oneof(
      { weight: 3, arbitrary: fc.constant(undefined) },
      decimal(1, 140, 1).map(millilitresPerHour),
    ),
    hours: fc.oneof(fc.constant(24), decimal(1, 24, 1)).map(hours),
    fluid: anyFluid,
  });

const bolusOrder: fc.Arbitrary<BolusOrder> = fc.record({
  kind: fc.constant('bolus' as const),
  dose: fc.oneof(
    {
      weight: 3,
      arbitrary: decimal(2, 25, 1).map((n) => ({ by: 'weight' as const, mlPerKg: millilitresPerKg(n) })),
    },
    decimal(1, 700, 1).map((n) => ({ by: 'volume' as const, volume: millilitres(n) })),
  ),
  over: decimal(1, 90, 0).map(minutes),
  route: fc.constantFrom('pump' as const, 'syringe' as const),
  fluid: anyFluid,
});

const withWeight = <T extends { kg: number }>({ kg, ...rest }: T) => ({
  ...rest,
  weight: { kg: kilograms(kg), method: 'scales' as const, at: ago(3) },
});

/** Maintenance of any child, sensible or not. */
export const anyMaintenance: fc.Arbitrary<WorkOutRequest> = fc.oneof(
  fc.record({ ...frame, child: older, kg: weight(90), order: maintenanceOrder(false) }).map(withWeight),
  fc.record({ ...frame, child: youngest, kg: weight(6), order: maintenanceOrder(true) }).map(withWeight),
);

/** A bolus for any child, sensible or not. */
export const anyBolus: fc.Arbitrary<WorkOutRequest> = fc
  .record({ ...frame, child: fc.oneof(older, youngest), kg: weight(90), order: bolusOrder })
  .map(withWeight);
