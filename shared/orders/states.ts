/** Every state of a version. The order itself has none: an order is a code and a child. */
export const VERSION_STATES = [
  'draft',
  'awaiting-check',
  'disputed',
  'returned',
  'awaiting-pharmacist',
  'signed',
  'running',
  'held',
  'away',
  'stopped',
  'finished',
  'replaced',
  'revised',
  'withdrawn',
  'discarded',
  'lapsed',
  'given',
  'countersigned',
] as const;
export type VersionState = (typeof VERSION_STATES)[number];

const LIVE: readonly VersionState[] = [
  'draft',
  'awaiting-check',
  'disputed',
  'returned',
  'awaiting-pharmacist',
  'signed',
  'running',
  'held',
  'away',
  'given',
];

/** At most one version of an order is live. */
export const isLive = (state: VersionState): boolean => LIVE.includes(state);
/** Fluid is connected to the child, flowing or not. */
export const isConnected = (state: VersionState): boolean =>
  state === 'running' || state === 'held' || state === 'away';
export const isOnPump = (state: VersionState): boolean => state === 'running';
export const isDraft = (state: VersionState): boolean => state === 'draft';
export const isAwaitingCheck = (state: VersionState): boolean => state === 'awaiting-check';
export const isDisputed = (state: VersionState): boolean => state === 'disputed';
export const isSigned = (state: VersionState): boolean => state === 'signed';
export const isRevised = (state: VersionState): boolean => state === 'revised';
export const isGiven = (state: VersionState): boolean => state === 'given' || state === 'countersigned';
/** Ended for good: no act leads out of it. */
export const isEnded = (state: VersionState): boolean => !LIVE.includes(state);

/** For lists that filter by a chosen state; deciding goes by `decide`. */
export const isIn = (state: VersionState, chosen: VersionState): boolean => state === chosen;

/** Overdue is a fact, not a state: a running order never lapses by itself. */
export const isOverdue = (state: VersionState, lapsesAt: number | null, now: number): boolean =>
  (state === 'running' || state === 'held') && lapsesAt !== null && now > lapsesAt;

const ASKED_FOR: readonly VersionState[] = [
  'draft',
  'awaiting-check',
  'disputed',
  'returned',
  'awaiting-pharmacist',
];

/** What stands over the figure of an order that no pump may be set to; undefined where one may, or it was given. */
export const notInForce = (state: VersionState): string | undefined => {
  if (ASKED_FOR.includes(state)) return 'Asked for, not in force';
  return isEnded(state) && state !== 'countersigned' ? 'Ended, not in force' : undefined;
};

export const STATE_WORDS: Readonly<Record<VersionState, string>> = {
  draft: 'Draft',
  'awaiting-check': 'Awaiting check',
  disputed: 'Disputed',
  returned: 'Returned',
  'awaiting-pharmacist': 'Awaiting pharmacist',
  signed: 'Signed',
  running: 'Running',
  held: 'Held',
  away: 'Away',
  stopped: 'Stopped',
  finished: 'Finished',
  replaced: 'Replaced',
  revised: 'Revised',
  withdrawn: 'Withdrawn',
  discarded: 'Discarded',
  lapsed: 'Lapsed',
  given: 'Given in an emergency',
  countersigned: 'Countersigned',
};
