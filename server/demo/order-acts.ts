import type { OrderForm } from '@shared/orders/form';
import { isWorkedOut, workOutDraft } from '@shared/orders/work-out-draft';
import { ROUTES } from '@shared/routes';
import type { Draft } from '@shared/routes/orders';
import { HOUR, instant, type Instant } from '@shared/time';
import type { OrderChange } from '../../fixtures/demo/script';
import { DEMO_PASSWORD } from './people';
import { agoAt, call, orderOf, typedMoment, type AnyTurn, type Turn } from './scene';

const readDraft = (turn: AnyTurn, versionId: string): Promise<Draft> =>
  call(turn, ROUTES.draft, { params: { id: versionId } });

/** What a person types into the form: the story's changes over what the program proposed. */
type Typing = { form: OrderChange; fluid?: string; start?: Instant; kg?: string; checkerId?: string };

function typeInto(draft: Draft, typing: Typing, zone: string): OrderForm {
  const { form, fluid, start, kg, checkerId } = typing;
  const weight = kg === undefined ? undefined : draft.context.weights.find((row) => row.kg === kg);
  const typed: OrderForm = {
    ...draft.form,
    ...form,
    limitReasons: { ...draft.form.limitReasons, ...form.limitReasons },
  };
  if (weight !== undefined) typed.weightId = weight.id;
  if (checkerId !== undefined) typed.checkerId = checkerId;
  if (fluid !== undefined)
    typed.productId = draft.context.products.find((row) => row.name === fluid)?.id ?? '';
  return start === undefined ? typed : { ...typed, ...timesFrom(start, typed, zone) };
}

/** Review in 12 h and bloods in 24 h, or at the end of an order that lives shorter. */
function timesFrom(start: Instant, { kind, hours }: OrderForm, zone: string): Partial<OrderForm> {
  const plannedStart = typedMoment(start, zone);
  if (kind === 'bolus') return { plannedStart };
  const after = (most: number) =>
    typedMoment(instant(start + Math.min(most, Number(hours) || most) * HOUR), zone, -HOUR);
  return { plannedStart, reviewBy: after(12), bloodsBy: after(24) };
}

async function retypeVersion(turn: AnyTurn, versionId: string, typing: Typing): Promise<void> {
  const draft = await readDraft(turn, versionId);
  const form = typeInto(draft, typing, turn.scene.hospital.zone);
  await call(turn, ROUTES.saveDraft, { params: { id: versionId }, body: { rev: draft.rev, form } });
}

export async function draft(turn: Turn<'draft'>): Promise<void> {
  const { scene, child, step } = turn;
  const follows = step.follows === undefined ? null : orderOf(turn, step.follows).orderId;
  const body = { kind: step.kind, followsOrderId: follows };
  const made = await call(turn, ROUTES.startDraft, { params: { id: child.childId }, body });
  child.orders.set(step.order, { ...made, author: step.by });
  if (Object.keys(step.form).length === 0) return;
  await retypeVersion(turn, made.versionId, {
    form: step.form,
    fluid: step.fluid,
    kg: step.kg,
    start: step.start === undefined ? undefined : agoAt(scene.now, step.start),
    checkerId: step.checker && scene.hospital.people[step.checker].id,
  });
}

export async function retype(turn: Turn<'retype'>): Promise<void> {
  const { form, kg, order } = turn.step;
  await retypeVersion(turn, orderOf(turn, order).versionId, { form, kg });
}

/** Signs what the author's own screen works out, as the browser does. */
export async function sign(turn: Turn<'sign'>): Promise<void> {
  const { versionId } = orderOf(turn, turn.step.order);
  const { rev, form, context } = await readDraft(turn, versionId);
  const work = workOutDraft(form, context);
  if (!isWorkedOut(work)) throw new Error(`not worked out: ${JSON.stringify(work)}`);
  const { figures } = work.workOut;
  const seen = {
    rateMlPerH: figures.rate === undefined ? null : String(figures.rate),
    volumeMl: String(figures.volume),
    rulebook: work.workOut.rulebook,
  };
  await call(turn, ROUTES.sign, { params: { id: versionId }, body: { rev, seen, password: DEMO_PASSWORD } });
}

export async function discard(turn: Turn<'discard'>): Promise<void> {
  await call(turn, ROUTES.discardDraft, {
    params: { id: orderOf(turn, turn.step.order).versionId },
    body: {},
  });
}

export async function withdraw(turn: Turn<'withdraw'>): Promise<void> {
  const { order, reason } = turn.step;
  await call(turn, ROUTES.withdraw, { params: { id: orderOf(turn, order).versionId }, body: { reason } });
}

export async function revise(turn: Turn<'revise'>): Promise<void> {
  const order = orderOf(turn, turn.step.order);
  const made = await call(turn, ROUTES.revise, { params: { id: order.versionId }, body: {} });
  turn.child.orders.set(turn.step.order, { ...order, versionId: made.versionId, author: turn.step.by });
}

export async function ask(turn: Turn<'ask'>): Promise<void> {
  const { step, scene } = turn;
  const { versionId } = orderOf(turn, step.order);
  const { rev } = await readDraft(turn, versionId);
  const seniorId = step.senior === undefined ? null : scene.hospital.people[step.senior].id;
  await call(turn, ROUTES.askException, {
    params: { id: versionId },
    body: { rev, seniorId, reason: step.reason },
  });
}

export async function telephone(turn: Turn<'telephone'>): Promise<void> {
  const { step, scene } = turn;
  const { people } = scene.hospital;
  const { versionId } = orderOf(turn, step.order);
  const { rev } = await readDraft(turn, versionId);
  const body = {
    rev,
    seniorId: people[step.senior].id,
    heardById: people[step.heardBy].id,
    readBack: true,
    reason: step.reason,
    password: DEMO_PASSWORD,
  };
  await call(turn, ROUTES.telephoneException, { params: { id: versionId }, body });
}

/** The senior opens the matter, then agrees or refuses to exactly that content. */
export async function decide(turn: Turn<'decide'>): Promise<void> {
  const { agree, reason, order } = turn.step;
  const params = { id: orderOf(turn, order).versionId };
  const { contentSha256 } = await call(turn, ROUTES.exceptionMatter, { params, body: {} });
  const body = { agree, contentSha256, reason, password: DEMO_PASSWORD };
  await call(turn, ROUTES.decideException, { params, body });
}

export async function settle(turn: Turn<'settle'>): Promise<void> {
  const { order, reason } = turn.step;
  const params = { id: orderOf(turn, order).versionId };
  await call(turn, ROUTES.disputeMatter, { params, body: {} });
  await call(turn, ROUTES.settle, { params, body: { reason, password: DEMO_PASSWORD } });
}
