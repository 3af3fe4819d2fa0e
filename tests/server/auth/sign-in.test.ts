import { ROUTES } from '@shared/routes';
import { meSchema } from '@shared/routes/accounts';
import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { hashPassword } from '../../../server/auth/password';
import { logins, sessions } from '../../../server/db/schema/auth';
import { ledger } from '../../../server/db/schema/ledger';
import { inTransaction, INSTALLATION } from '../../../server/db/transaction';
import { anonymous, clientWith } from '../support/client';
import { sharedDatabase } from '../support/database';
import { makeWorld, PASSWORD, type PersonKey, type World } from '../support/world';
import { eq } from 'drizzle-orm';

const urls = sharedDatabase();
let world: World;
beforeAll(async () => {
  world = await makeWorld(urls);
});

const signIn = (email: string, password = PASSWORD, from = world) =>
  anonymous(from.deps, from.server).call(ROUTES.signIn, { body: { email, password } });
const emailOf = (key: PersonKey) => world.people[key].email;
const actsOf = (of: World) =>
  of.within((tx) =>
    tx.select({ act: ledger.act, subject: ledger.subjectId }).from(ledger).orderBy(ledger.seq),
  );

describe('signing in', () => {
  it('answers who one is, and sets a cookie that scripts cannot read', async () => {
    const answer = await signIn(emailOf('doctor'));
    expect(answer.status).toBe(200);
    const me = meSchema.parse(answer.body);
    expect(me.account.name).toBe('Imogen Vale');
    expect(me.wards.map((ward) => ward.name)).toEqual(['Curlew', 'Heron']);
    expect(me.session).toMatchObject({ locked: false, idleMinutes: 15 });
    expect(me.session.idleUntil).toBe('2026-06-10T11:15:00.000Z');
    expect(me.session.absoluteUntil).toBe('2026-06-10T23:00:00.000Z');
    const [cookie] = answer.headers['set-cookie'] as unknown as string[];
    expect(cookie).toMatch(/^brimline_session_3100=[a-z0-9]{40};/);
    expect(cookie).toContain('HttpOnly');
    expect(cookie).toContain('SameSite=Strict');
    expect(cookie).toContain('Path=/');
    expect(cookie).not.toContain('Secure');
  });

  it('keeps only the SHA-256 of the session secret', async () => {
    const answer = await signIn(emailOf('otherDoctor'));
    const secret = /=([a-z0-9]{40});/.exec((answer.headers['set-cookie'] as unknown as string[])[0]!)![1]!;
    const rows = await world.deps.db.db
      .select()
      .from(sessions)
      .where(eq(sessions.loginId, world.people.otherDoctor.loginId));
    expect(rows).toHaveLength(1);
    expect(JSON.stringify(rows)).not.toContain(secret);
    expect(rows[0]!.id).toMatch(/^[0-9a-f]{64}$/);
  });

  it('takes the e-mail address in any case, and spaces around it', async () => {
    const answer = await signIn(`  ${emailOf('doctor').toUpperCase()} `);
    expect(answer.status).toBe(200);
  });

  it('marks the cookie Secure where the address is https', async () => {
    const safe = await makeWorld(urls, { env: { PUBLIC_URL: 'https://brimline.example' } });
    const answer = await signIn(safe.people.doctor.email, PASSWORD, safe);
    expect((answer.headers['set-cookie'] as unknown as string[])[0]).toMatch(
      /^brimline_session_443=.*Secure/,
    );
    expect(answer.headers['strict-transport-security']).toContain('max-age=');
  });

  it('ends the session this browser had before', async () => {
    const first = await signIn(emailOf('checker'));
    const cookie = (first.headers['set-cookie'] as unknown as string[])[0]!.split(';')[0]!;
    const same = clientWith(world.deps, world.server, () => Promise.resolve(cookie));
    expect((await same.call(ROUTES.me)).status).toBe(200);
    await same.call(ROUTES.signIn, { body: { email: emailOf('checker'), password: PASSWORD } });
    expect((await same.call(ROUTES.me)).status).toBe(401);
  });

  it('is written in the ledger', async () => {
    const own = await makeWorld(urls);
    await signIn(own.people.nurse.email, PASSWORD, own);
    expect(await actsOf(own)).toEqual([{ act: 'signed-in', subject: own.people.nurse.id }]);
  });

  it.each([
    ['nothing', {}],
    ['an e-mail that is no text', { email: 5, password: 'x' }],
    ['no password', { email: 'a@b.example', password: '' }],
    ['a huge password', { email: 'a@b.example', password: 'x'.repeat(201) }],
    ['a list', []],
  ])('refuses %s as bad input', async (_name, body) => {
    const answer = await anonymous(world.deps, world.server).post('/api/sign-in', body);
    expect(answer.status).toBe(422);
    expect(answer.body.type).toBe('/problems/bad-input');
    expect(answer.body.errors.length).toBeGreaterThan(0);
  });
});

