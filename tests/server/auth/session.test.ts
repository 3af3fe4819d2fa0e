import { ROUTES } from '@shared/routes';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { closeBesideSession, openBesideSession, readBesideSession } from '../../../server/auth/beside';
import { verifyPasswordAgain } from '../../../server/auth/verify-password-again';
import { done, refused } from '../../../server/db/outcome';
import { sessions } from '../../../server/db/schema/auth';
import { accounts } from '../../../server/db/schema/accounts';
import { ledger } from '../../../server/db/schema/ledger';
import { clientWith } from '../support/client';
import { sharedDatabase } from '../support/database';
import { makeWorld, PASSWORD, type PersonKey, type World } from '../support/world';
import type { Actor } from '@shared/accounts/actor';

const urls = sharedDatabase();
const MINUTE = 60_000;
let world: World;
beforeEach(async () => {
  world = await makeWorld(urls);
});

const ward = () => `/api/wards/${world.wards.heron}`;
const ledgerActs = () =>
  world.within(async (tx) =>
    (await tx.select({ act: ledger.act }).from(ledger).orderBy(ledger.seq)).map(({ act }) => act),
  );

describe('idling', () => {
  it('locks the session, keeps it, and a password opens it again', async () => {
    const client = world.as('doctor');
    expect((await client.get(ward())).status).toBe(200);
    world.clock.advance(15 * MINUTE);
    const locked = await client.get(ward());
    expect(locked.status).toBe(423);
    expect(locked.body.type).toBe('/problems/session-locked');
    expect((await client.call(ROUTES.me)).body.session.locked).toBe(true);
    expect((await client.call(ROUTES.sessions)).status).toBe(423);

    const wrong = await client.call(ROUTES.unlock, { body: { password: 'wrong' } });
    expect([wrong.status, wrong.body.type]).toEqual([403, '/problems/password-wrong']);
    const open = await client.call(ROUTES.unlock, { body: { password: PASSWORD } });
    expect(open.body.session.locked).toBe(false);
    expect((await client.get(ward())).status).toBe(200);
    expect(await ledgerActs()).toEqual(['password-refused', 'unlocked']);
  });

  it('counts acts of a person, not polls of an open page', async () => {
    const [busy, left] = [world.as('doctor'), world.as('nurse')];
    await busy.get(ward());
    await left.get(ward());
    for (let i = 0; i < 3; i++) {
      world.clock.advance(6 * MINUTE);
      await busy.get(ward());
      await left.get(ward(), { headers: { 'X-Brimline-Background': '1' } });
    }
    expect((await busy.get(ward())).status).toBe(200);
    expect((await left.get(ward())).status).toBe(423);
  });

  it('ends at the absolute limit however busy, and forgets the session', async () => {
    const client = world.as('doctor');
    await client.get(ward());
    for (let i = 0; i < 51; i++) {
      world.clock.advance(14 * MINUTE);
      expect((await client.get(ward())).status).toBe(200);
    }
    world.clock.advance(6 * MINUTE);
    const ended = await client.get(ward());
    expect([ended.status, ended.body.type]).toEqual([401, '/problems/signed-out']);
    const rows = await world.deps.db.db
      .select()
      .from(sessions)
      .where(eq(sessions.loginId, world.people.doctor.loginId));
    expect(rows).toEqual([]);
  });

  it('can be done by hand', async () => {
    const client = world.as('doctor');
    expect((await client.call(ROUTES.lock)).body.session.locked).toBe(true);
    expect((await client.get(ward())).status).toBe(423);
    expect((await client.call(ROUTES.unlock, { body: { password: PASSWORD } })).status).toBe(200);
    expect(await ledgerActs()).toEqual(['locked', 'unlocked']);
  });

  it('locks the account after five wrong tries at unlocking', async () => {
    const client = world.as('doctor');
    await client.call(ROUTES.lock);
    for (let i = 0; i < 4; i++) await client.call(ROUTES.unlock, { body: { password: 'wrong' } });
    const fifth = await client.call(ROUTES.unlock, { body: { password: 'wrong' } });
    expect([fifth.status, fifth.body.type]).toEqual([429, '/problems/account-locked']);
    expect((await client.call(ROUTES.unlock, { body: { password: PASSWORD } })).status).toBe(429);
    world.clock.advance(15 * MINUTE + 1);
    expect((await client.call(ROUTES.unlock, { body: { password: PASSWORD } })).status).toBe(200);
  });
});

