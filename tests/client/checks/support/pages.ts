import { orderOf, workOutOn } from '@shared/checks/own';
import { compareCheck } from '@shared/checks/compare';
import { readCheckForm } from '@shared/checks/read-form';
import { emptyCheckForm, type CheckForm } from '@shared/checks/form';
import type { FluidComposition, MaintenanceFigures, WorkOut } from '@shared/calc/types';
import type { OrderContent } from '@shared/orders/content';
import type { Answer } from '@/lib/api';
import type { BedsidePage } from '@shared/routes/bedside';
import type { CheckPage } from '@shared/routes/checks';
import { DEFAULT_RULEBOOK } from '@shared/rulebook/default';
import { rulebookContent } from '@shared/rulebook/document';
import {
  bolus,
  context,
  fluidText,
  maintenance,
  maintenanceForm,
  PRODUCTS,
} from '../../../checks/support/edie';

const uuid = (n: number): string => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;
export const VERSION = uuid(31);
export const WARD = uuid(2);
const CHILD = uuid(4);
export const NOW = '2026-06-10T09:41:00.000Z';

/** The author's figures: found nowhere else on these pages. */
export const AUTHOR = { name: 'Noor Castellane', title: 'Registrar' };

const productOf = (product: FluidComposition, n: number): CheckPage['products'][number] => ({
  ...fluidText(product.id),
  id: uuid(100 + n),
  bagSizesMl: ['500', '1000'],
  kinds: ['maintenance', 'bolus'],
  newbornOnly: false,
  rev: 1,
});
export const SHELF = PRODUCTS.map(productOf);
export const productId = (name: string): string => SHELF.find((product) => product.name === name)!.id;

export const child: CheckPage['child'] = {
  id: CHILD,
  number: 'SM 418 207',
  surname: 'Hartnoll',
  given: 'Edie',
  bornOn: '2022-03-14',
  bornAt: null,
  ageText: '4 y',
  sex: 'female',
  gestationWeeks: null,
  gestationDays: null,
  allergies: 'Ibuprofen: wheeze',
  flags: ['raised-adh'],
  ward: { id: WARD, name: 'Heron' },
  bed: '2',
  rev: 1,
};

const weight = (n: number, kg: string, method: 'scales' | 'stated', at: string) => ({
  id: uuid(n),
  kg,
  method,
  at,
  recordedBy: 'Joaquin Reyes-Dale',
  confirmedBy: null,
  z: null,
  usable: true,
  stale: '',
});

const verdict = (act: CheckPage['acts'][number]['act'], allowed = true, words = '') => ({
  act,
  allowed,
  words,
});

export const order: CheckPage['order'] = {
  versionId: VERSION,
  code: 'BL-260610-031',
  version: 1,
  kind: 'maintenance',
  urgency: 'routine',
  reason: 'Pneumonia: too breathless to drink enough',
  askedStart: '2026-06-10T11:00:00.000Z',
  signedAt: '2026-06-10T09:31:00.000Z',
  dueAt: '2026-06-10T10:31:00.000Z',
  isHighRisk: false,
};

export const coveredPage = (rest: Partial<CheckPage> = {}): CheckPage => ({
  order,
  child,
  state: 'awaiting-check',
  weights: [
    weight(41, '16.400', 'scales', '2026-06-10T06:40:00.000Z'),
    weight(42, '15.900', 'stated', '2026-05-28T14:05:00.000Z'),
  ],
  results: [
    { analyte: 'sodium', value: '136', unit: 'mmol/L', at: '2026-06-10T07:10:00.000Z' },
    { analyte: 'potassium', value: '3.9', unit: 'mmol/L', at: '2026-06-10T07:10:00.000Z' },
    { analyte: 'glucose', value: '5.2', unit: 'mmol/L', at: '2026-06-10T07:10:00.000Z' },
  ],
  bolusesLast24h: [],
  running: [],
  plan: null,
  products: SHELF,
  rulebook: { number: 1, content: rulebookContent(DEFAULT_RULEBOOK) },
  isShortForm: false,
  hasSeenFigures: false,
  draft: { rev: 0, form: emptyCheckForm(), savedAt: null },
  acts: [verdict('lock-in'), verdict('pass-on'), verdict('cannot-verify'), verdict('sign-check', false)],
  zone: 'Europe/London',
  now: NOW,
  uncovered: null,
  ...rest,
});

type WorkedOut = Extract<WorkOut, { ok: true }>;

