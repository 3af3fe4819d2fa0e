import type { Entitlement, Role } from '../accounts/actor';
import type { VersionState } from './states';

/** Every act on a version. Acts that start something new (start-draft, record-given) live in `can.ts`. */
export const ACTS = [
  'sign',
  'discard',
  'ask-exception',
  'grant-exception',
  'refuse-exception',
  'open-check',
  'lock-in',
  'sign-check',
  'cannot-verify',
  'pass-on',
  'slip',
  'settle',
  'withdraw',
  'revise',
  'verify',
  'query',
  'lapse',
  'start',
  'hold',
  'resume',
  'send-away',
  'come-back',
  'stop',
  'finish',
  'replace',
  'countersign',
  'differ',
] as const;
export type Act = (typeof ACTS)[number];

/** What the actor already is to this version; a person may not act against one of these. */
export type Relation = 'author' | 'checker' | 'granter' | 'pharmacist' | 'giver';

export type GuardName =
  | 'on-ward'
  | 'registered'
  | 'checking'
  | 'senior-checking'
  | 'senior-or-pharmacist'
  | 'author-or-lead'
  | 'author-or-taking-over'
  | 'not-locked-in'
  | 'locked-in-agreed'
  | 'nobody-else-holds-check'
  | 'not-slipped-before'
  | 'own-check'
  | 'not-lapsed'
  | 'time-passed'
  | 'unseen-or-waited';

export type Transition = {
  from: readonly VersionState[];
  /** Several when the act's outcome decides (lock-in agrees or differs; sign-check with or without a pharmacist). */
  to: readonly VersionState[];
  /** Empty: the clock or the program acts. */
  roles: readonly Role[];
  notBy: readonly Relation[];
  guards: readonly GuardName[];
  entitlement?: Entitlement;
  /** Meaning of the signature it makes. */
  signature?: SignatureMeaning;
  /** Password typed again. */
  password?: boolean;
};

export const SIGNATURE_MEANINGS = [
  'author',
  'independent-check',
  'pharmacist',
  'bedside',
  'witness',
  'exception',
  'settlement',
  'countersignature',
  'rulebook-approval',
] as const;
export type SignatureMeaning = (typeof SIGNATURE_MEANINGS)[number];

const ANYONE_CLINICAL: readonly Role[] = ['prescriber', 'pharmacist', 'nurse', 'lead'];
const CHECKERS = ANYONE_CLINICAL;

const row = (
  from: Transition['from'],
  to: Transition['to'],
  roles: Transition['roles'],
  rest: Partial<Omit<Transition, 'from' | 'to' | 'roles'>> = {},
): Transition => ({ from, to, roles, notBy: [], guards: [], ...rest });

