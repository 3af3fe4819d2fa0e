import { ROUTES } from '@shared/routes';
import type { BedsideEntries, BedsidePage } from '@shared/routes/bedside';
import { addCivilDays, civilDate } from '@shared/time';
import type { BedsideChange } from '../../fixtures/demo/script';
import { DEMO_PASSWORD, DEMO_PEOPLE } from './people';
import { call, orderOf, type AnyTurn, type Turn } from './scene';

const readBedside = (turn: AnyTurn, order: string): Promise<BedsidePage> =>
  call(turn, ROUTES.bedside, { params: { id: orderOf(turn, order).versionId } });

/** What the nurse reads off the child, the bag, the pump and the line when all is right, with changes over it. */
function entriesFor({ scene, at }: AnyTurn, page: BedsidePage, change: BedsideChange = {}): BedsideEntries {
  const { content, products, volumeToInfuse } = page;
  const { figures } = content;
  const product = products.find(({ id }) => id === content.fluid.id);
  const sizes = (product?.bagSizesMl ?? []).map(Number);
  const bag = Math.min(...sizes.filter((size) => size >= Math.min(500, Math.max(...sizes))));
  const byPump = figures.rateMlPerH !== null;
  const volume = byPump ? Math.min(bag, Number(volumeToInfuse.mostMl)) : Number(figures.volumeMl);
  const digits = content.code.replaceAll(/\D/g, '').slice(-4);
  return {
    child: { number: content.child.number, bornOn: content.child.bornOn, saidBy: 'Parent', ...change.child },
    bag: {
      productId: content.fluid.id,
      sizeMl: String(bag),
      batch: `LT${digits}`,
      expiry: addCivilDays(civilDate(at, scene.hospital.zone), 200),
      bagNumber: '1',
      ...change.bag,
    },
    pump: {
      device: byPump ? `P ${digits}` : '',
      channel: byPump ? 'A' : '',
      rate: byPump ? String(Number(figures.rateMlPerH)) : '',
      volume: String(volume),
      minutes: byPump || figures.overMinutes === null ? '' : String(Number(figures.overMinutes)),
      ...change.pump,
    },
    line: {
      lineClass: content.line,
      site: 'Left hand',
      traced: true,
      clampOpen: true,
      siteLooksWell: true,
      ...change.line,
    },
  };
}

export async function compare(turn: Turn<'compare'>): Promise<void> {
  const { order, step, entries } = turn.step;
  const page = await readBedside(turn, order);
  const body = { step, entries: entriesFor(turn, page, entries) };
  await call(turn, ROUTES.compareStep, { params: { id: page.versionId }, body });
}

export async function start(turn: Turn<'start'>): Promise<void> {
  const { order, entries, witness, replaces } = turn.step;
  const page = await readBedside(turn, order);
  const body = {
    entries: entriesFor(turn, page, entries),
    witness: witness === undefined ? null : { email: DEMO_PEOPLE[witness].email, password: DEMO_PASSWORD },
    replacesVersionId: replaces === undefined ? null : orderOf(turn, replaces).versionId,
  };
  await call(turn, ROUTES.recordStart, { params: { id: page.versionId }, body });
}

export async function hold(turn: Turn<'hold'>): Promise<void> {
  const { order, reason } = turn.step;
  await call(turn, ROUTES.hold, { params: { id: orderOf(turn, order).versionId }, body: { reason } });
}

export async function resume(turn: Turn<'resume'>): Promise<void> {
  const page = await readBedside(turn, turn.step.order);
  const { pump } = entriesFor(turn, page);
  await call(turn, ROUTES.resume, { params: { id: page.versionId }, body: { pump } });
}

export async function sendAway(turn: Turn<'send-away'>): Promise<void> {
  const { order, where } = turn.step;
  await call(turn, ROUTES.sendAway, { params: { id: orderOf(turn, order).versionId }, body: { where } });
}

export async function stop(turn: Turn<'stop'>): Promise<void> {
  const { order, reason, infusedMl } = turn.step;
  const body = { reason, volumeInfusedMl: infusedMl ?? null };
  await call(turn, ROUTES.stop, { params: { id: orderOf(turn, order).versionId }, body });
}

export async function finish(turn: Turn<'finish'>): Promise<void> {
  const { order, infusedMl } = turn.step;
  const params = { id: orderOf(turn, order).versionId };
  await call(turn, ROUTES.finish, { params, body: { volumeInfusedMl: infusedMl } });
}

export async function print(turn: Turn<'print'>): Promise<void> {
  await call(turn, ROUTES.makePrint, { params: { id: orderOf(turn, turn.step.order).versionId }, body: {} });
}
