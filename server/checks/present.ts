import type { Actor } from '@shared/accounts/actor';
import { FRACTION_WORDS } from '@shared/checks/words';
import { ageAt, ageText } from '@shared/children/age';
import { formatNumber } from '@shared/rounding';
import { decide, type VersionFacts } from '@shared/orders/decide';
import { isGiven } from '@shared/orders/states';
import type { Act } from '@shared/orders/transitions';
import type { DraftContext } from '@shared/routes/orders';
import type { CheckPage } from '@shared/routes/checks';
import { MINUTE, toRfc3339, type Instant } from '@shared/time';
import { readInstant } from '../db/columns';
import type { CoveredRow, QueueRow } from './queries';

const orNull = (at: Instant | null): string | null => (at === null ? null : toRfc3339(at));

/** A covered order on the wire; an order that nobody has signed has none. */
export function presentCovered(row: CoveredRow): CheckPage['order'] {
  if (row.signedAt === null) throw new TypeError('a draft is not checked');
  return {
    versionId: row.versionId,
    code: row.code,
    version: row.version,
    kind: row.kind,
    urgency: row.urgency,
    reason: row.reason ?? '',
    askedStart: orNull(row.askedStart),
    signedAt: toRfc3339(row.signedAt),
    dueAt: orNull(row.checkDueAt),
    isHighRisk: row.isHighRisk,
  };
}

/** A person's own standing in a check, from the state of their row. */
export function standingOf(
  state: QueueRow['checkState'],
  choicesDiffer: boolean | null,
): VersionFacts['yourCheck'] {
  if (state === null || state === 'passed-on') return 'none';
  if (state === 'open' || state === 'differed') return state;
  if (state === 'locked-agreed') return choicesDiffer === true ? 'choices-differ' : 'agreed';
  return 'ended';
}

const moment = (text: string | null): Instant | null => (text === null ? null : readInstant(text));

/** What deciding needs of a row of the queue; whether another checker is about is known only where it matters. */
export const factsOf = (row: QueueRow, anotherCheckerAvailable: boolean): VersionFacts => ({
  state: row.state,
  wardId: row.wardId,
  isHighRisk: row.isHighRisk,
  you: [
    ...(row.isAuthor ? (['author'] as const) : []),
    ...(row.isAuthor && isGiven(row.state) ? (['giver'] as const) : []),
    ...(row.isGranter ? (['granter'] as const) : []),
  ],
  yourCheck: standingOf(row.checkState, row.choicesDiffer),
  heldByOther: row.heldByOther,
  slippedBefore: row.slippedBefore,
  sawFiguresAt: moment(row.sawAt),
  anotherCheckerAvailable,
  lapsesAt: moment(row.startBy),
});

/** The act a queue row is there for. */
function actOf(facts: VersionFacts): Act {
  if (isGiven(facts.state)) return 'countersign';
  if (facts.yourCheck === 'differed') return 'slip';
  if (facts.yourCheck === 'agreed' || facts.yourCheck === 'choices-differ') return 'sign-check';
  return 'lock-in';
}

type Reader = { actor: Actor; now: Instant; zone: string };

/** A line of the queue as its reader may see it. */
export function presentQueueRow(row: QueueRow, facts: VersionFacts, { actor, now, zone }: Reader) {
  const verdict = decide(actOf(facts), actor, facts, now);
  const birth = { bornOn: row.bornOn, bornAt: row.bornAt ?? undefined };
  return {
    ...presentCovered(row),
    child: {
      id: row.childId,
      number: row.number,
      surname: row.surname,
      given: row.given,
      ageText: ageText(ageAt(birth, now, zone)),
      bed: row.bed,
    },
    wardName: row.wardName,
    askedOfYou: row.askedChecker === actor.id,
    act: isGiven(row.state) ? ('countersign' as const) : ('check' as const),
    waitedMinutes: Math.max(0, Math.floor((now - (row.signedAt ?? now)) / MINUTE)),
    isLate: row.checkDueAt !== null && now > row.checkDueAt,
    yourState: facts.yourCheck,
    barred: verdict.allowed ? null : verdict.words,
  };
}

/** A consultant's plan in a line. */
export function planWords(plan: DraftContext['plan']): string | null {
  if (plan === null) return null;
  const fraction = Object.entries(FRACTION_WORDS).find(([value]) => value === plan.fraction)?.[1];
  const what =
    plan.kind === 'allowance'
      ? `At most ${formatNumber(Number(plan.mlPer24h), 1)} mL in 24 h`
      : `${fraction ?? plan.fraction ?? ''} of maintenance`;
  return `${what}: ${plan.words}`;
}

/** Acts of the page with a word for each that is not open. */
export const presentActs = (
  acts: readonly Act[],
  actor: Actor,
  facts: VersionFacts,
  now: Instant,
): CheckPage['acts'] =>
  acts.map((act) => {
    const verdict = decide(act, actor, facts, now);
    return verdict.allowed
      ? { act, allowed: true, words: '' }
      : { act, allowed: false, words: verdict.words };
  });
