import { isGiven, type VersionState } from './states';

/** What coverage needs to know of one version, told relative to the viewer. */
export type CoverageFacts = {
  state: VersionState;
  /** The independent checker has signed this version at some time. */
  everSignedByChecker: boolean;
  /** It was recorded as given in an emergency: what a child has received is a fact of the chart. */
  wasGiven: boolean;
  viewerIsAuthor: boolean;
  viewerLockedIn: boolean;
  /** The viewer granted or refused an exception on it, or settled its dispute. */
  viewerDecided: boolean;
};

/**
 * Whether a viewer may see a version's figures, fluid, weight, method and author. Everyone on a ward may become
 * the checker, so what the checker has not signed is covered to all but those who already know it.
 */
export const maySee = (facts: CoverageFacts): boolean =>
  facts.everSignedByChecker ||
  facts.wasGiven ||
  isGiven(facts.state) ||
  facts.viewerIsAuthor ||
  facts.viewerLockedIn ||
  facts.viewerDecided;
