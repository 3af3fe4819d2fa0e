import { problemSchema } from '@shared/problems';
import { ROUTES } from '@shared/routes';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makeApp } from '../../../server/app';
import { openDatabase } from '../../../server/db/client';
import { anonymous } from '../support/client';
import { sharedDatabase } from '../support/database';
import { makeWorld, PASSWORD, PUBLIC_URL, type World } from '../support/world';

const urls = sharedDatabase();
let world: World;
beforeAll(async () => {
  world = await makeWorld(urls);
});

const stranger = () => anonymous(world.deps, world.server);

describe('headers', () => {
  it('forbid everything inline, framing and foreign sources, and name no other page', async () => {
    const answer = await stranger().get('/api/health');
    const policy = answer.headers['content-security-policy']!;
    expect(policy).toContain("default-src 'self'");
    expect(policy).toContain("style-src 'self'");
    expect(policy).toContain("script-src 'self'");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).toContain('report-uri /api/csp-reports');
    expect(policy).not.toMatch(/unsafe-|data:|\*|upgrade-insecure-requests/);
    expect(answer.headers['referrer-policy']).toBe('no-referrer');
    expect(answer.headers['x-content-type-options']).toBe('nosniff');
    expect(answer.headers['strict-transport-security']).toBeUndefined();
    expect(answer.headers['x-powered-by']).toBeUndefined();
  });

  it('keep every answer of the API out of caches', async () => {
    const answers = [await stranger().get('/api/health'), await stranger().get('/api/nowhere')];
    expect(answers.map((answer) => answer.headers['cache-control'])).toEqual(['no-store', 'no-store']);
  });
});

describe('acts from elsewhere', () => {
  const send = (headers: Record<string, string>) =>
    request(world.server).post('/api/sign-in').set(headers).send({ email: 'a@b.example', password: 'x' });

  it.each([
    ['no Origin', {}],
    ['another Origin', { Origin: 'http://evil.example' }],
    ['another port', { Origin: 'http://127.0.0.1:3101' }],
    ['a null Origin', { Origin: 'null' }],
    ['the right Origin across sites', { Origin: PUBLIC_URL, 'Sec-Fetch-Site': 'cross-site' }],
    ['the right Origin of the same site only', { Origin: PUBLIC_URL, 'Sec-Fetch-Site': 'same-site' }],
  ])('are refused with %s', async (_name, headers) => {
    const answer = await send(headers);
    expect(answer.status).toBe(403);
    expect(answer.body.type).toBe('/problems/wrong-origin');
  });

  it('are taken from the own pages', async () => {
    const answer = await send({ Origin: PUBLIC_URL, 'Sec-Fetch-Site': 'same-origin' });
    expect(answer.body.type).toBe('/problems/sign-in-refused');
  });
});

describe('problems', () => {
  it('are problem documents, also where there is no route', async () => {
    const answer = await stranger().get('/api/nowhere');
    expect(answer.status).toBe(404);
    expect(answer.headers['content-type']).toContain('application/problem+json');
    const problem = problemSchema.parse(answer.body);
    expect(problem.instance).toBe(`/requests/${answer.headers['x-request-id']}`);
  });

  it.each([
    ['broken JSON', '{"email":', 'application/json'],
    ['JSON that is no object', '"text"', 'application/json'],
    ['more than 256 kB', JSON.stringify({ email: 'x'.repeat(300_000) }), 'application/json'],
    ['a form', 'email=a', 'application/x-www-form-urlencoded'],
    ['an unknown character set', '{}', 'application/json; charset=klingon'],
  ])('tell of %s', async (_name, body, type) => {
    const answer = await request(world.server)
      .post('/api/sign-in')
      .set({ Origin: PUBLIC_URL, 'Content-Type': type })
      .send(body);
    expect(answer.status).toBe(422);
    expect(answer.headers['content-type']).toContain('application/problem+json');
    expect(answer.body.type).toBe('/problems/bad-input');
  });

  it('point at each field (RFC 6901)', async () => {
    const answer = await world.as('nurse').post('/api/children', { flags: ['no-such-flag'] });
    const pointers = (answer.body.errors as { pointer: string }[]).map(({ pointer }) => pointer);
    expect(pointers).toContain('/flags/0');
    expect(pointers).toContain('/surname');
  });

  it.each(['/api/children/no-uuid', '/api/children/%00', '/api/children/%E0%A4%A'])(
    'answer %s as not found',
    async (path) => {
      const answer = await world.as('nurse').get(path);
      expect(answer.status).toBe(404);
      expect(answer.body.type).toBe('/problems/not-found');
    },
  );

  it('say 503 and that nothing was recorded while the database is away', async () => {
    const db = openDatabase('postgres://nobody:x@127.0.0.1:1/none', { clock: world.clock });
    const app = makeApp({ ...world.deps, db });
    const answer = await request(app).get('/api/me').set('Cookie', 'brimline_session_3100=abc');
    expect(answer.status).toBe(503);
    expect(answer.body).toMatchObject({
      type: '/problems/database-unavailable',
      title: 'Nothing was recorded, try again',
    });
    const health = await request(app).get('/api/health');
    expect(health.body).toEqual({ ok: true, database: false });
    await db.close();
  });

  it('turn our own fault into a 500 that tells nothing, with the reason in the log', async () => {
    const sql = { begin: () => Promise.reject(new Error('secret reason')) };
    const broken = { ...world.deps.db, sql: sql as never };
    const app = makeApp({ ...world.deps, db: broken });
    const answer = await request(app).get('/api/me').set('Cookie', 'brimline_session_3100=abc');
    expect(answer.status).toBe(500);
    expect(JSON.stringify(answer.body)).not.toContain('secret reason');
    expect(JSON.stringify(world.log)).toContain('secret reason');
  });

  it('ask for an idempotency key on acts', async () => {
    const jar = await world.as('nurse').cookie();
    const answer = await request(world.server)
      .post('/api/children/search')
      .set({ Origin: PUBLIC_URL, Cookie: jar })
      .send({ text: 'a' });
    expect(answer.status).toBe(422);
    expect(answer.body.detail).toContain('Idempotency-Key');
  });
});

