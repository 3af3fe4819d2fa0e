import { ROUTES } from '@shared/routes';
import { MINUTE } from '@shared/time';
import { eq } from 'drizzle-orm';
import type { Response } from 'supertest';
import { beforeEach, describe, expect, it } from 'vitest';
import { accounts } from '../../../server/db/schema/accounts';
import { exceptions, seenFigures } from '../../../server/db/schema/checks';
import { ledger } from '../../../server/db/schema/ledger';
import { orderVersions } from '../../../server/db/schema/orders';
import { anonymous, clientWith, type Client } from '../support/client';
import { sharedDatabase } from '../support/database';
import {
  bolusCheckForm,
  checkForm,
  fillDraft,
  lockIn,
  makeDraft,
  makeOrder,
  signCheck,
} from '../support/make-order';
import { makeWorld, PASSWORD, type World } from '../support/world';

let world: World;
let childId: string;
beforeEach(async () => {
  world = await makeWorld(sharedDatabase());
  childId = await world.addChild();
});

const problem = (answer: Response) => (answer.body as { type?: string }).type;

/** The author's browser with the visit's cookie beside its own. */
function withVisit(author: Client, opened: Response): Client {
  const cookies = (opened.headers['set-cookie'] as unknown as string[]).map((each) => each.split(';')[0]);
  return clientWith(world.deps, world.server, async () => [await author.cookie(), ...cookies].join('; '));
}

describe('a visit beside the author', () => {
  const open = async (author: Client, versionId: string) =>
    author.call(ROUTES.openBeside, {
      params: { id: versionId },
      body: { email: world.people.checker.email, password: PASSWORD },
    });

  it('is good for its order and its routes only, and leaves the author nothing to do', async () => {
    const order = await makeOrder(world, childId);
    const other = await makeOrder(world, await world.addChild());
    const author = world.as('doctor');
    const visit = withVisit(author, await open(author, order.versionId));
    const params = { id: other.versionId };
    const reason = 'trying it out';
    for (const answer of [
      await visit.call(ROUTES.checkPage, { params }),
      await visit.call(ROUTES.lockIn, { params, body: { form: checkForm() } }),
      await visit.call(ROUTES.withdraw, { params: { id: order.versionId }, body: { reason } }),
      await visit.call(ROUTES.stop, { params, body: { reason, volumeInfusedMl: null } }),
      await visit.call(ROUTES.me),
      await visit.call(ROUTES.signOut),
      await visit.call(ROUTES.unlock, { body: { password: PASSWORD } }),
      await visit.call(ROUTES.sessions),
      await open(visit, order.versionId),
    ]) {
      expect(problem(answer)).toBe('/problems/session-locked');
    }
    const locked = await visit.call(ROUTES.besideLockIn, { body: { form: checkForm() } });
    expect(locked.body).toMatchObject({ order: { versionId: order.versionId } });
    const rows = await world.within((tx) =>
      tx.select().from(ledger).where(eq(ledger.act, 'check-locked-in')),
    );
    expect(rows.map(({ actorId }) => actorId)).toEqual([world.people.checker.id]);
  });

  it('its secret is no session, and a session’s secret is no visit', async () => {
    const order = await makeOrder(world, childId);
    const author = world.as('doctor');
    const opened = await open(author, order.versionId);
    const [pair = ''] = (opened.headers['set-cookie'] as unknown as string[])[0]!.split(';');
    const asSession = pair.replace('brimline_beside_', 'brimline_session_');
    const thief = clientWith(world.deps, world.server, () => Promise.resolve(asSession));
    expect(problem(await thief.call(ROUTES.me))).toBe('/problems/signed-out');
    const asVisit = (await world.as('otherChecker').cookie()).replace('_session_', '_beside_');
    const guest = clientWith(world.deps, world.server, () => Promise.resolve(asVisit));
    expect(problem(await guest.call(ROUTES.besidePage))).toBe('/problems/signed-out');
  });

  it('does not sign with the author’s password, nor after the checker has left the ward’s service', async () => {
    const order = await makeOrder(world, childId);
    const author = world.as('doctor');
    const visit = withVisit(author, await open(author, order.versionId));
    const locked = await visit.call(ROUTES.besideLockIn, { body: { form: checkForm() } });
    const { contentSha256 } = (locked.body as { uncovered: { contentSha256: string } }).uncovered;
    await world.within((tx) =>
      tx
        .update(accounts)
        .set({ deactivatedAt: world.clock.now() })
        .where(eq(accounts.id, world.people.checker.id)),
    );
    const body = { contentSha256, acceptReason: null, password: PASSWORD };
    expect(problem(await visit.call(ROUTES.besideSign, { body }))).toBe('/problems/signed-out');
    const [row] = await world.within((tx) =>
      tx.select().from(orderVersions).where(eq(orderVersions.id, order.versionId)),
    );
    expect(row?.state).toBe('awaiting-check');
  });
});