describe('who a session is', () => {
  it.each(['no-such-secret', '', 'a'.repeat(5000)])('nobody for the cookie %j', async (secret) => {
    const client = clientWith(world.deps, world.server, () =>
      Promise.resolve(`brimline_session_3100=${secret}`),
    );
    expect((await client.get(ward())).status).toBe(401);
  });

  it('nobody by the stored hash itself', async () => {
    await world.as('doctor').get(ward());
    const [row] = await world.deps.db.db
      .select()
      .from(sessions)
      .where(eq(sessions.loginId, world.people.doctor.loginId));
    const client = clientWith(world.deps, world.server, () =>
      Promise.resolve(`brimline_session_3100=${row!.id}`),
    );
    expect((await client.get(ward())).status).toBe(401);
  });

  it('nobody once the account is deactivated', async () => {
    const client = world.as('doctor');
    expect((await client.get(ward())).status).toBe(200);
    await world.within((tx) =>
      tx
        .update(accounts)
        .set({ deactivatedAt: world.clock.now() })
        .where(eq(accounts.id, world.people.doctor.id)),
    );
    expect((await client.get(ward())).status).toBe(401);
  });

  it('ends with signing out, here and nowhere else', async () => {
    const [here, there] = [world.as('doctor'), world.as('doctor')];
    await there.get(ward());
    const out = await here.call(ROUTES.signOut);
    expect(out.body).toEqual({ ok: true });
    expect((out.headers['set-cookie'] as unknown as string[])[0]).toContain('Max-Age=0');
    expect((await here.get(ward())).status).toBe(401);
    expect((await there.get(ward())).status).toBe(200);
  });
});

describe('the own sessions', () => {
  it('are listed with the device, and any can be revoked', async () => {
    const [here, there] = [world.as('doctor'), world.as('doctor')];
    await there.get(ward());
    const listed = await here.call(ROUTES.sessions);
    const rows = listed.body.sessions as {
      id: string;
      isThis: boolean;
      device: string;
      lastSeenAt: string;
    }[];
    expect(rows).toHaveLength(2);
    expect(rows.map(({ device }) => device)).toEqual(['Firefox on Linux', 'Firefox on Linux']);
    expect(rows.filter(({ isThis }) => isThis)).toHaveLength(1);
    expect(rows[0]!.lastSeenAt).toBe('2026-06-10T11:00:00.000Z');
    const other = rows.find(({ isThis }) => !isThis)!;
    expect((await here.call(ROUTES.revokeSession, { params: { id: other.id } })).status).toBe(200);
    expect((await there.get(ward())).status).toBe(401);
    expect((await here.call(ROUTES.revokeSession, { params: { id: other.id } })).status).toBe(404);
  });

  it('are one’s own alone', async () => {
    await world.as('nurse').get(ward());
    const [row] = await world.deps.db.db
      .select()
      .from(sessions)
      .where(eq(sessions.loginId, world.people.nurse.loginId));
    const answer = await world.as('doctor').call(ROUTES.revokeSession, { params: { id: row!.id } });
    expect(answer.status).toBe(404);
    expect((await world.as('nurse').get(ward())).status).toBe(200);
  });
});

const actorFor = async (key: PersonKey): Promise<Actor> => {
  const client = world.as(key);
  const me = await client.call(ROUTES.me);
  const { id, name, title, roles, registrationNumber } = world.people[key];
  const sessionId = me.body.session.id as string;
  return { id, name, title, roles, registrationNumber, hospitalId: world.hospitalId, wards: [], sessionId };
};