describe('limits', () => {
  it('stop a flood of requests, and of sign-ins sooner', async () => {
    const own = await makeWorld(urls, { rates: { all: 8, signIn: 3 } });
    const client = anonymous(own.deps, own.server);
    const tries: number[] = [];
    for (let i = 0; i < 5; i++) {
      const body = { email: `${i}@nowhere.example`, password: 'x' };
      tries.push((await client.call(ROUTES.signIn, { body })).status);
    }
    expect(tries).toEqual([401, 401, 401, 429, 429]);
    for (let i = 0; i < 3; i++) expect((await client.get('/api/health')).status).toBe(200);
    const stopped = await client.get('/api/health');
    expect(stopped.status).toBe(429);
    expect(stopped.body.type).toBe('/problems/too-many-requests');
    // someone with a session counts apart
    expect((await own.as('nurse').call(ROUTES.me)).status).toBe(200);
  });
});

describe('the log', () => {
  it('names the route, never the address, a password, a cookie or a body', async () => {
    const own = await makeWorld(urls);
    const child = await own.addChild({ surname: 'Quillfeather' });
    await anonymous(own.deps, own.server).call(ROUTES.signIn, {
      body: { email: own.people.nurse.email, password: PASSWORD },
    });
    const nurse = own.as('nurse');
    await nurse.call(ROUTES.chart, { params: { id: child } });
    await nurse.call(ROUTES.searchChildren, { body: { text: 'Quillfeather' } });
    const text = JSON.stringify(own.log);
    expect(own.log.filter((line) => line.msg === 'answered')).toHaveLength(3);
    expect(text).toContain('/api/children/:id');
    expect(text).toContain('requestId');
    for (const secret of [PASSWORD, 'Quillfeather', child, (await nurse.cookie()).split('=')[1]!]) {
      expect(text).not.toContain(secret);
    }
  });

  it('counts what the content policy stopped', async () => {
    const own = await makeWorld(urls);
    const report = { 'csp-report': { 'violated-directive': 'style-src', 'blocked-uri': 'inline' } };
    const answer = await request(own.server)
      .post('/api/csp-reports')
      .set('Content-Type', 'application/csp-report')
      .send(JSON.stringify(report));
    expect(answer.status).toBe(204);
    const line = own.log.find((each) => each.msg === 'csp-report');
    expect(line).toMatchObject({ count: 1, report: report['csp-report'] });
  });
});

describe('the client’s files', () => {
  const folder = mkdtempSync(join(tmpdir(), 'brimline-web-'));
  afterAll(() => rmSync(folder, { recursive: true }));

  it('are kept for a year when hashed; the page answers every address but the API’s', async () => {
    mkdirSync(join(folder, 'assets'));
    writeFileSync(join(folder, 'index.html'), '<p>the page</p>');
    writeFileSync(join(folder, 'assets', 'app-1a2b3c.js'), 'void 0');
    writeFileSync(join(folder, 'theme.js'), 'void 1');
    const server = createServer(makeApp(world.deps, { client: folder })).listen(0);
    const get = (path: string) => request(server).get(path);
    const asset = await get('/assets/app-1a2b3c.js');
    expect(asset.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    expect((await get('/theme.js')).headers['cache-control']).toContain('max-age=0');
    for (const path of ['/', '/wards/x', '/sign-in', '/p/ABC']) {
      const page = await get(path);
      expect([page.status, page.text]).toEqual([200, '<p>the page</p>']);
      expect(page.headers['cache-control']).toBe('no-cache');
    }
    expect((await get('/api/wards')).headers['content-type']).toContain('problem+json');
    expect((await get('/assets/gone.js')).status).toBe(404);
    expect((await get('/..%2f..%2fetc%2fpasswd')).text).not.toContain('root:');
    server.close();
  });
});