describe('a locked screen', () => {
  it('gives nothing but who it was, by whatever header, and nothing by a public route either', async () => {
    const order = await makeOrder(world, childId);
    const doctor = world.as('doctor');
    const print = await doctor.call(ROUTES.makePrint, { params: { id: order.versionId } });
    const { code, href } = print.body as { code: string; href: string };
    // polls of an open page do not count as someone being there
    const headers = { 'X-Brimline-Background': '1' };
    for (let minute = 0; minute < 16; minute++) {
      await doctor.get('/api/checks', { headers });
      world.clock.advance(MINUTE);
    }
    for (const path of ['/api/checks', `/api/versions/${order.versionId}`, href]) {
      expect(problem(await doctor.get(path, { headers }))).toBe('/problems/session-locked');
      expect(problem(await doctor.get(path))).toBe('/problems/session-locked');
    }
    const paper = await doctor.call(ROUTES.paper, { params: { code } });
    expect(paper.body).toMatchObject({ known: true, order: null });
    const withdraw = { params: { id: order.versionId }, body: { reason: 'at a locked screen' } };
    expect(problem(await doctor.call(ROUTES.withdraw, withdraw))).toBe('/problems/session-locked');
    // a lock is not undone by idling or asking, only by the password
    expect((await doctor.call(ROUTES.me)).body).toMatchObject({ session: { locked: true } });
    expect((await doctor.call(ROUTES.unlock, { body: { password: PASSWORD } })).status).toBe(200);
    expect((await doctor.get('/api/checks')).status).toBe(200);
  });

  it('a sign-in gives a new secret, whatever cookie was planted, and ends the earlier session', async () => {
    const planted = 'a'.repeat(40);
    const victim = clientWith(world.deps, world.server, () =>
      Promise.resolve(`brimline_session_3100=${planted}`),
    );
    const signedIn = await victim.call(ROUTES.signIn, {
      body: { email: world.people.nurse.email, password: PASSWORD },
    });
    expect(signedIn.status).toBe(200);
    const [cookie = ''] = signedIn.headers['set-cookie'] as unknown as string[];
    expect(cookie).toMatch(/^brimline_session_3100=[a-z0-9]{40};.*HttpOnly/);
    expect(cookie).toContain('SameSite=Strict');
    expect(cookie).not.toContain(planted);
    expect(problem(await victim.call(ROUTES.me))).toBe('/problems/signed-out');
  });
});

