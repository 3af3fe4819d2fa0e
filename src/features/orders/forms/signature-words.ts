import type { SignatureMeaning } from '@shared/orders/transitions';

/** What each signature says. */
export const MEANING_WORDS: Readonly<Record<SignatureMeaning, string>> = {
  author: 'drew up the order',
  'independent-check': 'independent check, worked it out unseen',
  pharmacist: 'product, additives and volume verified',
  bedside: 'child, bag, pump and line compared at the start',
  witness: 'witnessed the start',
  exception: 'agreed to the exception',
  settlement: 'settled the dispute',
  countersignature: 'countersigned afterwards',
  'rulebook-approval': 'approved the rulebook',
};