describe('what is refused', () => {
  it('gives one answer for a wrong password, an unknown address, a disabled and an invited account', async () => {
    const own = await makeWorld(urls);
    const { db } = own.deps.db;
    await db
      .update(logins)
      .set({ disabledAt: own.clock.now() })
      .where(eq(logins.id, own.people.admin.loginId));
    await db.update(logins).set({ passwordHash: null }).where(eq(logins.id, own.people.lead.loginId));
    const answers = [
      await signIn(own.people.doctor.email, 'wrong', own),
      await signIn(`${randomUUID()}@nowhere.example`, PASSWORD, own),
      await signIn(own.people.admin.email, PASSWORD, own),
      await signIn(own.people.lead.email, PASSWORD, own),
    ];
    const bodies = answers.map(({ status, body }) => ({ status, ...body, instance: '' }));
    expect(new Set(bodies.map((body) => JSON.stringify(body))).size).toBe(1);
    expect(bodies[0]).toMatchObject({ status: 401, type: '/problems/sign-in-refused' });
    expect(answers.every((answer) => answer.headers['set-cookie'] === undefined)).toBe(true);
  });

  it('takes about as long for an unknown address as for a wrong password', async () => {
    const own = await makeWorld(urls);
    const timed = async (email: string) => {
      const began = performance.now();
      await signIn(email, 'wrong-password', own);
      return performance.now() - began;
    };
    await timed('warm@nowhere.example');
    const unknown: number[] = [];
    const known: number[] = [];
    for (const key of ['doctor', 'nurse', 'checker', 'senior', 'lead'] as const) {
      unknown.push(await timed(`${key}@nowhere.example`));
      known.push(await timed(own.people[key].email));
    }
    const median = (times: number[]) => times.sort((a, b) => a - b)[2]!;
    // a look-up without a verification would take a tenth of it
    expect(median(unknown)).toBeGreaterThan(median(known) * 0.4);
  });

  it('writes a known account into its hospital, an unknown one into the installation, never the address', async () => {
    const own = await makeWorld(urls);
    const address = `${randomUUID()}@nowhere.example`;
    await signIn(own.people.doctor.email, 'wrong', own);
    await signIn(address, 'wrong', own);
    expect(await actsOf(own)).toEqual([{ act: 'sign-in-refused', subject: own.people.doctor.loginId }]);
    const rows = await inTransaction(own.deps.db, INSTALLATION, 'read only', (tx) =>
      tx.select({ act: ledger.act, entry: ledger.entry }).from(ledger),
    );
    expect(rows.some((row) => row.act === 'sign-in-refused')).toBe(true);
    expect(JSON.stringify(rows)).not.toContain(address);
  });
});

describe('lockout', () => {
  it('locks after five wrong tries for a quarter of an hour, kept in the database', async () => {
    const own = await makeWorld(urls);
    const { email, loginId } = own.people.doctor;
    for (let i = 0; i < 4; i++) await signIn(email, `wrong-${i}`, own);
    expect((await signIn(email, PASSWORD, own)).status).toBe(200);
    for (let i = 0; i < 5; i++) await signIn(email, `wrong-${i}`, own);
    expect((await signIn(email, PASSWORD, own)).status).toBe(401);
    const [row] = await own.deps.db.db.select().from(logins).where(eq(logins.id, loginId));
    expect(row!.lockedUntil).toBe(own.clock.now() + 900_000);
    own.clock.advance(899_000);
    expect((await signIn(email, PASSWORD, own)).status).toBe(401);
    own.clock.advance(2_000);
    expect((await signIn(email, 'wrong', own)).status).toBe(401);
    expect((await signIn(email, PASSWORD, own)).status).toBe(200);
  });

  it('holds against many tries at once', async () => {
    const own = await makeWorld(urls);
    const { email } = own.people.nurse;
    await Promise.all(Array.from({ length: 20 }, (_, i) => signIn(email, `wrong-${i}`, own)));
    const rows = await own.within((tx) => tx.select({ entry: ledger.entry }).from(ledger));
    const refusals = rows.map((row) => (JSON.parse(row.entry) as { refusal: string }).refusal);
    // two verifications run at once, so one try may overtake the lock
    expect(refusals.filter((code) => code === 'sign-in-refused').length).toBeLessThanOrEqual(5);
    expect((await signIn(email, PASSWORD, own)).status).toBe(401);
  });

  it('does not lock a colleague', async () => {
    const own = await makeWorld(urls);
    for (let i = 0; i < 6; i++) await signIn(own.people.doctor.email, 'wrong', own);
    expect((await signIn(own.people.checker.email, PASSWORD, own)).status).toBe(200);
  });
});

it('stores argon2id with 19 MiB, 2 passes, 1 lane (OWASP, from memory)', async () => {
  expect(await hashPassword('x')).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
});
