import type { OrderView } from '@shared/routes/orders';
import { asc, eq, sql } from 'drizzle-orm';
import { ledger } from '../db/schema/ledger';
import { statement } from '../db/statement';
import type { Tx } from '../db/transaction';
import type { LedgerAct } from '../ledger/entries';

/** What each act on a version reads as; none of these words holds a figure. */
const WORDS: Partial<Readonly<Record<LedgerAct, string>>> = {
  'draft-started': 'Draft started',
  'draft-discarded': 'Draft discarded',
  'order-signed': 'Signed by its author, a check asked for',
  'exception-asked': 'A senior was asked',
  'exception-granted': 'A senior agreed',
  'exception-refused': 'A senior did not agree',
  'exception-countersigned': 'The senior countersigned',
  'check-opened': 'Check opened',
  'check-locked-in': 'Checker’s figures locked in',
  'check-signed': 'Checked and signed',
  'check-returned': 'Returned: could not be verified',
  'check-passed-on': 'Check passed on',
  'check-slip': 'Checker’s slip: passed to another person',
  'check-expired': 'Agreed but not signed in time',
  'dispute-settled': 'Dispute settled, returned to its author',
  'order-verified': 'Verified by a pharmacist',
  'order-queried': 'Queried by a pharmacist',
  'order-withdrawn': 'Withdrawn',
  'order-revised': 'Revised: the next version was begun',
  'order-lapsed': 'Lapsed',
  'bedside-compared': 'Compared at the bedside',
  'infusion-started': 'Started',
  'infusion-held': 'Held',
  'infusion-resumed': 'Resumed',
  'infusion-away': 'Sent away with the infusion',
  'infusion-back': 'Back on the ward',
  'infusion-stopped': 'Stopped',
  'infusion-stop-reason': 'Reason for the stop added',
  'infusion-finished': 'Finished',
  'order-replaced': 'Replaced by another order',
  'given-recorded': 'Given in an emergency, written down',
  'given-countersigned': 'Countersigned',
  'given-differed': 'Countersigner differed',
  'order-printed': 'Printed',
  'reminder-sent': 'Reminder sent',
  escalated: 'Passed up: not checked in time',
  'seen-figures': 'Figures opened',
};

type TimelineRow = OrderView['timeline'][number];

const entriesAbout = statement((tx) =>
  tx
    .select({ seq: ledger.seq, entry: ledger.entry })
    .from(ledger)
    .where(eq(ledger.subjectId, sql.placeholder('versionId')))
    .orderBy(asc(ledger.seq)),
);

/** The ledger's rows about one version, oldest first; while it is covered nobody is named and no reason is told. */
export async function loadTimeline(tx: Tx, versionId: string, isOpen: boolean): Promise<TimelineRow[]> {
  const rows = await entriesAbout(tx, { versionId });
  return rows.flatMap(({ seq, entry }) => {
    const read = JSON.parse(entry) as LedgerText;
    const words = WORDS[read.act];
    if (words === undefined) return [];
    const reason = isOpen && read.reason ? `: ${read.reason}` : '';
    return [
      {
        seq,
        at: read.at,
        who: isOpen ? (read.actor?.name ?? 'Brimline') : null,
        words: `${words}${reason}`,
        outcome: read.outcome,
      },
    ];
  });
}

type LedgerText = {
  act: LedgerAct;
  at: string;
  actor: { name: string } | null;
  outcome: 'done' | 'refused';
  reason?: string;
};
