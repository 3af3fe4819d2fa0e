import { randomUUID } from 'node:crypto';
import type { APIRequestContext } from '@playwright/test';
import { emptyCheckForm, type CheckForm } from '../../shared/checks/form';
import type { OrderForm } from '../../shared/orders/form';
import { isWorkedOut, workOutDraft } from '../../shared/orders/work-out-draft';
import type { Draft } from '../../shared/routes/orders';
import type { CheckPage } from '../../shared/routes/checks';
import type { CastKey } from './cast';
import type { MadeChild } from './children';
import { PASSWORD, type StoryWorld } from './world';

/** A person's requests without a page, for what comes before a story's own part. */
export type Caller = {
  get<Value>(path: string): Promise<Value>;
  send<Value>(method: 'post' | 'put', path: string, data: unknown): Promise<Value>;
};

export async function callerFor(world: StoryWorld, person: CastKey): Promise<Caller> {
  const request: APIRequestContext = await world.requestAs(person);
  const headers = () => ({ origin: world.place.baseUrl, 'idempotency-key': randomUUID() });
  return {
    async get<Value>(path: string) {
      const answer = await request.get(path);
      if (!answer.ok()) throw new Error(`GET ${path}: ${await answer.text()}`);
      return (await answer.json()) as Value;
    },
    async send<Value>(method: 'post' | 'put', path: string, data: unknown) {
      const answer = await request[method](path, { data, headers: headers() });
      if (!answer.ok()) throw new Error(`${method} ${path}: ${await answer.text()}`);
      return (await answer.json()) as Value;
    },
  };
}

export const SALINE_GLUCOSE = 'Sodium chloride 0.9% + glucose 5%';
export const SALINE_GLUCOSE_K = `${SALINE_GLUCOSE} + potassium chloride 20 mmol/L`;

/** Edie's maintenance at 80 % as a draft that could be signed. */
export async function draftByApi(
  world: StoryWorld,
  child: MadeChild,
  change: Partial<OrderForm> = {},
): Promise<string> {
  const doctor = await callerFor(world, 'doctor');
  const { versionId } = await doctor.send<{ versionId: string }>('post', `/api/children/${child.id}/orders`, {
    kind: 'maintenance',
    followsOrderId: null,
  });
  const { rev, form } = await doctor.get<Draft>(`/api/drafts/${versionId}`);
  const typed: OrderForm = {
    ...form,
    reason: 'Too breathless to drink enough',
    fraction: 'four-fifths',
    feedsMl: '0',
    drugsMl: '0',
    productId: world.hospital.products[SALINE_GLUCOSE_K] ?? '',
    ...change,
  };
  await doctor.send('put', `/api/drafts/${versionId}`, { rev, form: typed });
  return versionId;
}

export async function signByApi(world: StoryWorld, versionId: string): Promise<void> {
  const doctor = await callerFor(world, 'doctor');
  const { rev, form, context } = await doctor.get<Draft>(`/api/drafts/${versionId}`);
  const work = workOutDraft(form, context);
  if (!isWorkedOut(work)) throw new Error(`not worked out: ${JSON.stringify(work)}`);
  const { figures, rulebook } = work.workOut;
  const rateMlPerH = figures.rate === undefined ? null : String(figures.rate);
  const seen = { rateMlPerH, volumeMl: String(figures.volume), rulebook };
  await doctor.send('post', `/api/versions/${versionId}/sign`, { rev, seen, password: PASSWORD });
}

const EDIE: CheckForm = {
  ...emptyCheckForm(),
  initials: 'EH',
  sex: 'female',
  age: '4',
  ageUnit: 'years',
  weightKg: '16.4',
  weightSource: 'read-from-chart',
  feedsMl: '0',
  drugsMl: '0',
  method: 'bands-daily',
  fraction: 'four-fifths',
  base: SALINE_GLUCOSE,
  addedPotassium: '20',
  hours: '24',
  workedOutBy: 'hand',
  rate: '44',
  volumeMl: '1056',
};

export async function checkByApi(world: StoryWorld, versionId: string): Promise<void> {
  const checker = await callerFor(world, 'checker');
  const page = await checker.send<CheckPage>('post', `/api/checks/${versionId}/lock-in`, { form: EDIE });
  const contentSha256 = page.uncovered?.contentSha256;
  const body = { contentSha256, acceptReason: null, password: PASSWORD };
  await checker.send('post', `/api/checks/${versionId}/sign`, body);
}

/** Edie's order at 44 mL/h, signed by its author and its checker. */
export async function signedOrder(world: StoryWorld, child: MadeChild): Promise<string> {
  const versionId = await draftByApi(world, child);
  await signByApi(world, versionId);
  await checkByApi(world, versionId);
  return versionId;
}
