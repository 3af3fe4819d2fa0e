import { ageAt } from '@shared/children/age';
import { emptyCheckForm, type CheckForm } from '@shared/checks/form';
import type { OrderContent } from '@shared/orders/content';
import { ROUTES } from '@shared/routes';
import { parseInstant } from '@shared/time';
import type { CheckChange } from '../../fixtures/demo/script';
import { DEMO_PASSWORD } from './people';
import { agoAt, call, orderOf, typedMoment, type AnyTurn, type Turn } from './scene';

/** The content as its author may read it; the checker of the story came to the same figures alone. */
async function authorsContent(turn: AnyTurn, order: string): Promise<OrderContent> {
  const { versionId, author } = orderOf(turn, order);
  const view = await call(turn, ROUTES.order, { params: { id: versionId } }, author);
  if (view.open === null) throw new Error('an author sees the order');
  return view.open.content;
}

const initial = (name: string): string => Array.from(name)[0] ?? '';

function childEntries({ scene, at }: AnyTurn, { child }: OrderContent): CheckChange {
  const bornAt = child.bornAt === null ? undefined : parseInstant(child.bornAt);
  const age = ageAt({ bornOn: child.bornOn, bornAt }, at, scene.hospital.zone);
  const [count, ageUnit] =
    age.years >= 2 ? [age.years, 'years'] : age.months >= 2 ? [age.months, 'months'] : [age.days, 'days'];
  return {
    initials: initial(child.given) + initial(child.surname),
    sex: child.sex ?? 'not-recorded',
    age: String(count),
    ageUnit,
  };
}

/** Decimals as a person types them: no zeros at the end. */
const plain = (decimal: string | null): string => (decimal === null ? '' : String(Number(decimal)));

function orderEntries({ inputs, fluid, figures }: OrderContent): CheckChange {
  if (inputs.kind === 'bolus') return { base: fluid.base, overMinutes: plain(figures.overMinutes) };
  return {
    feedsMl: plain(inputs.feedsMl),
    drugsMl: plain(inputs.drugsMl),
    method: inputs.method,
    fraction: inputs.fraction,
    temperatureC: plain(inputs.temperatureC),
    newbornMlPerKgPerDay: plain(inputs.newbornMlPerKgPerDay),
    base: fluid.base,
    addedPotassium: plain(fluid.addedPotassium),
    hours: plain(figures.hours),
    rate: plain(figures.rateMlPerH),
  };
}

async function ownFigures(turn: AnyTurn, order: string, change: CheckChange = {}): Promise<CheckForm> {
  const content = await authorsContent(turn, order);
  return {
    ...emptyCheckForm(),
    ...childEntries(turn, content),
    weightKg: plain(content.weight.kg),
    weightSource: 'read-from-chart',
    workedOutBy: 'hand',
    volumeMl: plain(content.figures.volumeMl),
    ...orderEntries(content),
    ...change,
  };
}

export async function writeCheck(turn: Turn<'write-check'>): Promise<void> {
  const { order, figures } = turn.step;
  const params = { id: orderOf(turn, order).versionId };
  const { draft } = await call(turn, ROUTES.checkPage, { params });
  const form = { ...draft.form, ...figures };
  await call(turn, ROUTES.saveCheck, { params, body: { rev: draft.rev, form } });
}

export async function lockIn(turn: Turn<'lock-in'>): Promise<void> {
  const { order, figures } = turn.step;
  const params = { id: orderOf(turn, order).versionId };
  const form = await ownFigures(turn, order, figures);
  await call(turn, ROUTES.lockIn, { params, body: { form } });
}

export async function agree(turn: Turn<'agree'>): Promise<void> {
  const { order, acceptReason } = turn.step;
  const params = { id: orderOf(turn, order).versionId };
  const { uncovered } = await call(turn, ROUTES.checkPage, { params });
  const body = {
    contentSha256: uncovered?.contentSha256 ?? '',
    acceptReason: acceptReason ?? null,
    password: DEMO_PASSWORD,
  };
  await call(turn, ROUTES.signCheck, { params, body });
}

export async function cannotVerify(turn: Turn<'return'>): Promise<void> {
  const { order, what, reason } = turn.step;
  await call(turn, ROUTES.cannotVerify, {
    params: { id: orderOf(turn, order).versionId },
    body: { what, reason },
  });
}

export async function passOn(turn: Turn<'pass-on'>): Promise<void> {
  const { order, to, reason } = turn.step;
  const toId = to === undefined ? null : turn.scene.hospital.people[to].id;
  const params = { id: orderOf(turn, order).versionId };
  await call(turn, ROUTES.passOn, { params, body: { toId, seenFigures: false, reason } });
}

export async function slip(turn: Turn<'slip'>): Promise<void> {
  const { order, reason } = turn.step;
  await call(turn, ROUTES.slip, { params: { id: orderOf(turn, order).versionId }, body: { reason } });
}

export async function given(turn: Turn<'given'>): Promise<void> {
  const { scene, child, step } = turn;
  const { weights } = await call(turn, ROUTES.chart, { params: { id: child.childId } });
  const body = {
    kind: 'bolus',
    weightId: weights.find(({ usable }) => usable)?.id ?? null,
    productId: scene.hospital.products[step.fluid],
    volumeMl: step.volumeMl,
    overMinutes: step.overMinutes,
    route: 'syringe',
    givenAt: typedMoment(agoAt(scene.now, step.given), scene.hospital.zone, -3_600_000),
    onWordOfId: scene.hospital.people[step.onWordOf].id,
    readBack: true,
    reason: step.reason,
    password: DEMO_PASSWORD,
  };
  const made = await call(turn, ROUTES.recordGiven, { params: { id: child.childId }, body });
  child.orders.set(step.order, { orderId: '', versionId: made.versionId, author: step.by });
}

export async function countersign(turn: Turn<'countersign'>): Promise<void> {
  const { order, agree: agrees, reason, figures } = turn.step;
  const form = await ownFigures(turn, order, figures);
  const body = { agree: agrees, form, reason: reason ?? '', password: DEMO_PASSWORD };
  await call(turn, ROUTES.countersignGiven, { params: { id: orderOf(turn, order).versionId }, body });
}
