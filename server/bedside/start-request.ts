import type { BedsideEntries } from '@shared/routes/bedside';

/** What a nurse sends to record a start, the witness already known. */
export type RecordStart = {
  versionId: string;
  entries: BedsideEntries;
  /** A login whose password was verified before this transaction; null where nobody witnessed. */
  witnessLogin: string | null;
  replacesVersionId: string | null;
};
