import { ROUTES } from '@shared/routes';
import { emptyCheckForm } from '@shared/checks/form';
import { emptyOrderForm } from '@shared/orders/form';
import { randomUUID } from 'node:crypto';
import request, { type Response } from 'supertest';
import { beforeAll, describe, expect, it } from 'vitest';
import { anonymous } from '../support/client';
import { sharedDatabase } from '../support/database';
import { checkForm, lockIn, makeDraft, makeOrder } from '../support/make-order';
import { makeWorld, PASSWORD, PUBLIC_URL, type World } from '../support/world';

let world: World;
beforeAll(async () => {
  world = await makeWorld(sharedDatabase());
});

const problem = (answer: Response) => (answer.body as { type?: string }).type;

/** Text that JSON carries and PostgreSQL does not: NUL, and halves of a surrogate pair. */
const UNSTORABLE = [
  ['NUL', 'shock\u0000'],
  ['a high surrogate alone', 'shock\ud800'],
  ['a low surrogate alone', '\udc00shock'],
] as const;

describe.each(UNSTORABLE)('%s in a text', (_name, text) => {
  it('is refused as bad input wherever it is typed, and never a fault of ours', async () => {
    const childId = await world.addChild();
    const draft = await makeDraft(world, childId);
    const order = await makeOrder(world, childId);
    const doctor = world.as('doctor');
    const params = { id: order.versionId };
    const answers = {
      signIn: await anonymous(world.deps, world.server).call(ROUTES.signIn, {
        body: { email: text, password: 'x' },
      }),
      search: await doctor.call(ROUTES.searchChildren, { body: { text } }),
      saveDraft: await doctor.call(ROUTES.saveDraft, {
        params: { id: draft.versionId },
        body: { rev: draft.rev, form: { ...emptyOrderForm('maintenance'), reason: text } },
      }),
      limitReasons: await doctor.call(ROUTES.saveDraft, {
        params: { id: draft.versionId },
        body: { rev: draft.rev, form: { ...emptyOrderForm('maintenance'), limitReasons: { [text]: 'why' } } },
      }),
      saveCheck: await world.as('checker').call(ROUTES.saveCheck, {
        params,
        body: { rev: 0, form: { ...emptyCheckForm(), initials: text } },
      }),
      cannotVerify: await world
        .as('checker')
        .call(ROUTES.cannotVerify, { params, body: { what: 'weight', reason: text } }),
      withdraw: await doctor.call(ROUTES.withdraw, { params, body: { reason: text } }),
    };
    const statuses = Object.entries(answers).map(([name, { status }]) => `${name} ${status}`);
    expect(statuses).toEqual(Object.keys(answers).map((name) => `${name} 422`));
    expect(problem(answers.withdraw)).toBe('/problems/bad-input');
  });
});

