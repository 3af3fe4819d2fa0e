import { maySee, type CoverageFacts } from '@shared/orders/coverage';
import { VERSION_STATES } from '@shared/orders/states';
import { describe, expect, it } from 'vitest';

const stranger: CoverageFacts = {
  state: 'awaiting-check',
  everSignedByChecker: false,
  wasGiven: false,
  viewerIsAuthor: false,
  viewerLockedIn: false,
  viewerDecided: false,
};

describe('what is covered to whom', () => {
  it.each(VERSION_STATES)('%s, never signed by a checker: covered but for what was given', (state) => {
    const isGiven = state === 'given' || state === 'countersigned';
    expect(maySee({ ...stranger, state })).toBe(isGiven);
  });

  it.each(VERSION_STATES)('%s, once signed by its checker: open for good', (state) => {
    expect(maySee({ ...stranger, state, everSignedByChecker: true })).toBe(true);
  });

  it.each(['viewerIsAuthor', 'viewerLockedIn', 'viewerDecided'] as const)(
    'is open in every state to who knows it already: %s',
    (fact) => {
      for (const state of VERSION_STATES) expect(maySee({ ...stranger, state, [fact]: true })).toBe(true);
    },
  );

  it('stays open when what was given is disputed afterwards', () => {
    expect(maySee({ ...stranger, state: 'disputed', wasGiven: true })).toBe(true);
  });
});
