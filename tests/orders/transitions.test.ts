import { ROLES, type Actor, type Role } from '@shared/accounts/actor';
import { decide, decideByClock, SEEN_FIGURES_WAIT_MS, type VersionFacts } from '@shared/orders/decide';
import { VERSION_STATES, isEnded, isLive, type VersionState } from '@shared/orders/states';
import { ACTS, TRANSITIONS, type Act, type Relation } from '@shared/orders/transitions';
import { describe, expect, it } from 'vitest';

/**
 * How an order moves, typed by hand from the paper on it and not from the code: act, from, to, roles, and what the
 * person must or must not be to the version already. One line for each way an act is allowed; all else is refused.
 */
const ORACLE = `
sign             | draft               | awaiting-check             | prescriber                       | only author
discard          | draft               | discarded                  | prescriber                       | only author
ask-exception    | draft               | draft                      | prescriber                       | only author
grant-exception  | draft               | draft                      | prescriber lead                  | not author checker
refuse-exception | draft               | draft                      | prescriber lead                  | not author checker
open-check       | awaiting-check      | awaiting-check             | prescriber pharmacist nurse lead | not author granter
lock-in          | awaiting-check      | awaiting-check disputed    | prescriber pharmacist nurse lead | not author granter
sign-check       | awaiting-check      | signed awaiting-pharmacist | prescriber pharmacist nurse lead | not author granter
cannot-verify    | awaiting-check      | returned                   | prescriber pharmacist nurse lead | not author granter
pass-on          | awaiting-check      | awaiting-check             | prescriber pharmacist nurse lead | not author
slip             | disputed            | awaiting-check given       | prescriber pharmacist nurse lead | not author
settle           | disputed            | returned countersigned     | prescriber pharmacist lead       | not author checker
withdraw         | awaiting-check      | withdrawn                  | prescriber                       | only author
withdraw         | disputed            | withdrawn                  | prescriber                       | only author
withdraw         | returned            | withdrawn                  | prescriber                       | only author
withdraw         | awaiting-pharmacist | withdrawn                  | prescriber                       | only author
withdraw         | signed              | withdrawn                  | prescriber                       | only author
withdraw         | awaiting-check      | withdrawn                  | lead                             | anyone
withdraw         | disputed            | withdrawn                  | lead                             | anyone
withdraw         | returned            | withdrawn                  | lead                             | anyone
withdraw         | awaiting-pharmacist | withdrawn                  | lead                             | anyone
withdraw         | signed              | withdrawn                  | lead                             | anyone
revise           | disputed            | revised                    | prescriber                       | only author
revise           | signed              | revised                    | prescriber                       | only author
revise           | returned            | revised                    | prescriber                       | anyone
verify           | awaiting-pharmacist | signed                     | pharmacist                       | not author checker
query            | awaiting-pharmacist | returned                   | pharmacist                       | not author checker
start            | signed              | running                    | nurse                            | not author
hold             | running             | held                       | nurse prescriber                 | anyone
resume           | held                | running                    | nurse prescriber                 | anyone
send-away        | running             | away                       | nurse                            | anyone
come-back        | away                | running                    | nurse                            | anyone
stop             | running             | stopped                    | prescriber pharmacist nurse lead | anyone
stop             | held                | stopped                    | prescriber pharmacist nurse lead | anyone
stop             | away                | stopped                    | prescriber pharmacist nurse lead | anyone
finish           | running             | finished                   | nurse                            | anyone
countersign      | given               | countersigned              | prescriber pharmacist nurse lead | not giver
differ           | given               | disputed                   | prescriber pharmacist nurse lead | not giver
`;

type Line = {
  act: Act;
  from: string;
  to: string[];
  roles: string[];
  must: 'only' | 'not' | 'anyone';
  whom: string[];
};
const LINES: Line[] = ORACLE.trim()
  .split('\n')
  .map((text) => {
    const [act, from, to, roles, as] = text.split('|').map((cell) => cell.trim());
    const [must, ...whom] = as!.split(' ');
    return {
      act: act as Act,
      from: from!,
      to: to!.split(' '),
      roles: roles!.split(' '),
      must: must as Line['must'],
      whom,
    };
  });

