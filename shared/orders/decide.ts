import { hasRole, isEntitled, isOnWard, type Actor } from '../accounts/actor';
import { TRANSITIONS, type Act, type GuardName, type Relation } from './transitions';
import type { VersionState } from './states';

/**
 * What deciding needs to know about a version, told relative to the one who asks: a checker's screen can
 * decide without ever holding the author's name.
 */
export type VersionFacts = {
  state: VersionState;
  wardId: string;
  isHighRisk: boolean;
  /** What the asking person already is to this version. */
  you: readonly Relation[];
  /** The asking person's own standing in the check. */
  yourCheck: 'none' | 'open' | 'agreed' | 'choices-differ' | 'differed' | 'ended';
  /** Another person has locked in and holds the check for the reservation time. */
  heldByOther: boolean;
  slippedBefore: boolean;
  /** When the asking person last saw the author's figures of this order, and whether another checker is about. */
  sawFiguresAt: number | null;
  anotherCheckerAvailable: boolean;
  /** Signed orders lapse at start-by, waiting ones at their own time; null while a draft. */
  lapsesAt: number | null;
};

export type RefusalCode =
  'role-missing' | 'order-state' | 'second-person-required' | 'entitlement-missing' | GuardName;

export type Verdict = { allowed: true } | { allowed: false; code: RefusalCode; words: string };

const WORDS: Readonly<Record<RefusalCode, string>> = {
  'role-missing': 'Your role does not include this.',
  'order-state': 'The order has moved on since this was shown.',
  'second-person-required': 'This needs another person: you already had a part in this order.',
  'entitlement-missing': 'This needs an entitlement you do not hold on this ward.',
  'on-ward': 'You are not a member of this child’s ward.',
  registered: 'Your professional registration number is not on your account.',
  checking: 'Your account is not entitled to check orders on this ward.',
  'senior-checking': 'This is a high-risk order: a senior checker or a pharmacist has to check it.',
  'senior-or-pharmacist': 'A senior or a pharmacist has to settle this.',
  'author-or-lead': 'Only the author or a ward lead can withdraw this.',
  'author-or-taking-over': 'Only the author can revise this order while it is not returned.',
  'not-locked-in': 'Your figures are locked in already.',
  'locked-in-agreed': 'Lock in figures that agree first.',
  'nobody-else-holds-check': 'Someone else has locked in figures for this order.',
  'not-slipped-before': 'This check was passed on once already because of a slip.',
  'own-check': 'Only the person whose entry this is can do that.',
  'not-lapsed': 'The order has lapsed.',
  'time-passed': 'Its time has not passed yet.',
  'unseen-or-waited': 'You have seen the other figures. Another checker is asked first.',
};

/** The same person may check ten minutes after seeing the figures when there is nobody else. */
export const SEEN_FIGURES_WAIT_MS = 600_000;

const isYou = (facts: VersionFacts, relation: Relation): boolean => facts.you.includes(relation);

const GUARDS: Readonly<
  Record<GuardName, (actor: Actor, facts: VersionFacts, now: number, act: Act) => boolean>
> = {
  'on-ward': (actor, facts) => isOnWard(actor, facts.wardId),
  registered: (actor) => actor.registrationNumber !== null,
  checking: (actor, facts) =>
    actor.roles.includes('pharmacist') || isEntitled(actor, 'checking', facts.wardId),
  'senior-checking': (actor, facts) =>
    !facts.isHighRisk || actor.roles.includes('pharmacist') || isEntitled(actor, 'senior', facts.wardId),
  'senior-or-pharmacist': (actor, facts) =>
    actor.roles.includes('pharmacist') || isEntitled(actor, 'senior', facts.wardId),
  'author-or-lead': (actor, facts) => isYou(facts, 'author') || actor.roles.includes('lead'),
  'author-or-taking-over': (_actor, facts) => isYou(facts, 'author') || facts.state === 'returned',
  'not-locked-in': (_actor, facts) => facts.yourCheck === 'none' || facts.yourCheck === 'open',
  'locked-in-agreed': (_actor, facts) => facts.yourCheck === 'agreed' || facts.yourCheck === 'choices-differ',
  'nobody-else-holds-check': (_actor, facts) => !facts.heldByOther,
  'not-slipped-before': (_actor, facts) => !facts.slippedBefore,
  'own-check': (_actor, facts, _now, act) =>
    act === 'slip' ? facts.yourCheck === 'differed' : isYou(facts, 'author'),
  'not-lapsed': (_actor, facts, now) => facts.lapsesAt === null || now <= facts.lapsesAt,
  'time-passed': (_actor, facts, now) => facts.lapsesAt !== null && now > facts.lapsesAt,
  'unseen-or-waited': (_actor, facts, now) =>
    facts.sawFiguresAt === null ||
    (!facts.anotherCheckerAvailable && now - facts.sawFiguresAt >= SEEN_FIGURES_WAIT_MS),
};

export const refuse = (code: RefusalCode): Verdict => ({ allowed: false, code, words: WORDS[code] });

/** Whether this person may do this act to this version now, and if not, which rule refuses, in words. */
export function decide(act: Act, actor: Actor, facts: VersionFacts, now: number): Verdict {
  const { from, roles, notBy, guards, entitlement } = TRANSITIONS[act];
  if (!hasRole(actor, roles)) return refuse('role-missing');
  // who is a stranger to the ward learns nothing of the order, not even that it has moved on
  if (guards.includes('on-ward') && !isOnWard(actor, facts.wardId)) return refuse('on-ward');
  if (!from.includes(facts.state)) return refuse('order-state');
  if (notBy.some((relation) => isYou(facts, relation))) return refuse('second-person-required');
  if (entitlement && !isEntitled(actor, entitlement, facts.wardId)) return refuse('entitlement-missing');
  const failed = guards.find((guard) => !GUARDS[guard](actor, facts, now, act));
  return failed ? refuse(failed) : { allowed: true };
}

/** The clock's and the program's own acts (lapse, replace): no person, the same table. */
export function decideByClock(act: 'lapse' | 'replace', facts: VersionFacts, now: number): Verdict {
  const { from, guards } = TRANSITIONS[act];
  if (!from.includes(facts.state)) return refuse('order-state');
  const failed = guards.find(
    (guard) => guard === 'time-passed' && !(facts.lapsesAt !== null && now > facts.lapsesAt),
  );
  return failed ? refuse(failed) : { allowed: true };
}