describe('what is no address, number or cookie of ours', () => {
  it('a NUL or a path in a session’s id is not found', async () => {
    for (const id of ['\u0000', '../me', 'x'.repeat(64), "' or 1=1 --"]) {
      const answer = await world.as('nurse').call(ROUTES.revokeSession, { params: { id } });
      expect([id, answer.status]).toEqual([id, 404]);
    }
  });

  it.each([Number.MAX_SAFE_INTEGER, 2 ** 31, -1])('revision %s is stale, not a fault', async (rev) => {
    const { versionId } = await makeOrder(world, await world.addChild());
    const answer = await world
      .as('checker')
      .call(ROUTES.saveCheck, { params: { id: versionId }, body: { rev, form: emptyCheckForm() } });
    expect([409, 422]).toContain(answer.status);
  });

  it('a cookie that is no text signs nobody in, and does not hide the program', async () => {
    for (const cookie of ['brimline_session_3100=%E0%A4%A', 'other=%; x=%ff', 'brimline_session_3100=%00']) {
      const answer = await request(world.server).get('/api/me').set('Cookie', cookie);
      expect([cookie, answer.status]).toEqual([cookie, 401]);
      const health = await request(world.server).get('/api/health').set('Cookie', cookie);
      expect([cookie, health.status]).toEqual([cookie, 200]);
    }
  });

  it('deep nesting, a polluted prototype and numbers for text are refused', async () => {
    const doctor = world.as('doctor');
    const draft = await makeDraft(world, await world.addChild());
    const params = { id: draft.versionId };
    const deep = `{"rev":1,"form":${'['.repeat(100_000)}${']'.repeat(100_000)}}`;
    const raw = (body: string) => async () =>
      request(world.server)
        .put(`/api/drafts/${draft.versionId}`)
        .set({
          Cookie: await doctor.cookie(),
          Origin: PUBLIC_URL,
          'Idempotency-Key': randomUUID(),
          'Content-Type': 'application/json',
        })
        .send(body);
    for (const send of [raw(deep), raw('{"__proto__":{"rev":1},"form":{}}'), raw('"text"'), raw('[]')]) {
      const answer = await send();
      expect(problem(answer)).toBe('/problems/bad-input');
    }
    const form = { ...emptyOrderForm('maintenance'), hours: 24 };
    const typed = await doctor.call(ROUTES.saveDraft, { params, body: { rev: draft.rev, form } });
    expect(typed.body).toMatchObject({ errors: [{ pointer: '/form/hours' }] });
    expect(({} as { rev?: unknown }).rev).toBeUndefined();
  });

  it.each(['４４', '4.4e1', '+44', '44,0', '٤٤', '44.00000', '4 4', '-44', 'Infinity', '0x2c'])(
    'a checker’s rate "%s" locks nothing in',
    async (rate) => {
      const { versionId } = await makeOrder(world, await world.addChild());
      const answer = await lockIn(world, 'checker', versionId, checkForm({ rate }));
      expect(problem(answer)).toBe('/problems/bad-input');
      expect(answer.body).toMatchObject({ errors: [{ pointer: '/form/rate' }] });
    },
  );
});

describe('an act from elsewhere', () => {
  const send = async (headers: Record<string, string>) =>
    request(world.server)
      .post('/api/lock')
      .set({ Cookie: await world.as('nurse').cookie(), 'Idempotency-Key': randomUUID(), ...headers })
      .send({});
  it.each([
    ['no origin', {}],
    ['a null origin', { Origin: 'null' }],
    ['another port', { Origin: 'http://127.0.0.1:3101' }],
    ['https for http', { Origin: 'https://127.0.0.1:3100' }],
    ['a name that begins alike', { Origin: `${PUBLIC_URL}.evil.example` }],
    ['the right origin, another site', { Origin: PUBLIC_URL, 'Sec-Fetch-Site': 'cross-site' }],
    ['the right origin, a sister site', { Origin: PUBLIC_URL, 'Sec-Fetch-Site': 'same-site' }],
  ])('is not taken: %s', async (_name, headers) => {
    expect(problem(await send(headers))).toBe('/problems/wrong-origin');
  });

  it('nor as a simple form, which needs no permission of the browser', async () => {
    const answer = await request(world.server)
      .post('/api/sign-in')
      .set({ Origin: PUBLIC_URL, 'Content-Type': 'text/plain' })
      .send(JSON.stringify({ email: world.people.nurse.email, password: PASSWORD }));
    expect(answer.status).toBe(422);
  });
});

describe('a flood', () => {
  it('is not let through by a new cookie for every request', async () => {
    const own = await makeWorld(sharedDatabase(), { rates: { all: 5, signIn: 3 } });
    let stopped = 0;
    for (let i = 0; i < 80; i++) {
      const answer = await request(own.server).get('/api/health').set('Cookie', `any=${i}`);
      if (answer.status === 429) stopped += 1;
    }
    expect(stopped).toBeGreaterThan(0);
  });

  it('nor by other cookies beside one session', async () => {
    const own = await makeWorld(sharedDatabase(), { rates: { all: 5, signIn: 3 } });
    const jar = await own.as('nurse').cookie();
    const statuses: number[] = [];
    for (let i = 0; i < 8; i++) {
      statuses.push((await request(own.server).get('/api/me').set('Cookie', `${jar}; any=${i}`)).status);
    }
    expect(statuses.filter((status) => status === 429)).toHaveLength(3);
  });
});