describe('who has seen the figures', () => {
  it('the senior who agreed, or was only shown it, does not check it, beside the author either', async () => {
    const draft = await makeDraft(world, childId, {
      form: { fraction: 'full', feedsMl: '0' },
    });
    // above all limits at once it cannot be; ask only where a limit asks
    const asked = await world.as('doctor').call(ROUTES.askException, {
      params: { id: draft.versionId },
      body: { rev: draft.rev, seniorId: null, reason: 'please look at it' },
    });
    expect(problem(asked)).toBe('/problems/conflict');
    // a senior is shown nothing that was not put to one
    const peek = await world.as('senior').call(ROUTES.exceptionMatter, { params: { id: draft.versionId } });
    expect(problem(peek)).toBe('/problems/conflict');
    // ids are random and may hold any digits
    expect(peek.text.replaceAll(/[0-9a-f]{8}-[0-9a-f-]{27}/g, '')).not.toContain('44');
    const rows = await world.within((tx) => tx.select().from(seenFigures));
    expect(rows).toEqual([]);
  });

  it('a matter that is void is not brought back by countersigning it', async () => {
    const order = await makeOrder(world, childId, { kind: 'bolus', form: { urgency: 'emergency' } });
    const now = world.clock.now();
    const [row] = await world.within((tx) =>
      tx
        .insert(exceptions)
        .values({
          versionId: order.versionId,
          authorId: world.people.doctor.id,
          limitCode: 'bolus-again',
          contentSha256: 'a'.repeat(64),
          state: 'void',
          askedAt: now,
          countersignDueAt: now,
        })
        .returning(),
    );
    const params = { id: row!.id };
    const signed = await world
      .as('senior')
      .call(ROUTES.countersignException, { params, body: { password: PASSWORD } });
    expect(problem(signed)).toBe('/problems/conflict');
    const [after] = await world.within((tx) => tx.select().from(exceptions));
    expect(after).toMatchObject({ state: 'void', by: null });
  });

  it('nobody decides or countersigns what was not asked, of another version, or twice', async () => {
    const draft = await makeDraft(world, childId);
    const body = { agree: true, contentSha256: 'a'.repeat(64), reason: 'all is well', password: PASSWORD };
    const params = { id: draft.versionId };
    for (const person of ['senior', 'lead', 'checker', 'pharmacist', 'doctor', 'admin'] as const) {
      const answer = await world.as(person).call(ROUTES.decideException, { params, body });
      expect([person, answer.status >= 400 && answer.status < 500]).toEqual([person, true]);
      const signed = await world
        .as(person)
        .call(ROUTES.countersignException, { params, body: { password: PASSWORD } });
      expect([person, [403, 404].includes(signed.status)]).toEqual([person, true]);
    }
    expect(await world.within((tx) => tx.select().from(exceptions))).toEqual([]);
  });
});

describe('the author', () => {
  it('never checks an own order: not by the page, the queue, a revision, or beside oneself', async () => {
    // a prescriber who is a checker as well
    const order = await makeOrder(world, childId, { author: 'checker' });
    const own = world.as('checker');
    const params = { id: order.versionId };
    expect(problem(await own.call(ROUTES.checkPage, { params }))).toBe('/problems/second-person-required');
    expect(problem(await lockIn(world, 'checker', order.versionId, checkForm()))).toBe(
      '/problems/second-person-required',
    );
    const queue = await own.call(ROUTES.checkQueue);
    expect(queue.text).not.toContain(order.versionId);
    const beside = await own.call(ROUTES.openBeside, {
      params,
      body: { email: world.people.checker.email, password: PASSWORD },
    });
    expect(problem(beside)).toBe('/problems/second-person-required');
    expect((await own.call(ROUTES.checkQueue)).status).toBe(200);
    // taken over by another prescriber, the first author has seen the figures of the order
    const body = { what: 'weight', reason: 'cannot be right' };
    expect((await world.as('otherChecker').call(ROUTES.cannotVerify, { params, body })).status).toBe(200);
    const revised = await world.as('doctor').call(ROUTES.revise, { params });
    const { versionId } = revised.body as { versionId: string };
    const rev = await fillDraft(world, childId, versionId);
    const signed = await world.as('doctor').call(ROUTES.sign, {
      params: { id: versionId },
      body: { rev, seen: { rateMlPerH: '44.0', volumeMl: '1056.0', rulebook: 1 }, password: PASSWORD },
    });
    expect(signed.body).toMatchObject({ state: 'awaiting-check' });
    world.clock.advance(30 * MINUTE);
    expect(problem(await lockIn(world, 'checker', versionId, checkForm()))).toBe(
      '/problems/unseen-or-waited',
    );
  });

  it('nor is a draft, or its conflict, readable by anyone else', async () => {
    const draft = await makeDraft(world, childId);
    const params = { id: draft.versionId };
    for (const person of ['checker', 'senior', 'lead', 'pharmacist', 'nurse', 'otherDoctor'] as const) {
      const read = await world.as(person).call(ROUTES.draft, { params });
      const form = { kind: 'maintenance' };
      const saved = await world.as(person).call(ROUTES.saveDraft, { params, body: { rev: 1, form } });
      expect([person, read.status >= 400, saved.status >= 400]).toEqual([person, true, true]);
      expect(`${read.text}${saved.text}`).not.toContain('four-fifths');
    }
  });
});

