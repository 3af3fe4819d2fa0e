import type { OrderForm } from '@shared/orders/form';
import { isWorkedOut, workOutDraft } from '@shared/orders/work-out-draft';
import { ROUTES } from '@shared/routes';
import type { Draft } from '@shared/routes/orders';
import { expect } from 'vitest';
import type { Client } from '../support/client';
import { PASSWORD, type World } from '../support/world';

export const read = async (client: Client, versionId: string): Promise<Draft> => {
  const answer = await client.call(ROUTES.draft, { params: { id: versionId } });
  expect(answer.status, JSON.stringify(answer.body)).toBe(200);
  return answer.body as Draft;
};

export type Started = { orderId: string; versionId: string; code: string };

export async function start(
  client: Client,
  childId: string,
  kind: 'maintenance' | 'bolus',
): Promise<Started> {
  const answer = await client.call(ROUTES.startDraft, {
    params: { id: childId },
    body: { kind, followsOrderId: null },
  });
  expect(answer.status, JSON.stringify(answer.body)).toBe(200);
  return answer.body as Started;
}

/** What a prescriber states; everything else stays as proposed. */
export const STATED = {
  maintenance: { reason: 'Nil by mouth before surgery', feedsMl: '0', drugsMl: '70' },
  bolus: { reason: 'Shocked, septic' },
} as const;

/** Types into a draft and saves it; returns the new rev. */
export async function type(client: Client, versionId: string, change: Partial<OrderForm>): Promise<number> {
  const draft = await read(client, versionId);
  const answer = await client.call(ROUTES.saveDraft, {
    params: { id: versionId },
    body: { rev: draft.rev, form: { ...draft.form, ...change } },
  });
  expect(answer.status, JSON.stringify(answer.body)).toBe(200);
  return (answer.body as { rev: number }).rev;
}

/** What the author's screen shows now. */
export async function seen(client: Client, versionId: string) {
  const draft = await read(client, versionId);
  const work = workOutDraft(draft.form, draft.context);
  if (!isWorkedOut(work)) throw new Error(`does not work out: ${JSON.stringify(work)}`);
  const { figures } = work.workOut;
  return {
    rev: draft.rev,
    seen: {
      rateMlPerH: figures.rate === undefined ? null : String(figures.rate),
      volumeMl: String(figures.volume),
      rulebook: draft.context.rulebook.number,
    },
  };
}

export async function sign(client: Client, versionId: string, change: object = {}, key?: string) {
  const shown = await seen(client, versionId);
  return client.call(ROUTES.sign, {
    params: { id: versionId },
    body: { ...shown, password: PASSWORD, ...change },
    ...(key !== undefined && { key }),
  });
}

/** A draft with everything stated. */
export async function draft(
  world: World,
  kind: 'maintenance' | 'bolus',
  change: Partial<OrderForm> = {},
  childId?: string,
): Promise<Started & { childId: string }> {
  const id = childId ?? (await world.addChild());
  const doctor = world.as('doctor');
  const started = await start(doctor, id, kind);
  await type(doctor, started.versionId, { ...STATED[kind], ...change });
  return { ...started, childId: id };
}

/** A signed order that waits for its check. */
export async function signedOrder(
  world: World,
  kind: 'maintenance' | 'bolus' = 'maintenance',
  change: Partial<OrderForm> = {},
  childId?: string,
): Promise<Started & { childId: string }> {
  const made = await draft(world, kind, change, childId);
  const answer = await sign(world.as('doctor'), made.versionId);
  expect(answer.status, JSON.stringify(answer.body)).toBe(200);
  return made;
}
