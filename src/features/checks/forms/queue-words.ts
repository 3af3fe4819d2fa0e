import type { QueueRow } from '../api/use-queue';
import { formatDuration, MINUTE } from '@shared/time';

const URGENCY = { emergency: 0, urgent: 1, routine: 2 } as const;

/** Named for you first, then by urgency, risk and time; what you cannot take stands last. */
export const inOrder = (rows: readonly QueueRow[]): QueueRow[] =>
  [...rows].sort(
    (a, b) =>
      Number(a.barred !== null) - Number(b.barred !== null) ||
      Number(b.askedOfYou) - Number(a.askedOfYou) ||
      URGENCY[a.urgency] - URGENCY[b.urgency] ||
      Number(b.isHighRisk) - Number(a.isHighRisk) ||
      (a.dueAt ?? '').localeCompare(b.dueAt ?? ''),
  );

/** A dispute of one's own is read, not taken; everything else that is barred says why. */
export const hrefOf = ({ act, versionId }: QueueRow): string =>
  act === 'countersign' ? `/orders/${versionId}/countersign` : `/checks/${versionId}`;

export const waitedWords = ({ waitedMinutes }: QueueRow): string => formatDuration(waitedMinutes * MINUTE);

const STANDING: Readonly<Record<QueueRow['yourState'], string>> = {
  none: '',
  open: 'You began it',
  agreed: 'Locked in: yours to sign',
  'choices-differ': 'Locked in: a choice differs',
  differed: 'You locked in: the figures differ',
  ended: 'You had a part in it',
};

/** What the row is to its reader. */
export const standingWords = ({ yourState, askedOfYou }: QueueRow): string =>
  STANDING[yourState] || (askedOfYou ? 'Asked of you by name' : 'Anyone who may check');
