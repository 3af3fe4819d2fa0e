import { NUMBER_FIELDS } from '@shared/orders/read-fields';
import { readDecimal } from '@shared/decimal-input';
import type { BolusRoute } from '@shared/calc/types';
import { BOLUS_ROUTES } from '@shared/calc/types';
import { formatNumber } from '@shared/rounding';

/** What was given, as typed. An empty weight means the one the chart proposes. */
export type GivenForm = {
  weightId: string;
  productId: string;
  volumeMl: string;
  overMinutes: string;
  route: string;
  givenAt: string;
  onWordOfId: string;
  reason: string;
  readBack: boolean;
};

export const GIVEN_FIELDS = [
  'weightId',
  'productId',
  'volumeMl',
  'overMinutes',
  'route',
  'givenAt',
  'onWordOfId',
  'reason',
  'readBack',
] as const satisfies readonly (keyof GivenForm)[];

export const emptyGivenForm = (givenAt: string): GivenForm => ({
  weightId: '',
  productId: '',
  volumeMl: '',
  overMinutes: '',
  route: '',
  givenAt,
  onWordOfId: '',
  reason: '',
  readBack: false,
});

export const routeOf = (form: GivenForm): BolusRoute | undefined =>
  BOLUS_ROUTES.find((route) => route === form.route);

const numberFault = (text: string, field: 'volumeMl' | 'overMinutes'): string | undefined => {
  const { spec, missing } = NUMBER_FIELDS[field];
  if (text.trim() === '') return missing;
  const reading = readDecimal(text, spec);
  return reading.ok ? undefined : reading.message;
};

/** What is missing or malformed; the server judges the rest. */
export function givenFaults(form: GivenForm): Partial<Record<keyof GivenForm, string>> {
  const faults = {
    productId: form.productId === '' ? 'Choose the fluid that was given.' : undefined,
    volumeMl: numberFault(form.volumeMl, 'volumeMl'),
    overMinutes: numberFault(form.overMinutes, 'overMinutes'),
    route: routeOf(form) === undefined ? 'Say how it was given.' : undefined,
    givenAt: form.givenAt === '' ? 'Say when it was given.' : undefined,
    onWordOfId: form.onWordOfId === '' ? 'Say on whose word.' : undefined,
    reason: form.reason.trim().length < 3 ? 'Say why, in a few words.' : undefined,
    readBack: form.readBack ? undefined : 'Read it back first.',
  };
  return Object.fromEntries(Object.entries(faults).filter(([, fault]) => fault !== undefined));
}

/** "10 mL/kg" of a typed volume on a weight; undefined while either is not there. */
export function perKgWords(volumeMl: string, kg: string | undefined): string | undefined {
  const reading = readDecimal(volumeMl, NUMBER_FIELDS.volumeMl.spec);
  if (!reading.ok || kg === undefined || Number(kg) <= 0) return undefined;
  return `${formatNumber(reading.value / Number(kg), 1)}\u00a0mL/kg`;
}

type Spoken = { form: GivenForm; fluid: string | undefined; by: string | undefined };

/** What is read back: volume, fluid, pace, way, on whose word; undefined while something is missing. */
export function givenReadBack({ form, fluid, by }: Spoken): string | undefined {
  const volume = readDecimal(form.volumeMl, NUMBER_FIELDS.volumeMl.spec);
  const over = readDecimal(form.overMinutes, NUMBER_FIELDS.overMinutes.spec);
  const route = routeOf(form);
  if (!volume.ok || !over.ok || route === undefined || fluid === undefined || by === undefined)
    return undefined;
  const ways: Readonly<Record<BolusRoute, string>> = {
    pump: 'by pump',
    syringe: 'by hand with a syringe',
    'pressure-bag': 'by pressure bag',
    gravity: 'by gravity',
  };
  return (
    `Given: ${formatNumber(volume.value, 1)} millilitres of ${fluid.charAt(0).toLowerCase()}${fluid.slice(1)} over ${formatNumber(over.value, 0)} minutes, ` +
    `${ways[route]}, on the word of ${by}.`
  );
}
