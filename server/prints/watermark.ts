import type { VersionState } from '@shared/orders/states';
import type { Watermark } from '../documents/order-paper';

/** Words across a paper that must not be followed; null where it may be. */
export const WATERMARKS: Readonly<Record<VersionState, Watermark | null>> = {
  draft: 'Draft, not signed',
  'awaiting-check': 'Not signed',
  disputed: 'Not signed',
  returned: 'Not signed',
  'awaiting-pharmacist': 'Not signed',
  signed: null,
  running: null,
  held: null,
  away: null,
  stopped: 'Ended',
  finished: 'Ended',
  replaced: 'Ended',
  revised: 'Revised, void',
  withdrawn: 'Withdrawn',
  discarded: 'Withdrawn',
  lapsed: 'Lapsed',
  given: 'Not signed',
  countersigned: null,
};

/** Whether a paper of this state may be followed now. */
export const isCurrent = (state: VersionState): boolean => {
  const words = WATERMARKS[state];
  return words === null;
};