const WARD = 'ward-1';
const NOW = 1_781_089_200_000;

const person = (roles: Role[], change: Partial<Actor> = {}): Actor => ({
  id: 'account-1',
  hospitalId: 'hospital-1',
  name: 'Invented Person',
  roles,
  title: 'Registrar',
  registrationNumber: 'REG-1',
  wards: [{ wardId: WARD, name: 'Heron', entitlements: ['checking', 'senior', 'witness'] }],
  sessionId: 'session-1',
  ...change,
});

/** Where nothing but state, role and person stands in the way. */
const favourable = (act: Act, state: VersionState, you: Relation[]): VersionFacts => ({
  state,
  wardId: WARD,
  isHighRisk: true,
  you,
  yourCheck: act === 'sign-check' ? 'agreed' : act === 'slip' ? 'differed' : 'none',
  heldByOther: false,
  slippedBefore: false,
  sawFiguresAt: null,
  anotherCheckerAvailable: true,
  lapsesAt: NOW + 1,
});

const expected = (act: Act, state: VersionState, role: Role, you: Relation | 'nobody'): boolean =>
  LINES.some(
    (line) =>
      line.act === act &&
      line.from === state &&
      line.roles.includes(role) &&
      (line.must === 'anyone' || line.whom.includes(you) === (line.must === 'only')),
  );

const RELATIONS = ['nobody', 'author', 'checker', 'granter', 'pharmacist', 'giver'] as const;
const GRID = VERSION_STATES.flatMap((state) =>
  ROLES.flatMap((role) => RELATIONS.map((you) => [state, role, you] as const)),
);

describe('the transition table', () => {
  it.each(ACTS)('%s: every state, role and person', (act) => {
    for (const [state, role, you] of GRID) {
      const facts = favourable(act, state, you === 'nobody' ? [] : [you]);
      const verdict = decide(act, person([role]), facts, NOW);
      const where = `${act} from ${state} as ${role}, ${you}`;
      expect(verdict.allowed, where).toBe(expected(act, state, role, you));
      if (!verdict.allowed) expect(verdict.words, where).toMatch(/\.$/);
    }
  });

  it('leads where the paper says', () => {
    for (const { act, from, to } of LINES) {
      expect(TRANSITIONS[act].from, act).toContain(from);
      expect([...TRANSITIONS[act].to].sort(), act).toEqual([...to].sort());
    }
  });

  it('has no way out of an ended state', () => {
    const ended = VERSION_STATES.filter(isEnded);
    expect(ended.sort()).toEqual(
      [
        'stopped',
        'finished',
        'replaced',
        'revised',
        'withdrawn',
        'discarded',
        'lapsed',
        'countersigned',
      ].sort(),
    );
    for (const state of ended) {
      expect(isLive(state)).toBe(false);
      expect(ACTS.filter((act) => TRANSITIONS[act].from.includes(state))).toEqual([]);
    }
  });

  it('leaves lapsing and replacing to the clock and the program', () => {
    for (const act of ['lapse', 'replace'] as const) {
      for (const state of VERSION_STATES) {
        for (const role of ROLES) {
          expect(decide(act, person([role]), favourable(act, state, []), NOW).allowed).toBe(false);
        }
      }
    }
  });

  it.each(VERSION_STATES)('the clock lapses %s only where it waits, and only past its time', (state) => {
    const waits = ['awaiting-check', 'disputed', 'returned', 'awaiting-pharmacist', 'signed'].includes(state);
    const at = (now: number) =>
      decideByClock('lapse', { ...favourable('lapse', state, []), lapsesAt: NOW }, now).allowed;
    expect(at(NOW)).toBe(false);
    expect(at(NOW + 1)).toBe(waits);
  });
});