/** How an order moves. The server decides by it, the client shows by it, the tests walk every pair of it. */
export const TRANSITIONS: Readonly<Record<Act, Transition>> = {
  sign: row(['draft'], ['awaiting-check'], ['prescriber'], {
    guards: ['on-ward', 'registered', 'own-check'],
    signature: 'author',
    password: true,
  }),
  discard: row(['draft'], ['discarded'], ['prescriber'], { guards: ['own-check'] }),
  'ask-exception': row(['draft'], ['draft'], ['prescriber'], { guards: ['on-ward', 'own-check'] }),
  'grant-exception': row(['draft'], ['draft'], ['prescriber', 'lead'], {
    notBy: ['author', 'checker'],
    guards: ['on-ward', 'registered'],
    entitlement: 'senior',
    signature: 'exception',
    password: true,
  }),
  'refuse-exception': row(['draft'], ['draft'], ['prescriber', 'lead'], {
    notBy: ['author', 'checker'],
    guards: ['on-ward'],
    entitlement: 'senior',
  }),
  'open-check': row(['awaiting-check'], ['awaiting-check'], CHECKERS, {
    notBy: ['author', 'granter'],
    guards: [
      'on-ward',
      'registered',
      'checking',
      'senior-checking',
      'nobody-else-holds-check',
      'unseen-or-waited',
    ],
  }),
  'lock-in': row(['awaiting-check'], ['awaiting-check', 'disputed'], CHECKERS, {
    notBy: ['author', 'granter'],
    guards: [
      'on-ward',
      'registered',
      'checking',
      'senior-checking',
      'nobody-else-holds-check',
      'not-locked-in',
      'unseen-or-waited',
      'not-lapsed',
    ],
  }),
  'sign-check': row(['awaiting-check'], ['signed', 'awaiting-pharmacist'], CHECKERS, {
    notBy: ['author', 'granter'],
    guards: ['on-ward', 'registered', 'checking', 'senior-checking', 'locked-in-agreed', 'not-lapsed'],
    signature: 'independent-check',
    password: true,
  }),
  'cannot-verify': row(['awaiting-check'], ['returned'], CHECKERS, {
    notBy: ['author', 'granter'],
    guards: ['on-ward', 'checking', 'nobody-else-holds-check'],
  }),
  'pass-on': row(['awaiting-check'], ['awaiting-check'], CHECKERS, {
    notBy: ['author'],
    guards: ['on-ward', 'checking', 'nobody-else-holds-check', 'not-locked-in'],
  }),
  // what was given goes back to waiting for its countersignature: it is never started
  slip: row(['disputed'], ['awaiting-check', 'given'], CHECKERS, {
    notBy: ['author'],
    guards: ['on-ward', 'own-check', 'not-slipped-before'],
  }),
  settle: row(['disputed'], ['returned', 'countersigned'], ['prescriber', 'pharmacist', 'lead'], {
    notBy: ['author', 'checker'],
    guards: ['on-ward', 'registered', 'senior-or-pharmacist'],
    signature: 'settlement',
    password: true,
  }),
  withdraw: row(
    ['awaiting-check', 'disputed', 'returned', 'awaiting-pharmacist', 'signed'],
    ['withdrawn'],
    ['prescriber', 'lead'],
    {
      guards: ['on-ward', 'author-or-lead'],
    },
  ),
  revise: row(['disputed', 'returned', 'signed'], ['revised'], ['prescriber'], {
    guards: ['on-ward', 'registered', 'author-or-taking-over'],
  }),
  verify: row(['awaiting-pharmacist'], ['signed'], ['pharmacist'], {
    notBy: ['author', 'checker'],
    guards: ['on-ward', 'registered', 'not-lapsed'],
    signature: 'pharmacist',
    password: true,
  }),
  query: row(['awaiting-pharmacist'], ['returned'], ['pharmacist'], {
    notBy: ['author', 'checker'],
    guards: ['on-ward'],
  }),
  lapse: row(['awaiting-check', 'disputed', 'returned', 'awaiting-pharmacist', 'signed'], ['lapsed'], [], {
    guards: ['time-passed'],
  }),
  start: row(['signed'], ['running'], ['nurse'], {
    notBy: ['author'],
    guards: ['on-ward', 'registered', 'not-lapsed'],
    signature: 'bedside',
  }),
  hold: row(['running'], ['held'], ['nurse', 'prescriber'], { guards: ['on-ward'] }),
  resume: row(['held'], ['running'], ['nurse', 'prescriber'], { guards: ['on-ward'] }),
  'send-away': row(['running'], ['away'], ['nurse'], { guards: ['on-ward'] }),
  'come-back': row(['away'], ['running'], ['nurse'], { guards: ['on-ward'] }),
  // never refused for ward or staleness: a clinical role and a live session are enough
  stop: row(['running', 'held', 'away'], ['stopped'], ANYONE_CLINICAL),
  finish: row(['running'], ['finished'], ['nurse'], { guards: ['on-ward'] }),
  replace: row(['running'], ['replaced'], []),
  countersign: row(['given'], ['countersigned'], CHECKERS, {
    notBy: ['giver'],
    guards: ['on-ward', 'registered', 'checking', 'not-locked-in'],
    signature: 'countersignature',
    password: true,
  }),
  differ: row(['given'], ['disputed'], CHECKERS, {
    notBy: ['giver'],
    guards: ['on-ward', 'registered', 'checking', 'not-locked-in'],
  }),
};
