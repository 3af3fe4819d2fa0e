import type { CheckForm } from '@shared/checks/form';
import { emptyCheckForm } from '@shared/checks/form';
import { emptyOrderForm, type OrderForm } from '@shared/orders/form';
import { ROUTES } from '@shared/routes';
import type { BedsideEntries } from '@shared/routes/bedside';
import { localDateTime } from '@shared/time';
import { desc, eq } from 'drizzle-orm';
import { expect } from 'vitest';
import { weights } from '../../../server/db/schema/weights';
import { PASSWORD, type PersonKey, type World } from './world';

/** Marlow Thorne of the test world: a boy of 4 years, 16.4 kg. 1320 mL in 24 h, at 80 % 1056 mL, 44 mL/h. */
export const SALINE_GLUCOSE = 'Sodium chloride 0.9% + glucose 5%';
export const SALINE = 'Sodium chloride 0.9%';

export type OrderChange = {
  author?: PersonKey;
  kind?: 'maintenance' | 'bolus';
  /** Name of a product of the world's shelf. */
  product?: string;
  form?: Partial<OrderForm>;
};
export type MadeOrder = { childId: string; orderId: string; versionId: string; code: string };

const MAINTENANCE: Partial<OrderForm> = {
  reason: 'Too breathless to drink enough',
  method: 'bands-daily',
  fraction: 'four-fifths',
  fractionReason: 'Pneumonia',
  feedsMl: '0',
  drugsMl: '0',
  line: 'peripheral',
  hours: '24',
  urgency: 'routine',
};
const BOLUS: Partial<OrderForm> = {
  reason: 'Shock',
  doseBy: 'weight',
  mlPerKg: '10',
  overMinutes: '10',
  route: 'syringe',
  line: 'peripheral',
  urgency: 'urgent',
};

/** A draft saved through the API, ready to sign. */
export async function makeDraft(
  world: World,
  childId: string,
  change: OrderChange = {},
): Promise<MadeOrder & { rev: number }> {
  const { kind = 'maintenance', author = 'doctor' } = change;
  const client = world.as(author);
  const started = await client.call(ROUTES.startDraft, {
    params: { id: childId },
    body: { kind, followsOrderId: null },
  });
  expect(started.body).toMatchObject({ versionId: expect.any(String) });
  const { orderId, versionId, code } = started.body as MadeOrder;
  const rev = await fillDraft(world, childId, versionId, change);
  return { childId, orderId, versionId, code, rev };
}

/** Fills the form of a draft; returns its revision. */
export async function fillDraft(
  world: World,
  childId: string,
  versionId: string,
  { kind = 'maintenance', author = 'doctor', product, form }: OrderChange = {},
): Promise<number> {
  const client = world.as(author);
  const read = await client.call(ROUTES.draft, { params: { id: versionId } });
  const { rev } = read.body as { rev: number };
  const body: OrderForm = {
    ...emptyOrderForm(kind),
    ...(kind === 'maintenance' ? MAINTENANCE : BOLUS),
    weightId: await newestWeight(world, childId),
    productId: productId(world, product ?? (kind === 'maintenance' ? SALINE_GLUCOSE : SALINE)),
    plannedStart: localDateTime(world.clock.now(), world.zone),
    reviewBy: kind === 'bolus' ? '' : localDateTime((world.clock.now() + 43_200_000) as never, world.zone),
    bloodsBy: kind === 'bolus' ? '' : localDateTime((world.clock.now() + 86_400_000) as never, world.zone),
    ...form,
  };
  const saved = await client.call(ROUTES.saveDraft, { params: { id: versionId }, body: { rev, form: body } });
  expect(saved.body).toMatchObject({ rev: expect.any(Number) });
  return (saved.body as { rev: number }).rev;
}

const newestWeight = (world: World, childId: string): Promise<string> =>
  world.within(async (tx) => {
    const [row] = await tx
      .select()
      .from(weights)
      .where(eq(weights.childId, childId))
      .orderBy(desc(weights.at))
      .limit(1);
    return row!.id;
  });

export function productId(world: World, name: string): string {
  const id = world.products[name];
  if (id === undefined) throw new Error(`no ${name} on the shelf: ${Object.keys(world.products).join(', ')}`);
  return id;
}

export type Seen = { rateMlPerH: string | null; volumeMl: string };
const SEEN: Record<'maintenance' | 'bolus', Seen> = {
  maintenance: { rateMlPerH: '44.0', volumeMl: '1056.0' },
  bolus: { rateMlPerH: null, volumeMl: '164.0' },
};