describe('a guard refuses by itself', () => {
  const ward = (entitlements: Actor['wards'][number]['entitlements']): Partial<Actor> => ({
    wards: [{ wardId: WARD, name: 'Heron', entitlements }],
  });
  const elsewhere: Partial<Actor> = { wards: [{ wardId: 'ward-2', name: 'Curlew', entitlements: [] }] };
  const unregistered: Partial<Actor> = { registrationNumber: null };

  it.each<[Act, Role, Partial<Actor>, Partial<VersionFacts>, string]>([
    ['sign', 'prescriber', elsewhere, { state: 'draft', you: ['author'] }, 'on-ward'],
    ['sign', 'prescriber', unregistered, { state: 'draft', you: ['author'] }, 'registered'],
    ['open-check', 'nurse', ward([]), {}, 'checking'],
    ['open-check', 'nurse', ward(['checking']), {}, 'senior-checking'],
    ['open-check', 'nurse', elsewhere, {}, 'on-ward'],
    ['open-check', 'nurse', unregistered, {}, 'registered'],
    ['open-check', 'nurse', {}, { heldByOther: true }, 'nobody-else-holds-check'],
    ['open-check', 'nurse', {}, { sawFiguresAt: NOW - SEEN_FIGURES_WAIT_MS }, 'unseen-or-waited'],
    [
      'open-check',
      'nurse',
      {},
      { sawFiguresAt: NOW - SEEN_FIGURES_WAIT_MS + 1, anotherCheckerAvailable: false },
      'unseen-or-waited',
    ],
    ['lock-in', 'nurse', {}, { yourCheck: 'agreed' }, 'not-locked-in'],
    ['lock-in', 'nurse', {}, { lapsesAt: NOW - 1 }, 'not-lapsed'],
    ['sign-check', 'nurse', {}, { yourCheck: 'open' }, 'locked-in-agreed'],
    ['sign-check', 'nurse', {}, { yourCheck: 'differed' }, 'locked-in-agreed'],
    ['slip', 'nurse', {}, { state: 'disputed', yourCheck: 'none' }, 'own-check'],
    [
      'slip',
      'nurse',
      {},
      { state: 'disputed', yourCheck: 'differed', slippedBefore: true },
      'not-slipped-before',
    ],
    ['grant-exception', 'prescriber', ward(['checking']), { state: 'draft' }, 'entitlement-missing'],
    ['settle', 'prescriber', ward(['checking']), { state: 'disputed' }, 'senior-or-pharmacist'],
    ['start', 'nurse', {}, { state: 'signed', lapsesAt: NOW - 1 }, 'not-lapsed'],
    ['withdraw', 'prescriber', {}, { state: 'signed' }, 'author-or-lead'],
    ['revise', 'prescriber', {}, { state: 'signed' }, 'author-or-taking-over'],
  ])('%s by a %s: %j %j is refused for %s', (act, role, change, facts, code) => {
    const verdict = decide(
      act,
      person([role], change),
      { ...favourable(act, 'awaiting-check', []), ...facts },
      NOW,
    );
    expect(verdict).toMatchObject({ allowed: false, code });
  });

  it.each<[string, Act, Role, Partial<Actor>, Partial<VersionFacts>]>([
    ['a pharmacist checks without the entitlement', 'open-check', 'pharmacist', ward([]), {}],
    [
      'an order of usual risk needs no senior',
      'open-check',
      'nurse',
      ward(['checking']),
      { isHighRisk: false },
    ],
    [
      'who saw the figures checks after ten minutes when there is nobody else',
      'open-check',
      'nurse',
      {},
      { sawFiguresAt: NOW - SEEN_FIGURES_WAIT_MS, anotherCheckerAvailable: false },
    ],
    ['differing choices may be signed', 'sign-check', 'nurse', {}, { yourCheck: 'choices-differ' }],
    ['its last moment is still its time', 'sign-check', 'nurse', {}, { yourCheck: 'agreed', lapsesAt: NOW }],
    ['a lead is on every ward', 'withdraw', 'lead', elsewhere, {}],
    ['a stop is never refused for the ward', 'stop', 'nurse', elsewhere, { state: 'running' }],
    ['a stop is never refused for a missing number', 'stop', 'nurse', unregistered, { state: 'held' }],
  ])('%s', (_what, act, role, change, facts) => {
    const state = favourable(act, 'awaiting-check', []);
    expect(decide(act, person([role], change), { ...state, ...facts }, NOW)).toEqual({ allowed: true });
  });
});