describe('the password again', () => {
  it('says ok, wrong, and locked after five', async () => {
    const actor = await actorFor('doctor');
    expect(await verifyPasswordAgain(world.deps, actor, PASSWORD)).toBe('ok');
    for (let i = 0; i < 4; i++) expect(await verifyPasswordAgain(world.deps, actor, 'no')).toBe('wrong');
    expect(await verifyPasswordAgain(world.deps, actor, 'no')).toBe('locked');
    expect(await verifyPasswordAgain(world.deps, actor, PASSWORD)).toBe('locked');
    expect(await ledgerActs()).toEqual(Array.from({ length: 6 }, () => 'password-refused'));
  });

  it('is right many times at once', async () => {
    const actor = await actorFor('checker');
    const verdicts = await Promise.all(
      Array.from({ length: 12 }, () => verifyPasswordAgain(world.deps, actor, PASSWORD)),
    );
    expect(new Set(verdicts)).toEqual(new Set(['ok']));
  });
});

describe('a visit beside', () => {
  const versionId = '3b0c8f0e-7a52-4a57-9a3f-7f0a5b8f9c11';
  const login = () => ({ email: world.people.checker.email, password: PASSWORD });
  const fine = () => Promise.resolve(done(null));

  async function open(author = world.as('doctor')) {
    const me = await author.call(ROUTES.me);
    const opened = await openBesideSession(
      world.deps,
      login(),
      versionId,
      me.body.session.id as string,
      fine,
    );
    if (!opened.ok) throw new Error(opened.code);
    return { author, ...opened.value, header: opened.value.cookie.split(';')[0]! };
  }

  it('suspends the author’s session and is the checker’s, for that version and ten minutes', async () => {
    const { author, cookie, header, until } = await open();
    expect(cookie).toMatch(
      /^brimline_beside_3100=.*Path=\/api\/beside; Max-Age=600; HttpOnly; SameSite=Strict$/,
    );
    expect(until).toBe(world.clock.now() + 10 * MINUTE);
    const suspended = await author.get(ward());
    expect(suspended.status).toBe(423);
    expect(suspended.body.detail).toContain('beside you');
    expect((await author.call(ROUTES.unlock, { body: { password: PASSWORD } })).status).toBe(423);
    const visit = await readBesideSession(world.deps, header);
    expect(visit?.actor.id).toBe(world.people.checker.id);
    expect(visit?.versionId).toBe(versionId);
  });

  it('gives the session back when it is closed', async () => {
    const { author, header } = await open();
    const visit = await readBesideSession(world.deps, header);
    expect(await closeBesideSession(world.deps, visit!)).toContain('Max-Age=0');
    expect((await author.get(ward())).status).toBe(200);
    expect(await readBesideSession(world.deps, header)).toBeNull();
  });

  it('leaves the screen locked when it runs out', async () => {
    const { author, header } = await open();
    world.clock.advance(10 * MINUTE);
    expect(await readBesideSession(world.deps, header)).toBeNull();
    const answer = await author.get(ward());
    expect(answer.body.type).toBe('/problems/session-locked');
    expect((await author.call(ROUTES.unlock, { body: { password: PASSWORD } })).status).toBe(200);
    expect((await author.get(ward())).status).toBe(200);
  });

  it('is no session of its own for the rest of the program', async () => {
    const { cookie } = await open();
    const secret = /=([^;]+);/.exec(cookie)![1]!;
    const client = clientWith(world.deps, world.server, () =>
      Promise.resolve(`brimline_session_3100=${secret}`),
    );
    expect((await client.get(ward())).status).toBe(401);
  });

  it('opens for nobody with a wrong password, nor for whom the caller refuses; nothing is suspended', async () => {
    const author = world.as('doctor');
    const { id } = (await author.call(ROUTES.me)).body.session as { id: string };
    const wrong = await openBesideSession(world.deps, { ...login(), password: 'no' }, versionId, id, fine);
    expect(wrong).toMatchObject({ ok: false, code: 'sign-in-refused' });
    const barred = await openBesideSession(world.deps, login(), versionId, id, () =>
      Promise.resolve(refused('checking')),
    );
    expect(barred).toMatchObject({ ok: false, code: 'checking' });
    expect((await author.get(ward())).status).toBe(200);
    const rows = await world.deps.db.db.select().from(sessions).where(eq(sessions.kind, 'beside'));
    expect(rows.filter((row) => row.loginId === world.people.checker.loginId)).toEqual([]);
  });
});