describe('figures that may not be probed for', () => {
  it('a lock-in that is refused tells nothing by which to find them', async () => {
    const order = await makeOrder(world, childId, { kind: 'bolus' });
    const answers: Response[] = [];
    for (const volumeMl of ['100', '164', '320']) {
      const form = bolusCheckForm({ volumeMl, initials: 'ZZ' });
      answers.push(await lockIn(world, 'checker', order.versionId, form));
    }
    const told = answers.map(({ body }) => {
      const { instance: _each, ...rest } = body as { instance: string };
      return rest;
    });
    expect(told[1]).toEqual(told[0]);
    expect(told[2]).toEqual(told[0]);
    expect(problem(answers[0]!)).toBe('/problems/wrong-child');
  });

  it('the same answer is given about a covered order whatever was ordered', async () => {
    const texts: string[] = [];
    for (const [mlPerKg, volumeMl] of [
      ['10', '164.0'],
      ['5', '82.0'],
    ] as const) {
      const own = await makeWorld(sharedDatabase());
      const child = await own.addChild();
      const form = { mlPerKg, ...(mlPerKg === '5' && { overMinutes: '20' }) };
      const { versionId } = await makeOrder(own, child, {
        kind: 'bolus',
        form,
        seen: { rateMlPerH: null, volumeMl },
      });
      const checker = own.as('checker');
      const page = await checker.call(ROUTES.checkPage, { params: { id: versionId } });
      const view = await checker.call(ROUTES.order, { params: { id: versionId } });
      const ward = await checker.get(`/api/wards/${own.wards.heron}`);
      const queue = await checker.call(ROUTES.checkQueue);
      const answers = [page, view, ward, queue].map((answer) => {
        expect(answer.status).toBe(200);
        // ids and hashes are random; their length is not
        return answer.text.replace(/[0-9a-f]{8}-[0-9a-f-]{27}/g, 'id').replace(/[0-9a-f]{64}/g, 'hash');
      });
      texts.push(answers.join('\n'));
    }
    expect(texts[1]).toBe(texts[0]);
  });
});

describe('a lockout', () => {
  it('counts every place a password is asked for together, and bars all of them', async () => {
    const order = await makeOrder(world, childId);
    await lockIn(world, 'checker', order.versionId, checkForm());
    const { email } = world.people.checker;
    const author = world.as('doctor');
    const client = anonymous(world.deps, world.server);
    const guess = 'not the password';
    await client.call(ROUTES.signIn, { body: { email, password: guess } });
    await client.call(ROUTES.signIn, { body: { email: email.toUpperCase(), password: guess } });
    await author.call(ROUTES.openBeside, {
      params: { id: order.versionId },
      body: { email, password: guess },
    });
    const own = world.as('checker');
    await own.call(ROUTES.lock);
    await own.call(ROUTES.unlock, { body: { password: guess } });
    await own.call(ROUTES.unlock, { body: { password: guess } });
    for (const answer of [
      await own.call(ROUTES.unlock, { body: { password: PASSWORD } }),
      await client.call(ROUTES.signIn, { body: { email, password: PASSWORD } }),
      await signCheck(world, 'checker', order.versionId),
    ]) {
      expect([401, 429]).toContain(answer.status);
    }
    world.clock.advance(15 * MINUTE + 1);
    expect((await client.call(ROUTES.signIn, { body: { email, password: PASSWORD } })).status).toBe(200);
  });
});
