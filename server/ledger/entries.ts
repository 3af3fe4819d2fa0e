/** Everything the ledger can say was done or refused. */
export const LEDGER_ACTS = [
  'signed-in',
  'sign-in-refused',
  'signed-out',
  'locked',
  'unlocked',
  'password-refused',
  'session-revoked',
  'child-registered',
  'child-edited',
  'child-transferred',
  'child-discharged',
  'weight-recorded',
  'weight-confirmed',
  'weight-refused',
  'height-recorded',
  'intake-recorded',
  'fluid-plan-set',
  'draft-started',
  'draft-discarded',
  'order-signed',
  'exception-asked',
  'exception-granted',
  'exception-refused',
  'exception-countersigned',
  'check-opened',
  'check-locked-in',
  'check-signed',
  'check-returned',
  'check-passed-on',
  'check-slip',
  'check-expired',
  'dispute-settled',
  'order-verified',
  'order-queried',
  'order-withdrawn',
  'order-revised',
  'order-lapsed',
  'bedside-compared',
  'infusion-started',
  'infusion-held',
  'infusion-resumed',
  'infusion-away',
  'infusion-back',
  'infusion-stopped',
  'infusion-stop-reason',
  'infusion-finished',
  'order-replaced',
  'given-recorded',
  'given-countersigned',
  'given-differed',
  'order-printed',
  'mail-sent',
  'mail-dead',
  'beside-opened',
  'beside-closed',
  'rulebook-in-force',
  'product-added',
  'reminder-sent',
  'escalated',
  'seen-figures',
  'account-added',
  'ward-added',
  'hospital-added',
  'schema-migrated',
  // a constraint refused a write whose command did not say what it was doing
  'write-refused',
] as const;
export type LedgerAct = (typeof LEDGER_ACTS)[number];

type CanonicalValue = string | boolean | null | number | CanonicalValue[] | { [key: string]: CanonicalValue };

/** What was done to what. Decimals are strings; absent keys are left out of the text. */
export type LedgerNote = {
  act: LedgerAct;
  subject: { kind: string; id: string };
  /** The child's id, for its timeline. */
  child?: string;
  code?: string;
  version?: number;
  from?: CanonicalValue;
  to?: CanonicalValue;
  reason?: string;
};

/** A row as it stands in the chain; who, when and how it ended are added by the runner. */
export type LedgerEntry = LedgerNote & {
  /** RFC 3339, UTC, milliseconds. */
  at: string;
  /** Absent person: the program or its clock. */
  actor: { id: string; name: string; roles: string[] } | null;
  outcome: 'done' | 'refused';
  refusal?: string;
};