/** Signs a draft and asks for its check. */
export async function signDraft(
  world: World,
  draft: { versionId: string; rev: number },
  { author = 'doctor', seen }: { author?: PersonKey; seen: Seen },
): Promise<void> {
  const signed = await world.as(author).call(ROUTES.sign, {
    params: { id: draft.versionId },
    body: { rev: draft.rev, seen: { ...seen, rulebook: 1 }, password: PASSWORD },
  });
  expect(signed.body).toMatchObject({ state: 'awaiting-check' });
}

/** An order of the child that waits for its check. */
export async function makeOrder(
  world: World,
  childId: string,
  change: OrderChange & { seen?: Seen } = {},
): Promise<MadeOrder> {
  const draft = await makeDraft(world, childId, change);
  await signDraft(world, draft, {
    author: change.author,
    seen: change.seen ?? SEEN[change.kind ?? 'maintenance'],
  });
  return draft;
}

const CHILD = { initials: 'MT', sex: 'male', age: '4', ageUnit: 'years' };

/** A checker's figures that agree with `makeOrder`. */
export const checkForm = (change: Partial<CheckForm> = {}): CheckForm => ({
  ...emptyCheckForm(),
  ...CHILD,
  weightKg: '16.4',
  weightSource: 'read-from-scales',
  feedsMl: '0',
  drugsMl: '0',
  method: 'bands-daily',
  fraction: 'four-fifths',
  base: SALINE_GLUCOSE,
  addedPotassium: '0',
  rate: '44',
  volumeMl: '1056',
  hours: '24',
  workedOutBy: 'hand',
  ...change,
});

export const bolusCheckForm = (change: Partial<CheckForm> = {}): CheckForm => ({
  ...emptyCheckForm(),
  ...CHILD,
  weightKg: '16.4',
  weightSource: 'read-from-chart',
  base: SALINE,
  volumeMl: '164',
  overMinutes: '10',
  workedOutBy: 'hand',
  ...change,
});

/** Locks figures in and gives the answer. */
export const lockIn = (world: World, checker: PersonKey, versionId: string, form: CheckForm = checkForm()) =>
  world.as(checker).call(ROUTES.lockIn, { params: { id: versionId }, body: { form } });

/** Signs a check whose figures agreed. */
export async function signCheck(
  world: World,
  checker: PersonKey,
  versionId: string,
  acceptReason: string | null = null,
) {
  const client = world.as(checker);
  const page = await client.call(ROUTES.checkPage, { params: { id: versionId } });
  const { uncovered } = page.body as { uncovered: { contentSha256: string } | null };
  const contentSha256 = uncovered?.contentSha256 ?? '';
  return client.call(ROUTES.signCheck, {
    params: { id: versionId },
    body: { contentSha256, acceptReason, password: PASSWORD },
  });
}

/** An order its checker has signed. */
export async function makeSignedOrder(
  world: World,
  childId: string,
  change: OrderChange & { seen?: Seen; check?: Partial<CheckForm>; checker?: PersonKey } = {},
): Promise<MadeOrder> {
  const order = await makeOrder(world, childId, change);
  const checker = change.checker ?? 'checker';
  const form = change.kind === 'bolus' ? bolusCheckForm(change.check) : checkForm(change.check);
  const locked = await lockIn(world, checker, order.versionId, form);
  expect(locked.body).toMatchObject({ uncovered: { comparison: { outcome: 'agreed' } } });
  const signed = await signCheck(world, checker, order.versionId);
  expect(signed.body).toMatchObject({ state: 'signed' });
  return order;
}

/** What a nurse reads at the bedside of `makeSignedOrder`: everything as ordered. */
export const bedsideEntries = (
  world: World,
  number: string,
  change: { [S in keyof BedsideEntries]?: Partial<BedsideEntries[S]> } = {},
): BedsideEntries => ({
  child: { number, bornOn: '2022-03-14', saidBy: 'Mother', ...change.child },
  bag: {
    productId: productId(world, SALINE_GLUCOSE),
    sizeMl: '500',
    batch: 'K26B114',
    expiry: '2027-11-30',
    bagNumber: '',
    ...change.bag,
  },
  pump: { device: '0417', channel: 'A', rate: '44', volume: '176', minutes: '', ...change.pump },
  line: {
    lineClass: 'peripheral',
    site: 'left hand',
    traced: true,
    clampOpen: true,
    siteLooksWell: true,
    ...change.line,
  },
});