/** Edie's order as signed, with the drawing and the sums that the program makes of it. */
export function signedContent(
  inputs: Partial<Extract<OrderContent['inputs'], { kind: 'maintenance' }>> = {},
  rest: Partial<OrderContent> = {},
): OrderContent {
  const form = maintenanceForm({
    fraction: inputs.fraction ?? 'four-fifths',
    hours: inputs.hours ?? '24',
  });
  const reading = readCheckForm(form, { kind: 'maintenance', shortForm: false });
  if (!reading.ok) throw new Error('the form of the fixture is whole');
  const worked = workOutOn(
    reading.entries.kg,
    orderOf(reading.entries.order, PRODUCTS)!,
    context(),
  ) as WorkedOut;
  const { rate, volume, perHourExact, fullMl } = worked.figures as MaintenanceFigures;
  const { gauge } = worked;
  const text = (n: number) => String(n);
  return maintenance(
    inputs,
    {
      rateMlPerH: rate.toFixed(1),
      volumeMl: volume.toFixed(1),
      perHourExact: perHourExact.toFixed(4),
      fullMl: fullMl.toFixed(1),
    },
    {
      steps: worked.steps.map(({ label, working, result, unit, source, mark }) => ({
        label,
        working,
        result,
        unit,
        source,
        mark: mark ?? null,
      })),
      gauge: {
        orderMl: text(gauge.orderMl),
        brimMl: text(gauge.brimMl),
        brimNote: gauge.brimNote,
        bands: gauge.bands.map(({ label, ml, fullMl: full }) => ({
          label,
          ml: text(ml),
          fullMl: text(full),
        })),
        ghosts: gauge.ghosts.map(({ label, ml }) => ({ label, ml: text(ml) })),
      },
      ...rest,
    },
  );
}

/** The page after lock-in, with the comparison that the server makes. */
export function uncoveredPage(
  content: OrderContent,
  yours: CheckForm,
  rest: Partial<CheckPage> = {},
): CheckPage {
  const reading = readCheckForm(yours, { kind: 'maintenance', shortForm: false });
  if (!reading.ok) throw new Error('the form of the fixture is whole');
  const comparison = compareCheck(content, reading.entries, context());
  const differs = comparison.outcome === 'facts-differ';
  return coveredPage({
    state: differs ? 'disputed' : 'awaiting-check',
    acts: [verdict('lock-in', false), verdict('sign-check', !differs), verdict('slip', differs)],
    uncovered: {
      lockedInAt: '2026-06-10T09:44:00.000Z',
      yours,
      content,
      contentSha256: 'a'.repeat(64),
      author: AUTHOR,
      checkerName: 'Ruth Ansah',
      comparison,
      signBy: differs ? null : '2026-06-10T09:59:00.000Z',
    },
    ...rest,
  });
}

export const me: Answer<'me'> = {
  account: {
    id: uuid(1),
    name: 'Ruth Ansah',
    title: 'Senior nurse',
    roles: ['nurse'],
    registrationNumber: 'N-1',
    email: 'ruth.ansah@saltmarsh.example',
  },
  hospital: { id: uuid(3), name: 'Saltmarsh Children’s Hospital', zone: 'Europe/London' },
  wards: [{ id: WARD, name: 'Heron', entitlements: ['checking'] }],
  session: { id: 's', locked: false, idleUntil: NOW, absoluteUntil: NOW, idleMinutes: 15 },
  now: NOW,
  hasMailbox: false,
};

const signature = (meaning: 'author' | 'independent-check', name: string, at: string) => ({
  meaning,
  name,
  role: '',
  registrationNumber: '',
  at,
  how: 'password',
  note: '',
  isVoid: false,
});

export const bedsidePage = (rest: Partial<BedsidePage> = {}): BedsidePage => {
  const fluid = SHELF.find(({ id }) => id === productId(fluidText('sg20').name))!;
  const content = signedContent();
  return {
    versionId: VERSION,
    code: order.code,
    version: 1,
    state: 'signed',
    child,
    content: { ...content, fluid: { ...content.fluid, id: fluid.id } },
    signatures: [
      signature('author', AUTHOR.name, '2026-06-10T10:02:00.000Z'),
      signature('independent-check', 'Ruth Ansah', '2026-06-10T10:15:00.000Z'),
    ],
    volumeToInfuse: { mostMl: '176.0', words: '4 h of flow at 44 mL/h' },
    products: SHELF,
    witnessNeeded: false,
    startBy: '2026-06-10T17:00:00.000Z',
    lapsesAt: '2026-06-11T11:00:00.000Z',
    connected: [],
    acts: [verdict('start'), verdict('hold', false), verdict('stop', false)],
    now: '2026-06-10T11:01:00.000Z',
    zone: 'Europe/London',
    ...rest,
  };
};

export const bolusContent = (): OrderContent => bolus();
